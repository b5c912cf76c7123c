import type { Layout } from './layout.ts';
import { findTable } from './proposal/find-table.ts';
import { proposeChannels } from './proposal/propose-channels.ts';
import { proposeDecimal } from './proposal/propose-decimal.ts';
import { proposeTime } from './proposal/propose-time.ts';
import { type FileHead, readHead } from './proposal/read-head.ts';
import type { LayoutStatement } from './proposal/statement.ts';

/** A layout for an unknown file, as far as the file itself tells. */
export interface LayoutProposal {
  /** Empty text stands wherever a statement asks. */
  readonly layout: Layout;
  readonly statements: readonly LayoutStatement[];
}

/**
 * Proposes how an unknown file is to be read: what the file proves, what is guessed, and what a person must say.
 *
 * @param file  Its name and its beginning, the longer the better: only a later day may prove the order of a date.
 * @throws {DomainError} `log-empty`, `log-not-text`, or `layout-not-provable` where the file holds no table of readings
 *   with a time.
 */
export function proposeLayout(file: FileHead): LayoutProposal {
  const { encoding, lines, statement } = readHead(file);
  const table = findTable(lines, file.name);
  const headingOf = headingsOf(table.headings);
  const { decimal, statement: decimalStatement } = proposeDecimal(table.readings);
  const time = proposeTime(table, decimal, headingOf, file.name);
  const channels = proposeChannels(table, decimal, time.columns, headingOf);
  return {
    layout: {
      format: 'dwellbook-layout/1',
      name: file.name,
      encoding,
      delimiter: table.delimiter,
      decimal,
      header: table.header,
      ...(table.units === null ? {} : { units: table.units }),
      firstReading: table.firstReading,
      time: time.time,
      channels: channels.channels,
      missing: channels.missing,
    },
    statements: [statement, ...table.statements, decimalStatement, ...time.statements, ...channels.statements],
  };
}

/** A column by its heading, or by its number where the heading is empty or stands twice. */
function headingsOf(headings: readonly string[]): (column: number) => string {
  return (column) => {
    const heading = headings[column] ?? '';
    const isOne = heading !== '' && headings.indexOf(heading) === headings.lastIndexOf(heading);
    return isOne ? heading : `#${column + 1}`;
  };
}
