import { figureFromText } from '../figure.ts';
import type { ChannelLayout, ChannelRole, Thermocouple } from '../layout.ts';
import { unitFromSpelling } from '../unit-spelling.ts';
import { askThermocouples, COLD_JUNCTION_WORDS } from './ask-thermocouples.ts';
import type { Table } from './find-table.ts';
import { guessed, type LayoutStatement } from './statement.ts';

export interface ProposedChannels {
  readonly channels: readonly ChannelLayout[];
  readonly missing: readonly string[];
  readonly statements: readonly LayoutStatement[];
}

/** A column with more different words than this in it is text, not readings with missing codes. */
const MOST_CODES = 6;

/** Every column of figures that is no time, with its role, name and unit as far as headings, units and figures tell. */
export function proposeChannels(
  table: Table,
  decimal: '.' | ',',
  timeColumns: readonly number[],
  headingOf: (column: number) => string,
): ProposedChannels {
  const channels: ChannelLayout[] = [];
  const statements: LayoutStatement[] = [];
  const codes = new Map<string, string>();
  for (const column of table.headings.keys()) {
    if (timeColumns.includes(column)) continue;
    const content = contentOf(table, column, decimal);
    if (!content) continue;
    for (const [code, where] of content.codes) if (!codes.has(code)) codes.set(code, where);
    const key = `channels/${channels.length}`;
    const heading = headingOf(column);
    const unit = findUnit(table, column, content.first);
    const role = guessRole(heading, quantityOf(heading, unit.value), unit.value);
    const name = uniqueName(nameOf(heading), channels);
    channels.push({
      column: heading,
      name,
      role: role.value,
      unit: unit.value,
      ...(unit.scale === undefined ? {} : { scale: unit.scale }),
      ...(unit.offset === undefined ? {} : { offset: unit.offset }),
      ...(unit.value === 'mV' && role.value !== 'other' ? { thermocouple: UNKNOWN_THERMOCOUPLE } : {}),
    });
    statements.push(guessed(`${key}/role`, role.because));
    if (role.value !== 'other' || unit.basis === 'proved') {
      const { basis, because, choices } = unit;
      statements.push({ key: `${key}/unit`, basis, because, choices });
    }
  }
  statements.push(...askThermocouples(channels));
  if (codes.size > 0) {
    const words = [...codes].map(([code, where]) => `${code} (${where})`).join(', ');
    statements.push(guessed('missing', `These cells hold no figure: ${words}.`));
  }
  return { channels: channels.map(withUnit), missing: [...codes.keys()], statements };
}

/** Empty text where two statements ask. */
const UNKNOWN_THERMOCOUPLE = { type: '', coldJunction: '' } as unknown as Thermocouple;

/** A channel that nothing is known of needs some unit; `-` is what recorders write. */
function withUnit(channel: ChannelLayout): ChannelLayout {
  return channel.role === 'other' && channel.unit === '' ? { ...channel, unit: '-' } : channel;
}

interface Content {
  readonly first: number;
  /** Words that stand among the figures, each with where it first stands. */
  readonly codes: ReadonlyMap<string, string>;
}

/** What a column holds; null where it is no column of figures. */
function contentOf(table: Table, column: number, decimal: '.' | ','): Content | null {
  const codes = new Map<string, string>();
  let first = Number.NaN;
  let figures = 0;
  for (const { line, cells } of table.readings) {
    const cell = cells[column] ?? '';
    if (cell === '') continue;
    const figure = figureFromText(cell, decimal);
    if (Number.isNaN(figure)) {
      // A word among figures is a code; a cell with digits is a figure spoilt, which a person has to see.
      if (!/\d/.test(cell) && !codes.has(cell)) codes.set(cell, `line ${line}`);
      if (codes.size > MOST_CODES) return null;
    } else if (figures++ === 0) first = figure;
  }
  return figures > 0 ? { first, codes } : null;
}

interface FoundUnit extends Omit<LayoutStatement, 'key'> {
  readonly value: string;
  readonly scale?: number;
  readonly offset?: number;
}

function findUnit(table: Table, column: number, first: number): FoundUnit {
  const heading = table.headings[column]!;
  const cell = table.unitCells[column] ?? '';
  const inCell = unitFromSpelling(cell);
  const bracketed = /[[({]([^\])}]+)[\])}]\s*$/.exec(heading)?.[1] ?? '';
  const inHeading = unitFromSpelling(bracketed || (/(?:°|º|deg ?)[CF]$/i.exec(heading)?.[0] ?? ''));
  const said = inCell ?? inHeading;
  if (said?.unit === 'K') {
    const because = `${inCell ? `Line ${table.units}` : 'Its heading'} says K; 273.15 is taken off.`;
    return { value: '°C', offset: -273.15, basis: 'proved', because, choices: [] };
  }
  if (said?.unit === 'µV') {
    const because = `${inCell ? `Line ${table.units}` : 'Its heading'} says µV; a thousandth of it is taken.`;
    return { value: 'mV', scale: 0.001, basis: 'proved', because, choices: [] };
  }
  if (said) {
    const value = said.reference === 'absolute' ? `${said.unit} abs` : said.unit;
    const because = inCell ? `Line ${table.units} says ${cell}.` : `Its heading says ${bracketed || heading}.`;
    return { value, basis: 'proved', because, choices: [] };
  }
  if (cell !== '' || bracketed !== '') {
    const value = cell || bracketed;
    return { value, basis: 'asked', because: `${value} is no unit known here.`, choices: [] };
  }
  if (quantityOf(heading, '') === 'temperature') return thermalUnit(first);
  return { value: '', basis: 'asked', because: NO_UNIT, choices: PRESSURE_UNITS };
}

