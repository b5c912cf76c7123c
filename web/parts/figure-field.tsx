import { FIGURE_PATTERN } from '../words/typed.ts';
import { TextField } from './field.tsx';

/** A line that takes one figure, with a point or a comma. */
export function FigureField(props: {
  label: string;
  hint?: string;
  required?: boolean;
  value: string;
  onValue: (value: string) => void;
}) {
  return <TextField {...props} inputMode="decimal" pattern={FIGURE_PATTERN} title="A figure, such as 0.85" />;
}
