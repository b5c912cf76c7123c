import { DomainError } from '../../models/errors.ts';
import { partMaterialStates } from '../../models/material/part-materials.ts';
import type { Load } from '../../models/run/load.ts';
import type { LevelName, NumberName, PartFeatures } from '../../models/trace/known-factors.ts';
import { type ComparablePart, readItemsOfPart } from '../store/comparable-parts.ts';
import type { Db } from '../store/database.ts';
import { findLayup } from '../store/layups.ts';
import { recordsOfParts } from '../store/material-records.ts';

const MINUTES_A_DAY = 1440;

/** What is on record of a part beside its readings, by the names of the known factors. */
export function featuresOfRecords(
  db: Db,
  part: ComparablePart,
  load: Load | null,
  heatOn: string | null,
  zone: string,
): PartFeatures {
  const levels: Partial<Record<LevelName, string | string[]>> = { run: String(part.run), 'set by': part.setBy };
  const numbers: Partial<Record<NumberName, number>> = {};
  const level = (name: LevelName, value: string | null | undefined) => {
    if (value) levels[name] = value;
  };
  const number = (name: NumberName, value: number | null | undefined) => {
    if (value !== null && value !== undefined && Number.isFinite(value)) numbers[name] = value;
  };
  const several = (name: LevelName, values: readonly string[]) => {
    if (values.length > 0) levels[name] = [...new Set(values)];
  };
  level('cycle issue', part.cycle);
  level('vessel', part.vessel);
  level('tool', part.tool);
  level('drawing issue', part.drawingIssue);
  const inVessel = (name: string) => (part.vessel === null ? name : `${name} of ${part.vessel}`);
  const own = load?.parts.find((one) => one.part === part.serial);
  const sensors = load?.sensors.filter(({ parts = [] }) => parts.includes(part.serial)) ?? [];
  level('bag line', own?.bagLine && inVessel(own.bagLine));
  several(
    'thermocouple',
    sensors.map(({ channel }) => inVessel(channel)),
  );
  several(
    'place of its thermocouples',
    sensors.flatMap(({ place }) => place ?? []),
  );
  number('start degree', own?.startDegree);
  if (own?.leakTest) number('leak test loss', own.leakTest.start - own.leakTest.end);
  const items = readItemsOfPart(db, part.partId);
  for (const kind of ['roll', 'kit', 'batch'] as const) {
    several(
      kind,
      items.filter((item) => item.kind === kind).map(({ code }) => code),
    );
  }
  const layup = findLayup(db, part.partId);
  number('room humidity', layup?.humidityPercent ?? own?.humidity);
  number('room temperature', layup?.roomC);
  number('thickness', layup?.thicknessMm);
  const beginsMs = heatOn === null ? part.fromMs : Date.parse(heatOn);
  number('age of roll at heat-on', ageDays(db, part, beginsMs));
  const clock = Object.fromEntries(
    clockIn(zone)
      .formatToParts(beginsMs)
      .map(({ type, value }) => [type, value]),
  );
  level('weekday', clock.weekday);
  number('hour of heat-on', Number(clock.hour) + Number(clock.minute) / 60);
  return { levels, numbers };
}

/** Out-life that the oldest of a part's materials had used at an instant; null where that is not on record. */
function ageDays(db: Db, { serial, fromMs }: ComparablePart, atMs: number): number | null {
  try {
    const records = recordsOfParts(db, [serial], atMs, fromMs);
    if (records === null) return null;
    const lives = partMaterialStates(records, serial, atMs).flatMap(({ lives }) =>
      lives.filter(({ name }) => name === 'out-life'),
    );
    if (lives.length === 0 || lives.some(({ usedAtMost }) => usedAtMost === null)) return null;
    return Math.max(...lives.map(({ usedAtMost }) => usedAtMost ?? 0)) / MINUTES_A_DAY;
  } catch (error) {
    // A ledger that cannot be true tells no age; its own page says what is wrong with it.
    if (error instanceof DomainError && error.code === 'event-impossible') return null;
    throw error;
  }
}

const known = new Map<string, Intl.DateTimeFormat>();

function clockIn(timeZone: string): Intl.DateTimeFormat {
  let format = known.get(timeZone);
  if (format === undefined) {
    format = new Intl.DateTimeFormat('en-GB', {
      timeZone,
      weekday: 'long',
      hour: '2-digit',
      minute: '2-digit',
      hourCycle: 'h23',
    });
    known.set(timeZone, format);
  }
  return format;
}
