import { compareFailed } from '../../models/trace/compare-failed.ts';
import { factorsOf, type PartFeatures } from '../../models/trace/known-factors.ts';
import type { Compared, CompareQuery } from '../contract/comparison.ts';
import { type Db, readDatabase } from '../store/database.ts';
import { findLatestEvaluation } from '../store/evaluations.ts';
import { isoFromMs } from '../store/instants.ts';
import { findLoad } from '../store/loads.ts';
import { zoneOfWorkshop } from '../store/workshop.ts';
import { type ChosenPart, chooseParts } from './compared-parts.ts';
import { featuresOfCure } from './features-of-cure.ts';
import { featuresOfRecords } from './features-of-records.ts';
import { readRunLog, sourceInputs } from './run-inputs.ts';

/** A question about the workshop's own database, put to a thread. */
export interface CompareAsked {
  /** File of the database. */
  readonly path: string;
  readonly at: string;
  readonly query: CompareQuery;
}

export type CompareParts = (asked: CompareAsked) => Promise<Compared>;

/** What the failed parts of a scope share that the sound ones do not; reads the database for itself. */
export function compareParts({ path, at, query }: CompareAsked): Compared {
  return readDatabase(path, at, (db) => compareIn(db, query));
}

function compareIn(db: Db, query: CompareQuery): Compared {
  const { parts, leftOut } = chooseParts(db, query);
  const features = readFeatures(db, parts);
  const comparison = compareFailed(
    parts.map(({ serial, failed }) => ({ id: serial, failed })),
    factorsOf(parts.map(({ serial }) => features.get(serial) ?? { levels: {}, numbers: {} })),
  );
  return {
    parts: parts.map(({ serial, run, fromMs, failed }) => ({ serial, run, at: isoFromMs(fromMs), failed })),
    untested: parts.filter(({ failed, hasPassed }) => !failed && hasPassed === 0).length,
    leftOut,
    comparison,
  };
}

/** Run by run, so that the readings of one are held at a time. */
function readFeatures(db: Db, parts: readonly ChosenPart[]): Map<string, PartFeatures> {
  const found = new Map<string, PartFeatures>();
  const zone = zoneOfWorkshop(db);
  for (const run of new Set(parts.map((part) => part.run))) {
    const own = parts.filter((part) => part.run === run);
    const load = findLoad(db, run)?.document ?? null;
    const evaluation = findLatestEvaluation(db, run)?.document ?? null;
    const readings = evaluation === null ? null : readRunLog(sourceInputs(db, run)).readings;
    for (const part of own) {
      const judged = evaluation?.parts.find((one) => one.part === part.serial) ?? null;
      const records = featuresOfRecords(db, part, load, judged?.heatOn ?? null, zone);
      const numbers =
        readings === null || judged === null || load === null
          ? {}
          : featuresOfCure({ readings, load, part: judged, sensors: evaluation?.sensors ?? [] });
      found.set(part.serial, { levels: records.levels, numbers: { ...records.numbers, ...numbers } });
    }
  }
  return found;
}