const NO_UNIT = 'The file does not say in which unit it is.';
const PRESSURE_UNITS = [
  'bar',
  'mbar',
  'kPa',
  'psi',
  'inHg',
  'mmHg',
  'bar abs',
  'mbar abs',
  'kPa abs',
  'psi abs',
  'torr abs',
];

/** What a column measures, by its unit or, where the file gives none, by its heading. */
function quantityOf(heading: string, unit: string): 'temperature' | 'pressure' | null {
  const byUnit = unitFromSpelling(unit)?.quantity;
  // Emf is a thermocouple's, unless its heading speaks of pressure: that of a transducer says nothing by itself.
  if (byUnit === 'emf') return PRESSURE_WORDS.test(heading) || VACUUM_WORDS.test(heading) ? null : 'temperature';
  if (byUnit || unit !== '') return byUnit ?? null;
  if (PRESSURE_WORDS.test(heading) || VACUUM_WORDS.test(heading)) return 'pressure';
  return THERMAL_WORDS.test(heading) ? 'temperature' : null;
}

const PRESSURE_WORDS = /press|druck|pression|presi[oó]n|\bp[ _.-]?\d*$|^p[ _.-]/i;
const VACUUM_WORDS = /vac|vak|vide|vuoto|v[aá]cuo|vazio|bag|^v[ _.-]?\d+\b/i;
const THERMAL_WORDS =
  /^(?:t|tc|te|temp|ch|channel|kanal|pt)[ ._-]?\d+|temp|thermo|°|air|tool|part|oven|autoclave|luft|mould|mold/i;

/** A run begins near the workshop's temperature: 10 to 35 °C, or 50 to 95 °F. */
function thermalUnit(first: number): FoundUnit {
  const unit = first >= 10 && first <= 35 ? '°C' : first >= 50 && first <= 95 ? '°F' : null;
  if (!unit) return { value: '', basis: 'asked', because: NO_UNIT, choices: ['°C', '°F'] };
  const because = `${NO_UNIT.slice(0, -1)}; ${first} at the start is a workshop's temperature in ${unit}.`;
  return { value: unit, basis: 'guessed', because, choices: ['°C', '°F'] };
}

const THERMAL_ROLES: readonly (readonly [RegExp, ChannelRole, string])[] = [
  [COLD_JUNCTION_WORDS, 'other', 'a cold junction'],
  [/set ?-?point|\bsp\b|\bsv\b|soll|consign|program|sollwert|target/i, 'setpoint', 'a set point'],
  [/air|luft|gas|ambient|chamber|oven|autoclave|forno|ofen|four|\bar\b|ambiente|atmos/i, 'air', 'the air'],
  [/tool|mould|mold|werkzeug|form\b|molde|stampo|moule|caul/i, 'tool', 'the tool'],
];

function guessRole(
  heading: string,
  quantity: 'temperature' | 'pressure' | null,
  unit: string,
): { value: ChannelRole; because: string } {
  if (quantity === 'temperature') {
    for (const [words, role, what] of THERMAL_ROLES) {
      if (words.test(heading)) return { value: role, because: `"${heading}" reads as ${what}.` };
    }
    return { value: 'part', because: `"${heading}" is a temperature that is not called otherwise.` };
  }
  if (quantity === 'pressure') {
    const isVacuum = VACUUM_WORDS.test(heading) || /^(?:inHg|mmHg|torr)/.test(unit);
    if (isVacuum && /pump|source|supply|main|header|bomba|pumpe/i.test(heading)) {
      return { value: 'vacuum-source', because: `"${heading}" reads as the vacuum supply.` };
    }
    if (isVacuum) return { value: 'vacuum', because: `"${heading}" reads as the vacuum at a bag.` };
    return { value: 'pressure', because: `"${heading}" is a pressure that is not called otherwise.` };
  }
  return { value: 'other', because: 'It is neither a temperature nor a pressure, so far as the file says.' };
}

function nameOf(heading: string): string {
  return heading.replace(/\s*[[({][^\])}]*[\])}]\s*$/, '').trim() || heading;
}

function uniqueName(name: string, channels: readonly ChannelLayout[]): string {
  let unique = name;
  for (let n = 2; channels.some((channel) => channel.name === unique); n++) unique = `${name} ${n}`;
  return unique;
}
