import { DomainError } from '../../models/errors.ts';
import type { HoldDocument, KinKind, MakeHoldRequest, Shared } from '../contract/trace.ts';
import { KIN_KINDS } from '../contract/trace.ts';
import { appendAudit } from '../store/audit.ts';
import { countGaps } from '../store/completeness.ts';
import type { Db } from '../store/database.ts';
import { type HeldPartRow, readHeldParts } from '../store/held-parts.ts';
import { insertHoldList } from '../store/hold-lists.ts';
import { readKin, readTraits, type Span } from '../store/kin.ts';
import { requirePart } from '../store/parts.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Lists every part that shares something with failed ones, and keeps the list. It holds nothing by itself: people do. */
export function makeHoldList(parts: ActionParts, request: MakeHoldRequest): number {
  const { db } = parts;
  return db
    .transaction(() => {
      const { document, partIds } = findEndangered(db, request);
      const deed = deedOf(parts);
      const { hold, sha256 } = insertHoldList(db, document, partIds, deed);
      appendAudit(db, {
        ...deed,
        verb: 'make-hold-list',
        subject: `hold/${hold}`,
        why: document.why,
        details: { list: sha256, failed: document.failed.join(', '), parts: partIds.length },
      });
      return hold;
    })
    .immediate();
}

/** The list as it would be kept, and the rows of its parts in the same order. */
export function findEndangered(
  db: Db,
  request: MakeHoldRequest,
): { readonly document: HoldDocument; readonly partIds: readonly number[] } {
  const span = spanOf(request);
  const failed = [...new Set(request.failed)];
  const failedIds = failed.map((serial) => requirePart(db, serial));
  const serialOf = new Map(failedIds.map((id, n) => [id, failed[n] ?? '']));
  const kinds = KIN_KINDS.filter((kind) => request.kinds.includes(kind));
  const shared: Shared[] = [];
  const reasons = new Map<number, Map<number, number[]>>(failedIds.map((id) => [id, new Map()]));
  const lacks = new Map<string, KinKind[]>(failed.map((serial) => [serial, []]));
  for (const kind of kinds) {
    const traits = readTraits(db, kind, failedIds);
    const placeOf = new Map<string, number>();
    for (const { partId, key, what } of traits) {
      const serial = serialOf.get(partId) ?? '';
      const known = shared[placeOf.get(key) ?? -1];
      if (known !== undefined) known.failed.push(serial);
      else placeOf.set(key, shared.push({ kind, what, failed: [serial] }) - 1);
    }
    // Most parts come from no kit: a roll on record is enough.
    const mayLack = kind !== 'kit';
    for (const [id, serial] of serialOf)
      if (mayLack && !traits.some(({ partId }) => partId === id)) lacks.get(serial)?.push(kind);
    for (const { partId, key, run } of readKin(db, kind, [...placeOf.keys()], span)) {
      addReason(reasons, partId, placeOf.get(key) ?? 0, run);
    }
  }
  const rows = readHeldParts(db, [...reasons.keys()]).filter(
    (row) => serialOf.has(row.partId) || mayBeWithin(row, reasons.get(row.partId), span),
  );
  const rank = (row: HeldPartRow) => (serialOf.has(row.partId) ? 1e9 : (reasons.get(row.partId)?.size ?? 0));
  rows.sort((a, b) => rank(b) - rank(a) || (a.serial < b.serial ? -1 : 1));
  return {
    partIds: rows.map(({ partId }) => partId),
    document: {
      format: 'dwellbook-hold-list/1',
      failed,
      kinds,
      from: request.from ?? null,
      until: request.until ?? null,
      why: request.why,
      shared,
      parts: rows.map(({ partId, runsFromMs: _instants, ...row }) => ({
        ...row,
        isStart: serialOf.has(partId),
        because: [...(reasons.get(partId) ?? [])].map(([at, runs]) => ({ shared: at, runs })),
      })),
      completeness: {
        ...countGaps(db, span),
        notFollowed: [...lacks].flatMap(([serial, missing]) =>
          missing.length === 0 ? [] : [{ serial, lacks: missing }],
        ),
      },
    },
  };
}

function spanOf({ from, until }: MakeHoldRequest): Span {
  const fromMs = from == null ? Number.MIN_SAFE_INTEGER : Date.parse(from);
  const untilMs = until == null ? Number.MAX_SAFE_INTEGER : Date.parse(until);
  if (fromMs < untilMs) return { fromMs, untilMs };
  throw new DomainError('invalid-request', 'The dates end before they begin', { from: from ?? '', until: until ?? '' });
}

function addReason(reasons: Map<number, Map<number, number[]>>, partId: number, at: number, run: number | null): void {
  let known = reasons.get(partId);
  if (known === undefined) {
    known = new Map();
    reasons.set(partId, known);
  }
  const runs = known.get(at);
  if (runs === undefined) known.set(at, run === null ? [] : [run]);
  else if (run !== null && !runs.includes(run)) runs.push(run);
}

/** A part that is in no run on record cannot be told to lie outside any dates; one that shares a run lies within. */
function mayBeWithin(
  { runsFromMs }: HeldPartRow,
  reasons: ReadonlyMap<number, readonly number[]> | undefined,
  { fromMs, untilMs }: Span,
): boolean {
  if (runsFromMs.length === 0) return true;
  if ([...(reasons?.values() ?? [])].some((runs) => runs.length > 0)) return true;
  return runsFromMs.some((ms) => ms >= fromMs && ms < untilMs);
}
