import { DomainError } from '../../errors.ts';
import { unitFromSpelling } from '../unit-spelling.ts';
import { cellsOfLine, isFigure, isStampLike } from './cells.ts';
import { guessed, type LayoutStatement, proved } from './statement.ts';

/** Where the table of readings stands in a file. */
export interface Table {
  readonly delimiter: string;
  readonly header: number;
  readonly units: number | null;
  readonly firstReading: number;
  readonly headings: readonly string[];
  readonly unitCells: readonly string[];
  readonly readings: readonly Reading[];
  readonly statements: readonly LayoutStatement[];
}

/** One row that looks like a reading. */
export interface Reading {
  readonly line: number;
  readonly cells: readonly string[];
}

/** The delimiter is looked for in so many lines. */
const LINES_TRIED = 1000;
const DELIMITERS = [';', '\t', ',', '|', ' '];
const NAMES: Readonly<Record<string, string>> = {
  ';': 'semicolons',
  '\t': 'tabs',
  ',': 'commas',
  '|': 'bars',
  ' ': 'spaces',
};

/**
 * Finds delimiter, headings, units and first reading.
 *
 * @throws {DomainError} `layout-not-provable` when no delimiter makes rows of figures, or nothing stands above them.
 */
export function findTable(lines: readonly string[], file: string): Table {
  const few = lines.slice(0, LINES_TRIED);
  const tries = DELIMITERS.map((delimiter) => ({ delimiter, readings: findReadings(few, delimiter) }))
    .map((one) => ({
      ...one,
      figures: one.readings.reduce((sum, { cells }) => sum + cells.filter(isFigure).length, 0),
    }))
    .filter(({ readings }) => readings.length > 0)
    .sort((a, b) => b.figures - a.figures);
  const [best, second] = tries;
  if (!best) throw notProvable(file, 'its first lines hold no rows of figures with a time');
  const { delimiter } = best;
  const readings = findReadings(lines, delimiter);
  const count = `${readings.length} rows come apart at ${NAMES[delimiter]} into ${readings[0]!.cells.length} cells`;
  const isOnly = !second || second.readings.length * 2 < best.readings.length;
  const { statements, ...headings } = findHeadings(lines, delimiter, readings[0]!, file);
  const statement = isOnly
    ? proved('delimiter', `${count}, and at nothing else.`)
    : guessed('delimiter', `${count}.`, [delimiter, second.delimiter]);
  return { delimiter, readings, ...headings, statements: [statement, ...statements] };
}

/** Rows with the usual number of cells, a time or a first figure, and nothing that is no cell of a log. */
function findReadings(lines: readonly string[], delimiter: string): Reading[] {
  const rows: Reading[] = [];
  const rowsByCount = new Map<number, number>();
  for (const [i, text] of lines.entries()) {
    if (!text.includes(delimiter)) continue;
    const cells = cellsOfLine(text, delimiter);
    if (!isReadingLike(cells)) continue;
    rows.push({ line: i + 1, cells });
    rowsByCount.set(cells.length, (rowsByCount.get(cells.length) ?? 0) + 1);
  }
  const [usual = 0] = [...rowsByCount].sort((a, b) => b[1] - a[1])[0] ?? [];
  return rows.filter(({ cells }) => cells.length === usual);
}

function isReadingLike(cells: readonly string[]): boolean {
  const figures = cells.filter(isFigure).length;
  const stamps = cells.filter(isStampLike).length;
  const texts = cells.filter((cell) => cell !== '' && !isFigure(cell) && !isStampLike(cell));
  if (figures + stamps < 2 || figures === 0) return false;
  if (stamps === 0 && !isFigure(cells[0] ?? '')) return false;
  return texts.every((cell) => !/[;\t|]/.test(cell)) && (stamps > 0 || texts.length <= figures);
}

function findHeadings(lines: readonly string[], delimiter: string, first: Reading, file: string) {
  const above: Reading[] = [];
  for (let line = first.line - 1; line >= 1; line--) {
    const cells = cellsOfLine(lines[line - 1] ?? '', delimiter);
    const isAsWide = cells.length === first.cells.length && isUnitsRow(cells);
    if (isAsWide || cells.filter((cell) => cell !== '').length >= 2) above.push({ line, cells });
  }
  const [nearest, next] = above;
  if (!nearest)
    throw notProvable(file, `nothing stands above its first reading in line ${first.line} that names the columns`);
  const hasUnits = isUnitsRow(nearest.cells) && next !== undefined;
  const header = hasUnits ? next : nearest;
  const statements: LayoutStatement[] = [];
  const isClear = header.cells.length >= first.cells.length - 1 && !header.cells.some(isFigure);
  const because = `Line ${header.line} stands above the readings with ${header.cells.length} cells`;
  statements.push(isClear ? proved('header', `${because}, none of them a figure.`) : guessed('header', `${because}.`));
  if (hasUnits) statements.push(proved('units', `Line ${nearest.line} holds units.`));
  statements.push(proved('firstReading', `Line ${first.line} is the first with a time and figures.`));
  return {
    header: header.line,
    headings: header.cells,
    units: hasUnits ? nearest.line : null,
    unitCells: hasUnits ? nearest.cells : [],
    firstReading: first.line,
    statements,
  };
}

/** Units, times' patterns and signs such as % and rpm: at least one unit known here, and nothing that reads as a name. */
function isUnitsRow(cells: readonly string[]): boolean {
  const filled = cells.filter((cell) => cell !== '');
  const units = filled.filter((cell) => unitFromSpelling(cell) !== null || OTHER_UNITS.test(cell)).length;
  return units > 0 && units * 2 >= filled.length && filled.some((cell) => unitFromSpelling(cell) !== null);
}

const OTHER_UNITS =
  /^[[(]?(?:%(?: ?rh)?|rpm|1\/min|s|sec|min|h|hr|m?v|m?a|k?w|l\/min|m³\/h|-|[dmyhs:/. -]{5,19})[\])]?$/i;

function notProvable(file: string, why: string): DomainError {
  return new DomainError('layout-not-provable', `${file}: ${why}`, { file });
}
