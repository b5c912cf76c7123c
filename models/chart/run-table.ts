import type { Cycle } from '../cycle/cycle.ts';
import type { PartEvaluation } from '../evaluation/evaluation.ts';
import type { LineRole, RunTable, SensorDwell, SensorRow } from './chart.ts';
import type { ClockTime } from './clock-time.ts';
import { type DrawnChannel, extremesOf } from './drawn-channel.ts';
import { type Conversion, converted, drawn } from './shown-unit.ts';
import { hoursAt, type TimeScale } from './time-scale.ts';

interface TableInputs {
  readonly cycle: Cycle | null;
  readonly part: PartEvaluation | null;
  readonly channels: readonly DrawnChannel[];
  readonly units: ReadonlyMap<string, string>;
  /** From °C to the temperatures' unit. */
  readonly tgConversion: Conversion;
  readonly roleOf: (channel: DrawnChannel) => LineRole;
  readonly clock: ClockTime;
  readonly scale: TimeScale;
}

/** The run in rows: its key instants in order, and what each channel did. */
export function runTable(inputs: TableInputs): RunTable {
  return { instants: instantRows(inputs), sensors: inputs.channels.map((channel) => sensorRow(channel, inputs)) };
}

function instantRows({ part, clock, scale }: TableInputs): RunTable['instants'] {
  const rows: { ms: number; what: string }[] = [
    { ms: scale.logFromMs, what: 'log begins' },
    { ms: scale.logUntilMs, what: 'log ends' },
  ];
  const add = (instant: string | null | undefined, what: string) => {
    if (instant) rows.push({ ms: Date.parse(instant), what });
  };
  add(part?.heatOn, 'heat-on');
  for (const { name, kind, opens, openedBy, closes, closedBy, dips } of part?.stages ?? []) {
    if (kind !== 'dwell') continue;
    add(opens, `${name} opens${by(openedBy)}`);
    add(closes, `${name} closes${by(closedBy)}`);
    for (const dip of dips) add(dip.from, `${name}: dip${dip.forgiven ? ', forgiven' : ''}${by(dip.sensor)}`);
  }
  for (const { name, from, until } of part?.windows ?? []) {
    add(from, `${name}: begins`);
    add(until, `${name}: ends`);
  }
  for (const { channel, gelAt, vitrifiesAt } of part?.cure ?? []) {
    add(gelAt, `${channel} gels (estimate)`);
    add(vitrifiesAt, `${channel} vitrifies (estimate)`);
  }
  return rows
    .map((row, i) => ({ ...row, i }))
    .sort((a, b) => a.ms - b.ms || a.i - b.i)
    .map(({ ms, what }) => ({ atH: hoursAt(scale, ms), clock: clock.time(ms), what }));
}

function by(sensor: string | null): string {
  return sensor === null ? '' : `, ${sensor}`;
}

function sensorRow(channel: DrawnChannel, inputs: TableInputs): SensorRow {
  const { part, units, tgConversion, roleOf, clock } = inputs;
  const { name } = channel.layout;
  const all = extremesOf(channel, Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY);
  const estimate = part?.cure.find((one) => one.channel === name);
  return {
    channel: name,
    role: roleOf(channel),
    unit: units.get(channel.strip) ?? '',
    highest: all && { value: drawn(all.highest), clock: clock.time(all.highestMs) },
    lowest: all && { value: drawn(all.lowest), clock: clock.time(all.lowestMs) },
    dwells: part?.judgedBy.includes(name) ? dwellsOf(channel, part, inputs) : [],
    degree: estimate?.degree ?? null,
    tg: estimate?.tgC == null ? null : drawn(converted(estimate.tgC, tgConversion)),
  };
}

function dwellsOf(channel: DrawnChannel, part: PartEvaluation, { clock, scale }: TableInputs): SensorDwell[] {
  return part.stages.flatMap(({ name, kind, sensors }): SensorDwell[] => {
    if (kind !== 'dwell') return [];
    const course = sensors?.find((one) => one.channel === channel.layout.name);
    const enteredMs = course?.entered ? Date.parse(course.entered) : null;
    const leftMs = course?.left ? Date.parse(course.left) : null;
    const inside = enteredMs === null ? null : extremesOf(channel, enteredMs, leftMs ?? scale.logUntilMs);
    return [
      {
        stage: name,
        entered: enteredMs === null ? null : clock.time(enteredMs),
        left: leftMs === null ? null : clock.time(leftMs),
        highest: inside && drawn(inside.highest),
        lowest: inside && drawn(inside.lowest),
      },
    ];
  });
}
