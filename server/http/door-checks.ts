import type * as z from 'zod';
import type { Cycle } from '../../models/cycle/cycle.ts';
import { DomainError } from '../../models/errors.ts';
import { partMaterialStates } from '../../models/material/part-materials.ts';
import type { Load } from '../../models/run/load.ts';
import { parseLoad } from '../../models/run/parse-load.ts';
import { celsiusFrom } from '../../models/units.ts';
import type { DoorCheck, DoorChecks, doorChecksRequest } from '../contract/live.ts';
import { readCycleDocument, requireCycle } from '../store/cycles.ts';
import type { Db } from '../store/database.ts';
import { recordsOfInstruments } from '../store/instrument-records.ts';
import { listLiveSources } from '../store/live-sources.ts';
import { recordsOfParts } from '../store/material-records.ts';
import { requireVessel } from '../store/vessels.ts';
import type { AppParts } from './app-parts.ts';
import { enoughSensors, sensorsAgree, sourcesSending } from './door-sensors.ts';
import { vesselSurveysView } from './instrument-view.ts';

type Asked = z.output<typeof doorChecksRequest>;

/** What is to be seen before the door closes. It is told; nothing is enforced, and nothing here says a vessel is safe. */
export function doorChecks(parts: AppParts, vessel: string, asked: Asked): DoorChecks {
  const { db, engine, clock } = parts;
  const vesselId = requireVessel(db, vessel);
  const nowMs = clock();
  const load = asked.load === null ? null : parseLoad(asked.load);
  const cycle =
    asked.cycle === null ? null : readCycleDocument(db, requireCycle(db, asked.cycle.code, asked.cycle.issue));
  const seen = engine.vessels().vessels.find((one) => one.vessel === vessel);
  const readings = seen?.readings ?? [];
  return {
    checks: [
      sourcesSending(seen?.sources ?? []),
      sensorsAgree(readings),
      ...(cycle === null ? [] : enoughSensors(cycle, load, readings)),
      inCalibration(db, vesselId, nowMs),
      ...surveyed(db, vessel, cycle, nowMs),
      inLife(db, load, nowMs),
      ...(cycle?.leakTest === undefined ? [] : [leakTested(load)]),
    ],
  };
}

function inCalibration(db: Db, vesselId: number, nowMs: number): DoorCheck {
  const check = 'calibration';
  const channels = listLiveSources(db, vesselId)
    .filter(({ settings }) => !settings.isResting)
    .flatMap(({ name, settings }) =>
      settings.document.channels
        .filter(({ role }) => role !== 'other' && role !== 'setpoint')
        .map((channel) => ({ channel: channel.name, recorderId: null, source: name })),
    );
  const records = recordsOfInstruments(db, { vesselId, fromMs: nowMs, untilMs: nowMs }, channels);
  const known = records?.channels ?? [];
  const out = known.filter(({ calibration }) => calibration === null);
  const lapsed = out.filter(({ ranOut }) => ranOut !== null);
  if (lapsed.length > 0) {
    const told = lapsed.map(({ instrument, channel, ranOut }) => `${instrument} at ${channel} was due on ${ranOut}`);
    return { check, outcome: 'not-in-order', because: `${told.join('; ')}.` };
  }
  const bare = [
    ...channels.filter(({ channel }) => !known.some((one) => one.channel === channel)).map(({ channel }) => channel),
    ...out.map(({ channel }) => channel),
  ];
  if (bare.length > 0 || channels.length === 0) {
    const of = channels.length === 0 ? 'this vessel' : bare.join(', ');
    return { check, outcome: 'not-on-record', because: `No calibration is on record of what reads ${of}.` };
  }
  const due = known.map(({ calibration }) => calibration?.until ?? '').sort()[0];
  const all = known.length === 1 ? 'Its one instrument is' : `All ${known.length} instruments are`;
  const until = known.length === 1 ? `until ${due}` : `the first until ${due}`;
  return { check, outcome: 'in-order', because: `${all} in calibration, ${until}.` };
}

