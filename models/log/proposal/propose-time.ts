import { DomainError } from '../../errors.ts';
import { figureFromText } from '../figure.ts';
import type { TimeLayout } from '../layout.ts';
import type { Reading, Table } from './find-table.ts';
import { findStampForm, type StampForm } from './stamp-forms.ts';
import { asked, guessed, type LayoutStatement, proved } from './statement.ts';

export interface ProposedTime {
  readonly time: TimeLayout;
  /** Columns used, counted from 0. */
  readonly columns: readonly number[];
  readonly statements: readonly LayoutStatement[];
}

/**
 * Finds the columns that hold the time, and how it is written. The zone is always asked, unless the stamps carry it.
 *
 * @throws {DomainError} `layout-not-provable` where there is no time, or times of day without a date.
 */
export function proposeTime(
  table: Table,
  decimal: '.' | ',',
  headingOf: (column: number) => string,
  file: string,
): ProposedTime {
  const forms = table.readings[0]!.cells.map((_, column) => formOf(table.readings, column));
  const whole = forms.findIndex((form) => form?.hasDate && form.hasClock);
  if (whole >= 0) return stamped([whole], forms[whole]!.patterns, forms[whole]!, table, headingOf);
  const date = forms.findIndex((form) => form?.hasDate);
  const clock = forms.findIndex((form) => form?.hasClock);
  if (date >= 0 && clock >= 0) {
    const patterns = forms[date]!.patterns.map((pattern) => `${pattern} ${forms[clock]!.patterns[0]}`);
    const form = { ...forms[date]!, hasOffset: forms[clock]!.hasOffset };
    return stamped([date, clock], patterns, form, table, headingOf);
  }
  const number = clock < 0 ? numberedTime(table, decimal, headingOf) : null;
  if (number) return number;
  const why =
    clock >= 0
      ? `column "${headingOf(clock)}" holds times of day, and no column holds the date`
      : 'no column reads as a time: neither dates nor figures that rise';
  throw new DomainError('layout-not-provable', `${file}: ${why}`, { file });
}

function formOf(readings: readonly Reading[], column: number): StampForm | null {
  return findStampForm(readings.map(({ line, cells }) => ({ line, text: cells[column] ?? '' })));
}

function stamped(
  columns: readonly number[],
  patterns: readonly string[],
  form: StampForm,
  table: Table,
  headingOf: (column: number) => string,
): ProposedTime {
  const isProved = patterns.length === 1;
  const first = columns.map((column) => table.readings[0]!.cells[column]).join(' ');
  const open = `Every date, such as ${first}, can be read with the day or with the month first.`;
  const none = 'No order of day, month and year reads all of the dates.';
  const pattern = isProved
    ? proved('time.pattern', form.because)
    : asked('time.pattern', patterns.length > 1 ? open : none, [...patterns]);
  const offset = /(?:Z|[+-]\d{2}(?::?\d{2})?)$/i.exec(first)?.[0] ?? '';
  const zone = form.hasOffset
    ? proved('time.zone', 'Every stamp carries its offset from UTC.')
    : asked('time.zone', 'Nothing in the file says which zone its clock was set to.');
  return {
    time: {
      columns: columns.map(headingOf),
      pattern: isProved ? patterns[0]! : '',
      zone: form.hasOffset ? offset : '',
    },
    columns,
    statements: [proved('time', `${first} is a date and a time.`), pattern, zone],
  };
}

/** Days 2000-01-01 to 2099-12-31 of the 1900 system. */
const SERIAL_DAYS: readonly [number, number] = [36_526, 73_050];
/** Seconds since 1970 of the same years, less those that could be anything. */
const EPOCH_S: readonly [number, number] = [946_684_800, 4_102_444_800];

/** The first column, or one with a telling heading, if its figures never fall, as elapsed time, days of a spreadsheet or seconds since 1970 are. */
function numberedTime(table: Table, decimal: '.' | ',', headingOf: (column: number) => string): ProposedTime | null {
  const rising = table.readings[0]!.cells.map((_, column) => column).filter((column) =>
    doRise(table.readings, column, decimal),
  );
  const named = rising.find((column) => TIME_WORDS.test(headingOf(column)));
  const column = named ?? rising.find((one) => one === 0);
  if (column === undefined) return null;
  const heading = headingOf(column);
  const value = figureFromText(table.readings[0]!.cells[column]!, decimal);
  const columns = [column];
  const because = `The figures of column "${heading}" begin at ${value} and never fall`;
  if (value >= SERIAL_DAYS[0] && value < SERIAL_DAYS[1]) {
    const day = new Date(Date.UTC(1899, 11, 30) + Math.floor(value) * 86_400_000).toISOString().slice(0, 10);
    return {
      time: { columns: [heading], serialDays: true, zone: '' },
      columns,
      statements: [
        guessed('time', `${because}: as days of a spreadsheet that is ${day}.`),
        asked('time.zone', 'Nothing in the file says which zone its clock was set to.'),
      ],
    };
  }
  if (value >= EPOCH_S[0] && value < EPOCH_S[1]) {
    return {
      time: { columns: [heading], elapsed: 's', startsAt: '1970-01-01T00:00:00Z' },
      columns,
      statements: [guessed('time', `${because}: seconds since 1970.`)],
    };
  }
  const unit = elapsedUnit(table.unitCells[column] ?? '') ?? elapsedUnit(heading);
  const startsAt = asked('time.startsAt', 'Elapsed time needs the instant it began at, such as 2026-03-02T08:14:00Z.');
  const isOne = named !== undefined || rising.length === 1;
  return {
    time: { columns: [heading], elapsed: unit ?? 's', startsAt: '' },
    columns,
    statements: [
      isOne
        ? proved('time', `${because}, as elapsed time does.`)
        : guessed('time', `${because}; other columns rise too.`),
      unit
        ? proved('time.elapsed', `The file calls it ${table.unitCells[column] || heading}.`)
        : asked('time.elapsed', 'Nothing in the file says what elapsed time is counted in.', ['s', 'min', 'h']),
      startsAt,
    ],
  };
}

const TIME_WORDS = /time|elapsed|zeit|tempo|temps|tiempo|hora|^t$|sec|min|hour|stunde/i;

function elapsedUnit(text: string): 's' | 'min' | 'h' | null {
  const word = /(?:^|[[(/_ ])(s|sec|secs|seconds?|min|mins|minutes?|h|hr|hrs|hours?)[\])]?\.?$/i
    .exec(text)?.[1]
    ?.toLowerCase();
  return word === undefined ? null : word.startsWith('s') ? 's' : word.startsWith('m') ? 'min' : 'h';
}

function doRise(readings: readonly Reading[], column: number, decimal: '.' | ','): boolean {
  let before = Number.NEGATIVE_INFINITY;
  for (const { cells } of readings) {
    const value = figureFromText(cells[column] ?? '', decimal);
    if (!(value >= before)) return false;
    before = value;
  }
  return figureFromText(readings[0]!.cells[column]!, decimal) < before;
}
