import { addRecorder } from '../actions/add-recorder.ts';
import { addVessel } from '../actions/add-vessel.ts';
import { keepLayout } from '../actions/keep-layout.ts';
import { setWorkshop } from '../actions/set-workshop.ts';
import type { Recorder } from '../contract/recorders.ts';
import { VERSION } from '../contract/version.ts';
import type { Workshop } from '../contract/workshop.ts';
import type { Db } from '../store/database.ts';
import { findRecorder, listRecorders, requireRecorder } from '../store/recorders.ts';
import { listVessels } from '../store/vessels.ts';
import { countRecords, findWorkshop, zoneOfWorkshop } from '../store/workshop.ts';
import type { AppParts } from './app-parts.ts';
import type { SomeHandlers } from './handler.ts';
import { nowView } from './now-view.ts';

export const workshopHandlers: SomeHandlers<
  | 'readWorkshop'
  | 'setWorkshop'
  | 'readNow'
  | 'listVessels'
  | 'addVessel'
  | 'listRecorders'
  | 'readRecorder'
  | 'addRecorder'
  | 'keepLayout'
> = {
  readWorkshop: workshopView,
  setWorkshop(parts, { body }) {
    setWorkshop(parts, body);
    return workshopView(parts);
  },
  readNow: nowView,
  listVessels: ({ db }) => ({ vessels: listVessels(db) }),
  addVessel(parts, { body }) {
    addVessel(parts, body);
    return { vessels: listVessels(parts.db) };
  },
  listRecorders: ({ db }) => ({ recorders: listRecorders(db) }),
  readRecorder: ({ db }, { params }) => recorderView(db, params.recorder ?? ''),
  addRecorder(parts, { body }) {
    addRecorder(parts, body);
    return recorderView(parts.db, body.name);
  },
  keepLayout(parts, { params, body }) {
    const name = params.recorder ?? '';
    keepLayout(parts, name, body.layout);
    return recorderView(parts.db, name);
  },
};

function recorderView(db: Db, name: string): Recorder {
  requireRecorder(db, name);
  return findRecorder(db, name) as Recorder;
}

function workshopView({ db, actor, watchedFolder }: AppParts): Workshop {
  const workshop = findWorkshop(db);
  return {
    name: workshop?.name ?? 'Workshop without a name yet',
    practice: workshop?.practice != null,
    sentence: workshop?.practice ?? null,
    zone: zoneOfWorkshop(db),
    units: workshop?.units ?? { temperature: '°C', pressure: 'bar', vacuum: 'bar' },
    actor: { name: actor.name, roles: [...actor.roles] },
    version: VERSION,
    watchedFolder,
    counts: countRecords(db),
  };
}
