import { addItemEvent, extendLife, recordExcursion } from '../actions/add-item-event.ts';
import { correctEvent } from '../actions/correct-event.ts';
import { cutKit } from '../actions/cut-kit.ts';
import { importMaterial } from '../actions/import-material.ts';
import { receiveRoll } from '../actions/receive-roll.ts';
import { setBatch } from '../actions/set-batch.ts';
import { setPartMaterials } from '../actions/set-part-materials.ts';
import { requireBatch } from '../store/batches.ts';
import type { SomeHandlers } from './handler.ts';
import { itemView, materialsView, materialView } from './material-view.ts';
import { numberIn } from './number-in.ts';
import { partMaterialsView } from './part-materials-view.ts';

export const materialHandlers: SomeHandlers<
  | 'listMaterials'
  | 'importMaterial'
  | 'readMaterial'
  | 'setBatch'
  | 'receiveRoll'
  | 'recordExcursion'
  | 'readItem'
  | 'addItemEvent'
  | 'correctEvent'
  | 'cutKit'
  | 'extendLife'
  | 'readPartMaterials'
  | 'setPartMaterials'
> = {
  listMaterials: ({ db, clock }) => materialsView(db, clock()),
  importMaterial(parts, { body }) {
    const { code } = importMaterial(parts, body.document);
    return materialView(parts.db, code, parts.clock());
  },
  readMaterial: ({ db, clock }, { params }) => materialView(db, params.code ?? '', clock()),
  async setBatch(parts, { body }) {
    await setBatch(parts, body);
    return requireBatch(parts.db, body.batch);
  },
  async receiveRoll(parts, { body }) {
    await receiveRoll(parts, body);
    return itemView(parts.db, body.roll, parts.clock());
  },
  async recordExcursion(parts, { body }) {
    await recordExcursion(parts, body);
    return materialsView(parts.db, parts.clock());
  },
  readItem: ({ db, clock }, { params }) => itemView(db, params.item ?? '', clock()),
  async addItemEvent(parts, { params, body }) {
    const { item = '' } = params;
    await addItemEvent(parts, item, body);
    return itemView(parts.db, item, parts.clock());
  },
  async correctEvent(parts, { params, body }) {
    const { item = '' } = params;
    await correctEvent(parts, item, numberIn(params, 'line'), body);
    return itemView(parts.db, item, parts.clock());
  },
  async cutKit(parts, { params, body }) {
    await cutKit(parts, params.item ?? '', body);
    return itemView(parts.db, body.kit, parts.clock());
  },
  async extendLife(parts, { params, body }) {
    const { item = '' } = params;
    await extendLife(parts, item, body);
    return itemView(parts.db, item, parts.clock());
  },
  readPartMaterials: ({ db, clock }, { params, query }) =>
    partMaterialsView(db, params.serial ?? '', query.at === undefined ? null : Date.parse(query.at), clock()),
  async setPartMaterials(parts, { params, body }) {
    const { serial = '' } = params;
    await setPartMaterials(parts, serial, body);
    return partMaterialsView(parts.db, serial, null, parts.clock());
  },
};
