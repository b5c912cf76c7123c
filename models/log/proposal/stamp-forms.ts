import { monthFromName } from '../month-names.ts';
import { type DateOrder, findDateOrder, type WrittenDate } from './date-order.ts';

/** A stamp's text and where it stands. */
export interface WrittenStamp {
  readonly line: number;
  readonly text: string;
}

/** Patterns that all of a column's texts are written in: several where the order of the date is open. */
export interface StampForm {
  readonly patterns: readonly string[];
  readonly because: string;
  readonly hasDate: boolean;
  readonly hasClock: boolean;
  readonly hasOffset: boolean;
}

const NUMBERS = /^(\d{1,4})([-/.])(\d{1,2})\2(\d{1,4})/;
const DAY_FIRST_NAMED = /^(\d{1,2})([-/. ]+)(\p{L}{3,9})(\.?)([-/. ]+)(\d{4}|\d{2})(?!\d)/u;
const NAME_FIRST = /^(\p{L}{3,9})(\.?) (\d{1,2})(,?) (\d{4})/u;
const COMPACT = /^((?:19|20)\d{2})(\d{2})(\d{2})(?:(\d{2})(\d{2})(\d{2}))?(?!\d)/;
const CLOCK =
  /^(\d{1,2}):(\d{2})(?::(\d{2})(?:([.,])(\d{1,9}))?)?(?:(\s?)([ap]\.?m\.?))?( ?)(Z|[+-]\d{2}(?::?\d{2})?)?$/i;

/** The form of a column of stamps; null where its texts are no stamps, or not all of one form. */
export function findStampForm(stamps: readonly WrittenStamp[]): StampForm | null {
  const taken: Parts[] = [];
  for (const { text } of stamps) {
    const parts = takeApart(text);
    if (!parts) return null;
    taken.push(parts);
  }
  const first = taken[0];
  if (!first) return null;
  const dates = taken.map(({ date }) => date);
  const clocks = taken.map(({ clock }) => clock);
  const clock = first.clock === '' ? '' : clockPattern(clocks);
  if (clock === null || taken.some(({ gap }) => gap.trim() !== first.gap.trim())) return null;
  const gap = first.gap === 'T' ? "'T'" : first.gap.replace(/\s+/, ' ');
  const found = first.date === '' ? { patterns: [''], because: '' } : datePatterns(dates, stamps);
  if (!found || (first.date === '') !== dates.every((date) => date === '')) return null;
  return {
    patterns: found.patterns.map((pattern) => pattern + gap + clock),
    because: found.because,
    hasDate: first.date !== '',
    hasClock: first.clock !== '' || /H/.test(found.patterns[0] ?? ''),
    hasOffset: /X/.test(clock),
  };
}

interface Parts {
  readonly date: string;
  readonly gap: string;
  readonly clock: string;
}

function takeApart(text: string): Parts | null {
  if (CLOCK.test(text)) return { date: '', gap: '', clock: text };
  const date = (NUMBERS.exec(text) ?? DAY_FIRST_NAMED.exec(text) ?? NAME_FIRST.exec(text) ?? COMPACT.exec(text))?.[0];
  if (date === undefined) return null;
  const rest = /^(T|,? +)(.+)$/.exec(text.slice(date.length));
  if (rest) return CLOCK.test(rest[2]!) ? { date, gap: rest[1]!, clock: rest[2]! } : null;
  return date.length === text.length ? { date, gap: '', clock: '' } : null;
}

function clockPattern(clocks: readonly string[]): string | null {
  const found = clocks.map((clock) => CLOCK.exec(clock));
  const [first] = found;
  if (!first || found.some((one) => one === null)) return null;
  const same = (group: number) => found.every((one) => (one![group] === undefined) === (first[group] === undefined));
  if (![3, 4, 7, 9].every(same)) return null;
  const hours = found.every((one) => one![1]!.length === 2) ? 'HH' : 'H';
  const digits = Math.max(...found.map((one) => one![5]?.length ?? 0));
  const half = first[7] === undefined ? '' : `${first[6] === '' ? '' : ' '}a`;
  const offset = first[9] === undefined ? '' : `${first[8]}XXX`;
  const seconds = first[3] === undefined ? '' : `:ss${first[4] ?? ''}${'S'.repeat(digits)}`;
  return `${half === '' ? hours : hours.toLowerCase()}:mm${seconds}${half}${offset}`;
}

function datePatterns(dates: readonly string[], stamps: readonly WrittenStamp[]) {
  const matches = (form: RegExp) => {
    const found = dates.map((date) => form.exec(date));
    return found.every((one) => one !== null) ? (found as RegExpExecArray[]) : null;
  };
  const numbers = matches(NUMBERS);
  if (numbers) return numberedPatterns(numbers, stamps);
  const named = matches(DAY_FIRST_NAMED);
  if (named?.every((one) => monthFromName(one[3]!) > 0)) {
    const [, , gap, , dot, gap2, year] = named[0]!;
    const day = named.every((one) => one[1]!.length === 2) ? 'dd' : 'd';
    return { patterns: [`${day}${gap}MMM${dot}${gap2}${year!.length === 4 ? 'yyyy' : 'yy'}`], because: NAMED };
  }
  const nameFirst = matches(NAME_FIRST);
  if (nameFirst?.every((one) => monthFromName(one[1]!) > 0)) {
    const [, , dot, , comma] = nameFirst[0]!;
    return { patterns: [`MMM${dot} d${comma} yyyy`], because: NAMED };
  }
  const compact = matches(COMPACT);
  if (!compact) return null;
  const because = 'The year comes first, in four figures.';
  return { patterns: [compact[0]![4] === undefined ? 'yyyyMMdd' : 'yyyyMMddHHmmss'], because };
}

const NAMED = 'The month is written as a word.';

function numberedPatterns(found: readonly RegExpExecArray[], stamps: readonly WrittenStamp[]) {
  const written = found.map((one, i): WrittenDate => ({ line: stamps[i]!.line, numbers: [one[1]!, one[3]!, one[4]!] }));
  const { possible, because } = findDateOrder(written);
  const separator = found[0]![2]!;
  const patternOf = (order: DateOrder) =>
    [...order]
      .map((letter, place) => {
        const lengths = written.map(({ numbers }) => numbers[place]!.length);
        return letter.repeat(letter === 'y' ? Math.max(...lengths) : Math.min(2, ...lengths));
      })
      .join(separator);
  return { patterns: possible.map(patternOf), because };
}
