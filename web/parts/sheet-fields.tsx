import type { LabelSymbol } from '../../server/contract/labels.ts';
import type { SheetForm } from '../words/label-sheet.ts';
import { ChoiceField } from './field.tsx';
import { FigureField } from './figure-field.tsx';

const FIELDS: readonly [key: keyof SheetForm, label: string][] = [
  ['pageWidth', 'Page width, mm'],
  ['pageHeight', 'Page height, mm'],
  ['columns', 'Labels across'],
  ['rows', 'Labels down'],
  ['left', 'Side margin, mm'],
  ['top', 'Top margin, mm'],
  ['gapX', 'Gap across, mm'],
  ['gapY', 'Gap down, mm'],
  ['skip', 'Labels used up already'],
];

const SYMBOLS = [
  { value: 'qr', text: 'QR Code' },
  { value: 'code128', text: 'Code 128 (bars)' },
];

/** How the sheet of labels is laid out, kept in this browser. */
export function SheetFields({
  form,
  symbol,
  onForm,
  onSymbol,
}: {
  form: SheetForm;
  symbol: LabelSymbol;
  onForm: (form: SheetForm) => void;
  onSymbol: (symbol: LabelSymbol) => void;
}) {
  return (
    <section class="section">
      <h2>The sheet</h2>
      <div class="fields">
        <ChoiceField
          label="Symbol"
          choices={SYMBOLS}
          value={symbol}
          onValue={(value) => onSymbol(value as LabelSymbol)}
        />
        {FIELDS.map(([key, label]) => (
          <FigureField
            key={key}
            label={label}
            value={form[key]}
            onValue={(value) => onForm({ ...form, [key]: value })}
          />
        ))}
      </div>
    </section>
  );
}
