import { makeHoldList } from '../actions/make-hold-list.ts';
import { setWhereabouts } from '../actions/set-whereabouts.ts';
import type { PartDanger } from '../contract/trace.ts';
import type { Db } from '../store/database.ts';
import { listFailedParts } from '../store/failed-parts.ts';
import { listHoldLists, listHoldsOfPart, requireHoldList } from '../store/hold-lists.ts';
import { requirePart } from '../store/parts.ts';
import { readWhereabouts } from '../store/whereabouts.ts';
import type { SomeHandlers } from './handler.ts';
import { holdCsv } from './hold-csv.ts';
import { numberIn } from './number-in.ts';

export const traceHandlers: SomeHandlers<
  | 'listFailed'
  | 'compareParts'
  | 'overlayParts'
  | 'listHolds'
  | 'makeHold'
  | 'readHold'
  | 'readHoldCsv'
  | 'readDanger'
  | 'setWhereabouts'
> = {
  listFailed: ({ db }) => listFailedParts(db),
  compareParts: ({ db, clock, trace }, { query }) =>
    trace.compare({ path: db.name, at: new Date(clock()).toISOString(), query }),
  overlayParts: ({ db, clock, trace }, { query }) =>
    trace.overlay({ path: db.name, at: new Date(clock()).toISOString(), query }),
  listHolds: ({ db }) => ({ holds: listHoldLists(db) }),
  makeHold: (parts, { body }) => requireHoldList(parts.db, makeHoldList(parts, body)),
  readHold: ({ db }, { params }) => requireHoldList(db, numberIn(params, 'hold')),
  readHoldCsv({ db }, { params }) {
    const hold = numberIn(params, 'hold');
    return { name: `hold-list-${hold}.csv`, chunks: holdCsv(requireHoldList(db, hold)) };
  },
  readDanger: ({ db }, { params }) => partDanger(db, params.serial ?? ''),
  setWhereabouts(parts, { params, body }) {
    const { serial = '' } = params;
    setWhereabouts(parts, serial, body);
    return partDanger(parts.db, serial);
  },
};

function partDanger(db: Db, serial: string): PartDanger {
  const partId = requirePart(db, serial);
  const [whereabouts = null, ...earlier] = readWhereabouts(db, partId);
  return { serial, whereabouts, earlier, holds: listHoldsOfPart(db, partId) };
}
