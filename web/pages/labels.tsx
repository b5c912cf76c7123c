import { useEffect } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import type { LabelSymbol } from '../../server/contract/labels.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePageTitle } from '../page-title.ts';
import { LabelSheet } from '../parts/label-sheet.tsx';
import { LabelsAsked } from '../parts/labels-asked.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { SheetFields } from '../parts/sheet-fields.tsx';
import { count } from '../words/figures.ts';
import { A4_OF_24, type Asked, isTooNarrow, pagesOfLabels, sheetLayout } from '../words/label-sheet.ts';

/** Labels to stick on parts, tools, rolls and kits: what, how many, and how the sheet is laid out. */
export default function LabelsPage() {
  usePageTitle('Labels');
  const { query } = useLocation();
  const { kind = '', code = '' } = query;
  const [asked, setAsked] = useKeptForm<readonly Asked[]>(
    `labels.${kind}.${code}`,
    code === '' ? [] : [{ kind, code, copies: 1 }],
  );
  const [symbol, setSymbol] = useKeptForm<LabelSymbol>('label-symbol', 'qr');
  const [form, setForm] = useKeptForm('label-sheet', A4_OF_24);
  const layout = sheetLayout(form);
  const pages = typeof layout === 'string' || asked.length === 0 ? [] : pagesOfLabels(layout, asked);
  const narrow =
    typeof layout === 'string' ? [] : asked.filter((one) => isTooNarrow(symbol, one.code, layout.labelWidthMm));
  usePaper(typeof layout === 'string' ? null : layout);
  return (
    <>
      <div class="no-print">
        <Notebook>
          <PageHead title="Labels">
            <p class="soft">
              A label holds the code and nothing else: scanned into the box at the top (press /), it opens the page of
              its thing.
            </p>
          </PageHead>
          <LabelsAsked asked={asked} onAsked={setAsked} />
          <SheetFields form={form} symbol={symbol} onForm={setForm} onSymbol={setSymbol} />
          {typeof layout === 'string' && (
            <p class="notice" role="alert">
              {layout}
            </p>
          )}
          {narrow.length > 0 && (
            <p class="notice" role="alert">
              The bars of {narrow.map((one) => one.code).join(', ')} would be narrower than 0.19 mm, which hand-held
              readers miss. Print a QR Code, or wider labels.
            </p>
          )}
          <div class="row section">
            <button type="button" class="primary" disabled={pages.length === 0} onClick={() => print()}>
              Print {count(pages.length, 'page')}
            </button>
            <span class="soft">Print at 100 %, without fitting to the page.</span>
          </div>
        </Notebook>
      </div>
      {typeof layout !== 'string' && (
        <section class="label-sheets" aria-label="What is printed">
          {pages.map((labels, n) => (
            <LabelSheet key={n} layout={layout} symbol={symbol} labels={labels} />
          ))}
        </section>
      )}
    </>
  );
}

/** The printer's page is the sheet, without a margin of its own. */
function usePaper(layout: { readonly pageWidthMm: number; readonly pageHeightMm: number } | null): void {
  const size = layout === null ? null : `${layout.pageWidthMm}mm ${layout.pageHeightMm}mm`;
  useEffect(() => {
    if (size === null) return;
    const paper = new CSSStyleSheet();
    paper.replaceSync(`@media print { @page { size: ${size}; margin: 0 } }`);
    document.adoptedStyleSheets = [...document.adoptedStyleSheets, paper];
    return () => {
      document.adoptedStyleSheets = document.adoptedStyleSheets.filter((sheet) => sheet !== paper);
    };
  }, [size]);
}
