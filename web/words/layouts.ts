import type { Layout } from '../../models/log/layout.ts';
import type { LayoutStatement } from '../../models/log/proposal/statement.ts';

const DELIMITERS: Readonly<Record<string, string>> = {
  ',': 'comma',
  ';': 'semicolon',
  '\t': 'tab',
  ' ': 'space',
  '|': 'bar |',
};

export function delimiterName(delimiter: string): string {
  return DELIMITERS[delimiter] ?? `“${delimiter}”`;
}

/** How a layout reads time: `Date and Time, written dd/MM/yyyy HH:mm:ss, in Europe/Lisbon`. */
export function timeWords(time: Layout['time']): string {
  const columns = time.columns.join(' and ');
  if ('elapsed' in time) return `${columns}, ${time.elapsed} elapsed since ${time.startsAt}`;
  if ('serialDays' in time) return `${columns}, days of a spreadsheet, in ${time.zone}`;
  return `${columns}, written ${time.pattern}, in ${time.zone}`;
}

export const ROLE_WORDS: Readonly<Record<string, string>> = {
  part: 'part',
  tool: 'tool',
  air: 'air',
  setpoint: 'setpoint',
  pressure: 'vessel pressure',
  vacuum: 'vacuum at a bag',
  'vacuum-source': 'vacuum at the source',
  other: 'other, kept but not judged',
};

const PLACES: Readonly<Record<string, string>> = {
  'time.pattern': 'the pattern of the time',
  'time.zone': 'the zone of the recorder’s clock',
  'time.startsAt': 'the instant the log started',
  encoding: 'the encoding',
  delimiter: 'the delimiter',
  decimal: 'the decimal sign',
};

const KEY_WORDS: Readonly<Record<string, string>> = { type: 'thermocouple type', coldJunction: 'cold junction' };

/** What must still be answered before a proposed layout can be used. */
export function openQuestions<S extends LayoutStatement>(
  layout: Layout,
  statements: readonly S[],
  answered: ReadonlySet<string>,
): S[] {
  return statements.filter(({ key, basis }) => {
    const [, n] = /^channels\/(\d+)\/thermocouple\//.exec(key) ?? [];
    const isOfNone = n !== undefined && layout.channels[Number(n)]?.thermocouple === undefined;
    return basis === 'asked' && !answered.has(key) && !isOfNone;
  });
}

/** A place of a layout as a question names it: `the unit of column P`. */
export function placeName(key: string, layout: Layout): string {
  const [, n, what] = /^channels\/(\d+)\/(?:thermocouple\/)?(\w+)$/.exec(key) ?? [];
  if (n !== undefined)
    return `the ${KEY_WORDS[what ?? ''] ?? what} of column ${layout.channels[Number(n)]?.column ?? n}`;
  return PLACES[key] ?? key;
}
