import { DomainError } from '../../models/errors.ts';
import type { AddAccuracyTestRequest, AddSurveyRequest, SetQualifiedRangeRequest } from '../contract/surveys.ts';
import { type AuditEntry, appendAudit } from '../store/audit.ts';
import { dayIn } from '../store/instants.ts';
import {
  insertAccuracyTest,
  insertRange,
  insertSurvey,
  readAccuracyTests,
  readRanges,
  readSurveys,
  requireReplaceable,
} from '../store/vessel-surveys.ts';
import { requireVessel } from '../store/vessels.ts';
import { zoneOfWorkshop } from '../store/workshop.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Records a uniformity survey of a vessel, or what should have been written instead of one. */
export function addSurvey(parts: ActionParts, vessel: string, request: AddSurveyRequest): void {
  const { certificate = null, replaces = null, reason = null, ...survey } = request;
  refuseRange(survey);
  write(
    parts,
    vessel,
    { verb: 'add-survey', why: reason, details: { ...survey, certificate, replaces } },
    (id, deed) => {
      refuseDays(parts, survey);
      refuseUnexplained(replaces, reason, () => readSurveys(parts.db, id));
      insertSurvey(parts.db, id, { ...survey, certificate: certificate || null, replaces, reason, deed });
    },
  );
}

/** Records a system accuracy test of a vessel, or what should have been written instead of one. */
export function addAccuracyTest(parts: ActionParts, vessel: string, request: AddAccuracyTestRequest): void {
  const { channel = null, temperature = null, certificate = null, replaces = null, reason = null, ...plain } = request;
  const test = { ...plain, channel, temperature };
  write(
    parts,
    vessel,
    { verb: 'add-accuracy-test', why: reason, details: { ...test, certificate, replaces } },
    (id, deed) => {
      refuseDays(parts, test);
      refuseUnexplained(replaces, reason, () => readAccuracyTests(parts.db, id));
      insertAccuracyTest(parts.db, id, { ...test, certificate: certificate || null, replaces, reason, deed });
    },
  );
}

/** Says at which temperatures a vessel may be used; said again, with why. */
export function setQualifiedRange(parts: ActionParts, vessel: string, request: SetQualifiedRangeRequest): void {
  const { reason = null, ...range } = request;
  refuseRange(range);
  write(parts, vessel, { verb: 'set-qualified-range', why: reason, details: range }, (id, deed) => {
    if (readRanges(parts.db, id).length > 0 && reason === null) {
      throw new DomainError('state-conflict', `${vessel} has a qualified range; say why it is written again`, {
        vessel,
      });
    }
    insertRange(parts.db, id, { ...range, reason, deed });
  });
}

function write(
  parts: ActionParts,
  vessel: string,
  entry: Pick<AuditEntry, 'verb' | 'why' | 'details'>,
  insert: (vesselId: number, deed: { readonly at: string; readonly by: string }) => void,
): void {
  const { db } = parts;
  db.transaction(() => {
    const deed = deedOf(parts);
    insert(requireVessel(db, vessel), deed);
    appendAudit(db, { ...deed, ...entry, subject: `vessel/${vessel}` });
  }).immediate();
}

function refuseUnexplained(
  replaces: number | null,
  reason: string | null,
  rows: () => Parameters<typeof requireReplaceable>[0],
): void {
  if (replaces === null) return;
  requireReplaceable(rows(), replaces);
  if (reason === null) throw new DomainError('invalid-request', 'Say why the record is corrected', { replaces });
}

function refuseDays(
  { db, clock }: ActionParts,
  { done, until }: { readonly done: string; readonly until: string },
): void {
  const today = dayIn(zoneOfWorkshop(db), clock());
  if (done > today)
    throw new DomainError('event-impossible', `It cannot have been done on ${done}, in the future`, { done });
  if (until < done) {
    throw new DomainError('event-impossible', `What was done on ${done} cannot run out on ${until}`, { done, until });
  }
}

function refuseRange({ lowest, highest }: { readonly lowest: number; readonly highest: number }): void {
  if (lowest <= highest) return;
  throw new DomainError('invalid-request', `The range from ${lowest} to ${highest} is the wrong way round`, {
    lowest,
    highest,
  });
}
