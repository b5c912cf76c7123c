import { DomainError } from '../../models/errors.ts';
import type { LoadSensor } from '../../models/run/load.ts';
import type { PartRun, PartView } from '../contract/parts.ts';
import { readAudit } from '../store/audit.ts';
import { readCoupons } from '../store/coupons.ts';
import type { Db } from '../store/database.ts';
import { readDecisions } from '../store/decisions.ts';
import { findLatestEvaluation } from '../store/evaluations.ts';
import { findLayup } from '../store/layups.ts';
import { findLoad } from '../store/loads.ts';
import { readNonconformances } from '../store/nonconformances.ts';
import { readPartResults } from '../store/part-results.ts';
import { readPartWorks } from '../store/part-works.ts';
import { readParticulars, readRunsOfPart, requirePart } from '../store/parts.ts';
import { findRunLine } from '../store/run-lines.ts';
import { readSources } from '../store/sources.ts';
import { findToolRecord } from '../store/tools.ts';
import { sharesOf } from './part-shares.ts';

const AUDIT_LINES = 100;

/** A part's whole history: everything that touched it, and everything that shares it. */
export function partView(db: Db, serial: string): PartView {
  const id = requirePart(db, serial);
  const runs = readRunsOfPart(db, id).map((run) => partRun(db, run, serial));
  const latest = runs.findLast(({ evaluation }) => evaluation !== null);
  const particulars = readParticulars(db, id);
  return {
    serial,
    ...particulars,
    quantity: Math.max(1, ...runs.map(({ quantity }) => quantity)),
    verdict: latest?.evaluation?.verdict ?? null,
    runs: runs.map(({ quantity: _quantity, ...run }) => run),
    results: readPartResults(db, id),
    nonconformances: readNonconformances(db, id),
    layup: findLayup(db, id),
    toolRecord: particulars.tool === null ? null : findToolRecord(db, particulars.tool),
    works: readPartWorks(db, id),
    coupons: readCoupons(db, id),
    shares: sharesOf(db, id, serial, runs),
    audit: [
      ...readAudit(db, { subject: `part/${serial}`, limit: AUDIT_LINES }).lines,
      ...runs.flatMap(({ line }) => readAudit(db, { subject: `run/${line.run}`, limit: AUDIT_LINES }).lines),
    ].sort((a, b) => b.n - a.n),
  };
}

function partRun(db: Db, run: number, serial: string): PartRun & { readonly quantity: number } {
  const line = findRunLine(db, run);
  const load = findLoad(db, run);
  const own = load?.document.parts.find(({ part }) => part === serial);
  if (line === undefined || load === null || own === undefined) {
    throw new DomainError('database-damaged', `Part ${serial} is said to be in run ${run} and is not`, {
      part: serial,
    });
  }
  const evaluation = findLatestEvaluation(db, run);
  const sources = readSources(db, run);
  return {
    line,
    quantity: own.quantity ?? 1,
    evaluation: evaluation?.document.parts.find(({ part }) => part === serial) ?? null,
    evaluatedAt: evaluation?.deed.at ?? null,
    sensors: load.document.sensors
      .filter(({ parts }) => parts?.includes(serial))
      .map((sensor) => placed(sensor, serial)),
    bagLine: own.bagLine ?? null,
    startDegree: own.startDegree ?? null,
    leakTest: own.leakTest ?? null,
    workOrder: load.document.workOrder ?? null,
    loadMates: line.parts.filter((mate) => mate !== serial),
    files: sources.flatMap(({ files }) => files),
    cycleSha256: evaluation?.inputs.cycle ?? null,
    decisions: readDecisions(db, run),
  };
}

function placed({ channel, place, parts = [] }: LoadSensor, serial: string): PartRun['sensors'][number] {
  return { channel, place: place ?? null, sharedWith: parts.filter((part) => part !== serial) };
}
