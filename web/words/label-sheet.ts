import type { LabelSymbol } from '../../server/contract/labels.ts';

/** A sheet of labels in mm, as it is typed. */
export interface SheetForm {
  readonly pageWidth: string;
  readonly pageHeight: string;
  readonly columns: string;
  readonly rows: string;
  readonly left: string;
  readonly top: string;
  readonly gapX: string;
  readonly gapY: string;
  readonly skip: string;
}

/** A4 with 3 × 8 labels of 70 × 37 mm, as stationers sell it. */
export const A4_OF_24: SheetForm = {
  pageWidth: '210',
  pageHeight: '297',
  columns: '3',
  rows: '8',
  left: '0',
  top: '0.5',
  gapX: '0',
  gapY: '0',
  skip: '0',
};

export interface SheetLayout {
  readonly pageWidthMm: number;
  readonly pageHeightMm: number;
  readonly labelWidthMm: number;
  readonly labelHeightMm: number;
  /** Upper left corners of the labels of one page. */
  readonly places: readonly { readonly x: number; readonly y: number }[];
  /** Places left empty at the beginning, because their labels are used up. */
  readonly skip: number;
}

/** Least side of a label that a hand can peel off. */
const LEAST_LABEL_MM = 8;

/** The layout that was typed, or what is wrong with it. The same margin is kept on both sides. */
export function sheetLayout(form: SheetForm): SheetLayout | string {
  const [pageWidthMm, pageHeightMm, left, top, gapX, gapY] = (
    ['pageWidth', 'pageHeight', 'left', 'top', 'gapX', 'gapY'] as const
  ).map((key) => Number(form[key].replace(',', '.'))) as [number, number, number, number, number, number];
  const [columns, rows, skip] = [form.columns, form.rows, form.skip].map(Number) as [number, number, number];
  if (![pageWidthMm, pageHeightMm, left, top, gapX, gapY].every((mm) => Number.isFinite(mm) && mm >= 0)) {
    return 'A length is no figure in mm.';
  }
  if (pageWidthMm > 1000 || pageHeightMm > 2000) return 'A page of more than 1 m by 2 m is no page.';
  if (![columns, rows].every((n) => Number.isInteger(n) && n > 0 && n <= 50))
    return 'Columns and rows go from 1 to 50.';
  if (!Number.isInteger(skip) || skip < 0 || skip >= columns * rows) return 'More labels are skipped than a page has.';
  const labelWidthMm = (pageWidthMm - 2 * left - gapX * (columns - 1)) / columns;
  const labelHeightMm = (pageHeightMm - 2 * top - gapY * (rows - 1)) / rows;
  if (Math.min(labelWidthMm, labelHeightMm) < LEAST_LABEL_MM) {
    return `The labels would be ${labelWidthMm.toFixed(1)} by ${labelHeightMm.toFixed(1)} mm: too small to read.`;
  }
  const places = Array.from({ length: columns * rows }, (_, n) => ({
    x: left + (n % columns) * (labelWidthMm + gapX),
    y: top + Math.floor(n / columns) * (labelHeightMm + gapY),
  }));
  return { pageWidthMm, pageHeightMm, labelWidthMm, labelHeightMm, places, skip };
}

export interface Asked {
  readonly kind: string;
  readonly code: string;
  readonly copies: number;
}

/** Pages of labels: at each place what stands there, null where it is left empty. */
export function pagesOfLabels({ places, skip }: SheetLayout, asked: readonly Asked[]): (Asked | null)[][] {
  const labels: (Asked | null)[] = [
    ...new Array<null>(skip).fill(null),
    ...asked.flatMap((one) => new Array<Asked>(one.copies).fill(one)),
  ];
  const pages: (Asked | null)[][] = [];
  for (let from = 0; from < labels.length; from += places.length) pages.push(labels.slice(from, from + places.length));
  return pages;
}

/** Narrowest bar that hand-held readers are sold for: 0.19 mm (7.5 mil), common practice. */
const LEAST_MODULE_MM = 0.19;

/** True where the bars of a code would be too narrow: 11 modules a character, start, check and stop, quiet zones. */
export function isTooNarrow(symbol: LabelSymbol, code: string, widthMm: number): boolean {
  return symbol === 'code128' && widthMm / (11 * code.length + 11 + 11 + 13 + 20) < LEAST_MODULE_MM;
}