function surveyed(db: Db, vessel: string, cycle: Cycle | null, nowMs: number): DoorCheck[] {
  const { survey, accuracy, surveys, ranges } = vesselSurveysView(db, vessel, nowMs);
  const standing = (check: string, what: string, { standing: is, due }: typeof survey): DoorCheck => {
    if (due === null) return { check, outcome: 'not-on-record', because: `No ${what} is on record.` };
    if (is === 'out-of-date') return { check, outcome: 'not-in-order', because: `The ${what} was due on ${due}.` };
    return { check, outcome: 'in-order', because: `The ${what} is good until ${due}.` };
  };
  const latest = surveys.find(({ replacedBy, until }) => replacedBy === null && until === survey.due);
  const zone = standing('survey', 'uniformity survey', survey);
  return [
    latest === undefined || zone.outcome !== 'in-order'
      ? zone
      : { ...zone, because: `${zone.because} Zone: ${latest.zone}.` },
    standing('accuracy-test', 'system accuracy test', accuracy),
    ...(cycle === null || ranges[0] === undefined ? [] : [inRange(cycle, ranges[0])]),
  ];
}

function inRange(
  cycle: Cycle,
  range: { unit: '°C' | '°F'; lowest: number; highest: number; document: string },
): DoorCheck {
  const check = 'qualified-range';
  const unit = cycle.units.temperature;
  const targets = cycle.stages.flatMap((stage) => (stage.kind === 'dwell' ? [stage.target] : []));
  const lowestC = celsiusFrom(range.lowest, range.unit);
  const highestC = celsiusFrom(range.highest, range.unit);
  const outside = targets.filter((target) => {
    const targetC = celsiusFrom(target, unit);
    return targetC < lowestC || targetC > highestC;
  });
  const to = `${range.lowest} to ${range.highest} ${range.unit} (${range.document})`;
  return outside.length === 0
    ? { check, outcome: 'in-order', because: `Every dwell lies in the vessel's range, ${to}.` }
    : {
        check,
        outcome: 'not-in-order',
        because: `${outside.join(', ')} ${unit} lies outside the vessel's range, ${to}.`,
      };
}

function inLife(db: Db, load: Load | null, nowMs: number): DoorCheck {
  const check = 'material-life';
  const serials = load?.parts.map(({ part }) => part) ?? [];
  if (serials.length === 0) return { check, outcome: 'not-on-record', because: 'No part is named yet.' };
  const records = recordsOfParts(db, serials, nowMs, nowMs);
  const bare: string[] = [];
  const states = serials.flatMap((serial) => {
    if (!records?.parts.some(({ part, materials }) => part === serial && materials.length > 0)) {
      bare.push(serial);
      return [];
    }
    try {
      return partMaterialStates(records, serial, nowMs).map((state) => ({ serial, ...state }));
    } catch (error) {
      // A ledger that cannot be true shows nothing of the material; the check says what contradicts what.
      if (!(error instanceof DomainError) || error.code !== 'event-impossible') throw error;
      bare.push(`${serial} (${error.message})`);
      return [];
    }
  });
  const over = states.filter(({ outcome }) => outcome === 'not-met');
  if (over.length > 0) {
    const told = over.map(({ serial, because }) => `${serial}: ${because.replace(/\.$/, '')}`);
    return { check, outcome: 'not-in-order', because: `${told.join('; ')}.` };
  }
  const unknown = states.filter(({ outcome }) => outcome !== 'met').map(({ serial }) => serial);
  if (bare.length + unknown.length > 0) {
    const of = [...new Set([...bare, ...unknown])].join(', ');
    return { check, outcome: 'not-on-record', because: `The life of what they were laid up from is not known: ${of}.` };
  }
  const n = states.length;
  return {
    check,
    outcome: 'in-order',
    because: `${n === 1 ? 'Its material is' : `All ${n} materials are`} in life now.`,
  };
}

function leakTested(load: Load | null): DoorCheck {
  const check = 'leak-test';
  const parts = load?.parts ?? [];
  const bare = parts.filter(({ leakTest }) => leakTest === undefined).map(({ part }) => part);
  if (parts.length === 0) return { check, outcome: 'not-on-record', because: 'No part is named yet.' };
  if (bare.length > 0) {
    return { check, outcome: 'not-on-record', because: `No leak test is on record of the bag of: ${bare.join(', ')}.` };
  }
  return { check, outcome: 'in-order', because: 'A leak test is on record of every bag.' };
}
