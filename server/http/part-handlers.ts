import { addPartResult } from '../actions/add-part-result.ts';
import { addPartWork } from '../actions/add-part-work.ts';
import { setCoupon } from '../actions/set-coupon.ts';
import { setLayup } from '../actions/set-layup.ts';
import { setNonconformance } from '../actions/set-nonconformance.ts';
import { readAudit } from '../store/audit.ts';
import { findCode } from '../store/find.ts';
import { listParts } from '../store/parts.ts';
import type { SomeHandlers } from './handler.ts';
import { layupView } from './layup-view.ts';
import { numberIn } from './number-in.ts';
import { openApi } from './open-api.ts';
import { partView } from './part-view.ts';
import { readThickness } from './read-thickness.ts';

export const partHandlers: SomeHandlers<
  | 'listParts'
  | 'readPart'
  | 'addPartResult'
  | 'setNonconformance'
  | 'readLayup'
  | 'setLayup'
  | 'readThickness'
  | 'addPartWork'
  | 'setCoupon'
  | 'find'
  | 'readAudit'
  | 'verifyAudit'
  | 'readOpenApi'
> = {
  listParts: ({ db }, { query }) => listParts(db, query),
  readPart: ({ db }, { params }) => partView(db, params.serial ?? ''),
  addPartResult(parts, { params, body }) {
    const { serial = '' } = params;
    addPartResult(parts, serial, body);
    return partView(parts.db, serial);
  },
  setNonconformance(parts, { params, body }) {
    const { serial = '' } = params;
    setNonconformance(parts, serial, body);
    return partView(parts.db, serial);
  },
  readLayup: ({ db }, { params, query }) => layupView(db, params.serial ?? '', query),
  setLayup(parts, { params, body }) {
    const { serial = '' } = params;
    setLayup(parts, serial, body);
    return layupView(parts.db, serial);
  },
  readThickness: (parts, { params, query }) =>
    readThickness(parts, params.serial ?? '', numberIn(params, 'run'), query),
  addPartWork(parts, { params, body }) {
    const { serial = '' } = params;
    addPartWork(parts, serial, body);
    return partView(parts.db, serial);
  },
  setCoupon(parts, { params, body }) {
    const { serial = '' } = params;
    setCoupon(parts, serial, body);
    return partView(parts.db, serial);
  },
  find: ({ db }, { query }) => findCode(db, query.code),
  readAudit: ({ db }, { query }) => readAudit(db, query),
  verifyAudit: ({ verify }) => verify(),
  readOpenApi: () => openApi(),
};
