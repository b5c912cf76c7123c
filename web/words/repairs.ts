import type { PassedOver, Repair } from '../../models/log/readings.ts';
import { raised } from './figures.ts';

/** A repair of the time column, with the lines it touched. */
export function repairWords(repair: Pick<Repair, 'because' | 'lines'>): string {
  return `${raised(repair.because)} (${linesWords(repair.lines)})`;
}

/** `Passed over: 2 blank lines (5, 9), a repeated header (41).` */
export function passedOverWords(passedOver: readonly PassedOver[]): string {
  const kinds = [...new Set(passedOver.map(({ kind }) => kind))];
  const said = kinds.map((kind) => {
    const lines = passedOver.filter((one) => one.kind === kind).map((one) => linesWords(one.lines));
    return `${KINDS[kind]}: ${lines.join(', ')}`;
  });
  return `Passed over, because no reading stands there. ${said.map(raised).join('; ')}.`;
}

export function linesWords([first, last]: readonly [number, number]): string {
  return first === last ? `line ${first}` : `lines ${first} to ${last}`;
}

const KINDS: Readonly<Record<PassedOver['kind'], string>> = {
  blank: 'blank',
  'repeated-header': 'headings again',
  'truncated-last-line': 'a last line cut short',
  'after-last-reading': 'after the last reading',
};
