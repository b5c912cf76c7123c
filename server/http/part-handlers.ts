import { addPartResult } from '../actions/add-part-result.ts';
import { readAudit } from '../store/audit.ts';
import { findCode } from '../store/find.ts';
import { listParts } from '../store/parts.ts';
import type { SomeHandlers } from './handler.ts';
import { openApi } from './open-api.ts';
import { partView } from './part-view.ts';

export const partHandlers: SomeHandlers<
  'listParts' | 'readPart' | 'addPartResult' | 'find' | 'readAudit' | 'verifyAudit' | 'readOpenApi'
> = {
  listParts: ({ db }, { query }) => listParts(db, query),
  readPart: ({ db }, { params }) => partView(db, params.serial ?? ''),
  addPartResult(parts, { params, body }) {
    const { serial = '' } = params;
    addPartResult(parts, serial, body);
    return partView(parts.db, serial);
  },
  find: ({ db }, { query }) => findCode(db, query.code),
  readAudit: ({ db }, { query }) => readAudit(db, query),
  verifyAudit: ({ verify }) => verify(),
  readOpenApi: () => openApi(),
};
