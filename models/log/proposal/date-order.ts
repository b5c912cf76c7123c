/** Order in which a date's three numbers stand. */
export type DateOrder = 'dMy' | 'Mdy' | 'yMd';

/** A date as it is written, in its three numbers, and where. */
export interface WrittenDate {
  readonly line: number;
  readonly numbers: readonly [string, string, string];
}

export interface DateOrders {
  /** What is possible; one where it is proved. */
  readonly possible: readonly DateOrder[];
  /** What proved it; empty where nothing did. */
  readonly because: string;
}

const DAY_MS = 86_400_000;

/**
 * The orders that a log's dates can be read in.
 *
 * A number over 12 is no month, one of four figures is the year; and where a date changes from one scan to the next, a
 * night has passed: an order that makes a month of it is not the recorder's.
 */
export function findDateOrder(dates: readonly WrittenDate[]): DateOrders {
  const first = dates[0]!;
  if (first.numbers[0].length === 4) return { possible: ['yMd'], because: 'The year comes first, in four figures.' };
  let possible: DateOrder[] = first.numbers[2].length === 4 ? ['dMy', 'Mdy'] : ['dMy', 'Mdy', 'yMd'];
  let because = '';
  for (const [i, date] of dates.entries()) {
    const before = dates[i - 1];
    if (before && isSame(before, date)) continue;
    const valid = possible.filter((order) => dayOf(date, order) !== null);
    if (valid.length < possible.length) {
      because = `${date.numbers.join(' ')} in line ${date.line} is no date in another order.`;
      possible = valid;
    }
    const nights = before ? possible.filter((order) => nightsBetween(before, date, order) === 1) : [];
    if (before && nights.length > 0 && nights.length < possible.length) {
      const others = possible.filter((order) => Math.abs(nightsBetween(before, date, order)) >= 20);
      if (others.length + nights.length === possible.length) {
        because = `From line ${before.line} to line ${date.line} one night passes in this order, and more in another.`;
        possible = nights;
      }
    }
  }
  return { possible, because: possible.length === 1 ? because : '' };
}

function isSame(a: WrittenDate, b: WrittenDate): boolean {
  return a.numbers.every((number, i) => number === b.numbers[i]);
}

/** Days since 1970-01-01; null where the numbers are no date in this order. */
function dayOf({ numbers }: WrittenDate, order: DateOrder): number | null {
  const [day, month, year] = ['d', 'M', 'y'].map((letter) => Number(numbers[order.indexOf(letter)])) as [
    number,
    number,
    number,
  ];
  const fullYear = year < 69 ? 2000 + year : year < 100 ? 1900 + year : year;
  const date = new Date(Date.UTC(fullYear, month - 1, day));
  return month >= 1 && month <= 12 && date.getUTCDate() === day && day >= 1 ? date.getTime() / DAY_MS : null;
}

function nightsBetween(before: WrittenDate, date: WrittenDate, order: DateOrder): number {
  return (dayOf(date, order) ?? Number.NaN) - (dayOf(before, order) ?? Number.NaN);
}
