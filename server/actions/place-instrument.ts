import { DomainError } from '../../models/errors.ts';
import type { PlaceInstrumentRequest, TakeOffRequest } from '../contract/instruments.ts';
import { appendAudit } from '../store/audit.ts';
import {
  holdsNow,
  insertPlace,
  type PlaceRow,
  readPlaces,
  readPlacesOn,
  requireHolder,
} from '../store/instrument-places.ts';
import { requireInstrument } from '../store/instruments.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Records that an instrument sits on a channel; the one that sat there until then is taken off. */
export function placeInstrument(parts: ActionParts, code: string, request: PlaceInstrumentRequest): void {
  const { db, clock } = parts;
  const { on, channel, from, until = null, replaces = null, reason = null } = request;
  const fromMs = Date.parse(from);
  const untilMs = until === null ? null : Date.parse(until);
  refuseInstants(clock(), fromMs, untilMs, { from, until });
  db.transaction(() => {
    const instrument = requireInstrument(db, code);
    const deed = deedOf(parts);
    const holder = { kind: on.kind, id: requireHolder(db, on) };
    if (replaces !== null) {
      requirePlace(db, instrument.id, replaces);
      if (reason === null) throw new DomainError('invalid-request', 'Say why the place is corrected', { replaces });
    }
    for (const other of readPlacesOn(db, holder, { fromMs, untilMs, channel })) {
      if (other.id === replaces) continue;
      // Only one that still sat there when this one came is taken off by it.
      if (other.untilMs !== null || other.fromMs >= fromMs) refuseOccupied(other, on.name);
      const why = `${code} took its place`;
      insertPlace(db, { ...againOf(other), untilMs: fromMs, isVoid: false, reason: why, ...deed });
    }
    const place = { instrumentId: instrument.id, on: holder, channel, fromMs, untilMs, isVoid: false };
    insertPlace(db, { ...place, replaces, reason, ...deed });
    appendAudit(db, {
      ...deed,
      verb: 'place-instrument',
      subject: `instrument/${code}`,
      why: reason,
      details: { on: `${on.kind}/${on.name}`, channel, from, until, replaces },
    });
  }).immediate();
}

/** Records that an instrument no longer sits on a channel; or, without an instant, that it never did. */
export function takeOff(parts: ActionParts, code: string, id: number, { at, reason }: TakeOffRequest): void {
  const { db, clock } = parts;
  db.transaction(() => {
    const instrument = requireInstrument(db, code);
    const place = requirePlace(db, instrument.id, id);
    const untilMs = at === null ? place.untilMs : Date.parse(at);
    if (at !== null) refuseInstants(clock(), place.fromMs, untilMs, { from: place.from, until: at });
    const deed = deedOf(parts);
    insertPlace(db, { ...againOf(place), untilMs, isVoid: at === null, reason, ...deed });
    appendAudit(db, {
      ...deed,
      verb: 'take-off-instrument',
      subject: `instrument/${code}`,
      why: reason,
      details: { place: id, on: `${place.on.kind}/${place.on.name}`, channel: place.channel, at },
    });
  }).immediate();
}

/** A row in the place of another, with what that said. */
function againOf({ id, instrumentId, on, holderId, channel, fromMs }: PlaceRow) {
  return { instrumentId, on: { kind: on.kind, id: holderId }, channel, fromMs, replaces: id };
}

function requirePlace(db: ActionParts['db'], instrumentId: number, id: number): PlaceRow {
  const place = readPlaces(db, instrumentId).find((one) => one.id === id);
  if (place === undefined) throw new DomainError('not-found', `The instrument has no place ${id}`, { id });
  if (holdsNow(place)) return place;
  throw new DomainError('state-conflict', `Place ${id} was replaced already`, { id });
}

function refuseOccupied(other: PlaceRow, holder: string): never {
  const until = other.until === null ? '' : ` until ${other.until}`;
  throw new DomainError(
    'state-conflict',
    `${other.channel} of ${holder} had ${other.instrument} from ${other.from}${until}; correct that first`,
    { channel: other.channel, instrument: other.instrument, place: other.id },
  );
}

function refuseInstants(
  nowMs: number,
  fromMs: number,
  untilMs: number | null,
  said: { readonly from: string; readonly until: string | null },
): void {
  if (fromMs > nowMs || (untilMs ?? 0) > nowMs) {
    throw new DomainError(
      'event-impossible',
      `An instrument cannot have been placed at ${said.until ?? said.from}, in the future`,
      said,
    );
  }
  if (untilMs !== null && untilMs <= fromMs) {
    throw new DomainError(
      'event-impossible',
      `An instrument placed at ${said.from} cannot have been taken off at ${said.until}`,
      said,
    );
  }
}
