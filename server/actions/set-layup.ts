import { DomainError } from '../../models/errors.ts';
import type { Layup, SetLayupRequest } from '../contract/layups.ts';
import { appendAudit } from '../store/audit.ts';
import { canonicalJson, sha256OfDocument } from '../store/canonical.ts';
import type { Db } from '../store/database.ts';
import { findLayup, insertLayup } from '../store/layups.ts';
import { insertParticulars, keepPart, readParticulars } from '../store/parts.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Records how a part was laid up, before its cure or after; a part that has a lay-up already gets another, and why. */
export function setLayup(parts: ActionParts, serial: string, request: SetLayupRequest): void {
  const { db } = parts;
  const deed = deedOf(parts);
  const layup = layupOf(request, deed);
  refuseTimes(layup, parts.clock());
  refuseDebulks(layup);
  db.transaction(() => {
    const partId = keepPart(db, serial);
    if (findLayup(db, partId) !== null && layup.reason === null) {
      throw new DomainError('state-conflict', `Part ${serial} has a lay-up already; say why it is written again`, {
        part: serial,
      });
    }
    keepParticulars(db, partId, serial, request, deed);
    insertLayup(db, partId, layup);
    appendAudit(db, {
      ...deed,
      verb: 'set-layup',
      subject: `part/${serial}`,
      why: layup.reason,
      details: {
        layup: sha256OfDocument(layup),
        tool: layup.tool,
        thicknessMm: layup.thicknessMm,
        plies: layup.plies,
        laminate: layup.laminate?.name ?? null,
      },
    });
  }).immediate();
}

function layupOf(request: SetLayupRequest, deed: Layup['deed']): Layup {
  const { laminate = null } = request;
  return {
    tool: request.tool ?? null,
    workOrder: request.workOrder || null,
    customer: request.customer || null,
    thicknessMm: request.thicknessMm ?? null,
    plies: request.plies ?? null,
    fibreFraction: request.fibreFraction ?? null,
    laminate: laminate === null ? null : { ...laminate, resinDensityKgM3: laminate.resinDensityKgM3 ?? null },
    beganAt: request.beganAt ?? null,
    endedAt: request.endedAt ?? null,
    roomC: request.roomC ?? null,
    humidityPercent: request.humidityPercent ?? null,
    debulks: (request.debulks ?? []).map(({ at = null, minutes = null, vacuum = null, vacuumUnit }) => ({
      at,
      minutes,
      vacuum,
      vacuumUnit: vacuumUnit || null,
    })),
    reason: request.reason ?? null,
    deed,
  };
}

/** What the part is, where the lay-up says more of it or something else than is on record. */
function keepParticulars(db: Db, partId: number, serial: string, request: SetLayupRequest, deed: Layup['deed']): void {
  const now = readParticulars(db, partId);
  const next = {
    title: request.title || now.title,
    drawing: request.drawing || now.drawing,
    drawingIssue: request.drawingIssue || now.drawingIssue,
    tool: request.tool || now.tool,
  };
  if (canonicalJson(next) === canonicalJson({ ...now })) return;
  const said = Object.entries(next).filter(([, value]) => value !== null);
  insertParticulars(db, { part: serial, ...Object.fromEntries(said) }, deed.at, deed.by);
}

function refuseTimes({ beganAt, endedAt, debulks }: Layup, nowMs: number): void {
  const instants = [
    ['beginning of the lay-up', beganAt],
    ['end of the lay-up', endedAt],
    ...debulks.map(({ at }, n) => [`debulk ${n + 1}`, at] as const),
  ] as const;
  for (const [what, at] of instants) {
    if (at === null || Date.parse(at) <= nowMs) continue;
    throw new DomainError('invalid-request', `The ${what} lies in the future`, { at });
  }
  if (beganAt !== null && endedAt !== null && Date.parse(endedAt) < Date.parse(beganAt)) {
    throw new DomainError('invalid-request', 'The lay-up ended before it began', { beganAt, endedAt });
  }
}

function refuseDebulks({ debulks }: Layup): void {
  for (const [n, { vacuum, vacuumUnit }] of debulks.entries()) {
    if ((vacuum === null) === (vacuumUnit === null)) continue;
    throw new DomainError('invalid-request', `The vacuum of debulk ${n + 1} needs a figure and its unit`, {
      debulk: n + 1,
    });
  }
}
