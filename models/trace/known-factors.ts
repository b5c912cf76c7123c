import type { Factor } from './factor.ts';

/** What is on record of one part and its cure; what is absent is not on record. */
export interface PartFeatures {
  /** By the names of {@link LEVELS}; several where it has several of a kind. */
  readonly levels: Readonly<Record<string, string | readonly string[]>>;
  /** By the names of {@link NUMBERS}, or `time in <dwell>`. */
  readonly numbers: Readonly<Record<string, number>>;
}

/** Things parts have, with the predicate before what they have. */
export const LEVELS = {
  run: 'were cured in run',
  'cycle issue': 'were cured by',
  vessel: 'were cured in',
  'place of its thermocouples': 'had thermocouples at',
  'bag line': 'were cured on bag line',
  thermocouple: 'had thermocouple',
  'set by': 'were in loads set by',
  tool: 'were laid up on tool',
  roll: 'came from roll',
  batch: 'came from batch',
  kit: 'came from kit',
  'drawing issue': 'were made to drawing issue',
  weekday: 'were cured on a',
} as const;
export type LevelName = keyof typeof LEVELS;

interface NumberWords {
  readonly unit: string;
  readonly lower: string;
  readonly higher: string;
}

/** Figures of parts and their cures, with what less and more of them is called. */
export const NUMBERS = {
  'heating rate': { unit: 'K/min', lower: 'heated slower', higher: 'heated faster' },
  'lag spread': { unit: 'K', lower: 'heated more evenly', higher: 'heated less evenly' },
  'entry difference': {
    unit: 'min',
    lower: 'had sensors enter the dwell closer together',
    higher: 'had sensors enter the dwell further apart',
  },
  'peak temperature': { unit: '°C', lower: 'peaked lower', higher: 'peaked higher' },
  'vacuum at heat-on': { unit: 'bar', lower: 'had less vacuum at heat-on', higher: 'had more vacuum at heat-on' },
  'vacuum before gel': {
    unit: 'bar',
    lower: 'had less vacuum before gel or venting',
    higher: 'had more vacuum before gel or venting',
  },
  'pressure at gel': { unit: 'bar', lower: 'had less pressure at gel', higher: 'had more pressure at gel' },
  'leak test loss': { unit: '', lower: 'lost less in the leak test', higher: 'lost more in the leak test' },
  'age of roll at heat-on': { unit: 'days', lower: 'came from fresher material', higher: 'came from older material' },
  'start degree': { unit: '', lower: 'began less cured', higher: 'began further cured' },
  'room humidity': { unit: '% RH', lower: 'were laid up in drier air', higher: 'were laid up in damper air' },
  'room temperature': { unit: '°C', lower: 'were laid up cooler', higher: 'were laid up warmer' },
  'estimated degree of cure': { unit: '', lower: 'cured less far', higher: 'cured further' },
  'estimated Tg': { unit: '°C', lower: 'have the lower estimated Tg', higher: 'have the higher estimated Tg' },
  thickness: { unit: 'mm', lower: 'are thinner', higher: 'are thicker' },
  'hour of heat-on': { unit: 'h', lower: 'were heated earlier in the day', higher: 'were heated later in the day' },
  'days since calibration': {
    unit: 'days',
    lower: 'were read by fresher calibrations',
    higher: 'were read by older calibrations',
  },
} as const satisfies Record<string, NumberWords>;
export type NumberName = keyof typeof NUMBERS;

/** A figure of a dwell, whatever the cycle calls it. */
export function timeInDwell(dwell: string): string {
  return `time in ${dwell}`;
}

/** One factor for everything that any of the parts has on record, in the order of the tables above. */
export function factorsOf(parts: readonly PartFeatures[]): Factor[] {
  const levels = Object.entries(LEVELS).flatMap(([name, says]): Factor[] =>
    parts.some((part) => part.levels[name] !== undefined)
      ? [{ kind: 'level', name, says, values: parts.map((part) => part.levels[name] ?? null) }]
      : [],
  );
  const known: Readonly<Record<string, NumberWords>> = NUMBERS;
  const dwells = new Set(
    parts.flatMap((part) => Object.keys(part.numbers).filter((name) => known[name] === undefined)),
  );
  const numbers = [...Object.keys(NUMBERS), ...[...dwells].sort()].flatMap((name): Factor[] => {
    if (!parts.some((part) => part.numbers[name] !== undefined)) return [];
    const { unit, lower, higher } = known[name] ?? {
      unit: 'min',
      lower: `had less ${name}`,
      higher: `had more ${name}`,
    };
    return [
      { kind: 'number', name, unit, says: { lower, higher }, values: parts.map((part) => part.numbers[name] ?? null) },
    ];
  });
  return [...levels, ...numbers];
}
