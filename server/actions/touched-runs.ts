import { DomainError } from '../../models/errors.ts';
import type { CalibrationLine } from '../contract/instruments.ts';
import { readCalibrationsNow, requireCalibration } from '../store/calibrations.ts';
import type { Db } from '../store/database.ts';
import { dayIn } from '../store/instants.ts';
import { readRunsNear } from '../store/instrument-runs.ts';
import { requireInstrument } from '../store/instruments.ts';
import { zoneOfWorkshop } from '../store/workshop.ts';
import { instrumentsOfRun } from './run-inputs.ts';

/** A run that an instrument read, and the channels it read. */
export interface TouchedRun {
  readonly run: number;
  readonly channels: readonly string[];
}

export interface FoundOut {
  readonly calibration: CalibrationLine;
  /** The day the calibration before held from; null where there is none. */
  readonly since: string | null;
  readonly until: string;
  readonly runs: readonly TouchedRun[];
}

/**
 * The runs a calibration that found its instrument out of tolerance casts doubt on: those that began from the day the
 * calibration before held until the day of this one, both included, since nobody knows when between them it went out.
 */
export function runsFoundOut(db: Db, code: string, calibrationId: number): FoundOut {
  const { id } = requireInstrument(db, code);
  const calibration = requireCalibration(db, id, calibrationId);
  if (calibration.asFound?.outOfTolerance !== true) {
    throw new DomainError('state-conflict', `Calibration ${calibrationId} did not find ${code} out of tolerance`, {
      instrument: code,
      calibration: calibrationId,
    });
  }
  const earlier = readCalibrationsNow(db, id).filter(
    (one) => one.done < calibration.done || (one.done === calibration.done && one.id < calibration.id),
  );
  const since = earlier[0]?.from ?? null;
  const zone = zoneOfWorkshop(db);
  const runs = runsReadBy(db, code, (beganMs) => {
    const day = dayIn(zone, beganMs);
    return (since === null || day >= since) && day <= calibration.done;
  });
  return { calibration, since, until: calibration.done, runs };
}

/** Runs an instrument read some channel of, in order of time. */
export function runsReadBy(
  db: Db,
  code: string,
  isAsked: (beganMs: number) => boolean,
  span = { fromMs: -8.64e15, untilMs: 8.64e15 },
): TouchedRun[] {
  const { id } = requireInstrument(db, code);
  return readRunsNear(db, id, span).flatMap(({ run, beganMs }) => {
    if (!isAsked(beganMs)) return [];
    const channels = (instrumentsOfRun(db, run)?.channels ?? [])
      .filter(({ instrument, replacedBy }) => instrument === code || replacedBy === code)
      .map(({ channel }) => channel);
    return channels.length === 0 ? [] : [{ run, channels }];
  });
}
