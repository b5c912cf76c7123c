import { CRITERIA, ENDS, type MeasuredKind, ratioWords } from '../words/measured.ts';
import type { MeasuredForm } from '../words/measured-form.ts';
import { numberIn } from '../words/typed.ts';
import { ChoiceField, TextField } from './field.tsx';
import { FigureField } from './figure-field.tsx';

/** What the kind of test asks for. */
export function MeasuredFields({
  kind,
  form,
  onChange,
}: {
  kind: MeasuredKind;
  form: MeasuredForm;
  onChange: (next: Partial<MeasuredForm>) => void;
}) {
  const figure = (key: keyof MeasuredForm, label: string, required = true) => (
    <FigureField label={label} required={required} value={form[key]} onValue={(value) => onChange({ [key]: value })} />
  );
  const text = (key: keyof MeasuredForm, label: string, required = true) => (
    <TextField
      label={label}
      required={required}
      maxLength={120}
      value={form[key]}
      onValue={(value) => onChange({ [key]: value })}
    />
  );
  const choice = (key: 'criterion' | 'end', label: string, words: Readonly<Record<string, string>>) => (
    <ChoiceField
      label={label}
      choices={Object.entries(words).map(([value, said]) => ({ value, text: said }))}
      value={form[key]}
      onValue={(value) => onChange({ [key]: value })}
    />
  );
  const limit = numberIn(form.limit);
  const ultimate = numberIn(form.ultimate);
  return (
    <>
      {kind === 'dsc' && [figure('residual', 'Residual heat, J/g'), figure('total', 'Heat of uncured material, J/g')]}
      {kind === 'dma' && [figure('tg', 'Tg, °C'), choice('criterion', 'Read at', CRITERIA)]}
      {kind === 'ultrasonic' && figure('largest', 'Largest indication, mm; empty for none', false)}
      {kind === 'short-beam' && [figure('strength', 'Strength, MPa'), figure('specimens', 'Specimens', false)]}
      {kind === 'load' && [
        figure('limit', 'Limit load, kN', false),
        figure('ultimate', 'Ultimate load, kN', false),
        figure('reached', 'Load reached, kN'),
        choice('end', 'There it', ENDS),
      ]}
      {kind === 'load' && limit !== null && ultimate !== null && <p class="soft">{ratioWords(limit, ultimate)}</p>}
      {kind === 'strain' && [
        text('firstBy', 'One reading by'),
        figure('first', 'reads, µm/m'),
        text('secondBy', 'The other by'),
        figure('second', 'reads, µm/m'),
        figure('atLoad', 'At load, kN', false),
      ]}
      {kind !== 'other' && text('method', 'Method', false)}
    </>
  );
}
