import { addLiveSource } from '../actions/add-live-source.ts';
import { liveSourceDocument, passwordFor } from '../actions/live-source-document.ts';
import { restLiveSource, setLiveSource } from '../actions/set-live-source.ts';
import { enterReadings } from '../live/enter-readings.ts';
import { listLiveSources } from '../store/live-sources.ts';
import { requireVessel } from '../store/vessels.ts';
import type { SomeHandlers } from './handler.ts';
import { numberIn } from './number-in.ts';

export const sourceHandlers: SomeHandlers<
  'listSources' | 'addSource' | 'trySource' | 'readSource' | 'setSource' | 'restSource' | 'enterReadings'
> = {
  listSources: ({ db, sources }, { params }) => ({ sources: sources.lines(requireVessel(db, params.vessel ?? '')) }),
  async addSource(parts, { params, body }) {
    const id = addLiveSource(parts, params.vessel ?? '', body);
    await parts.sources.refresh(id);
    return parts.sources.view(id);
  },
  trySource({ db, sources }, { params, body }) {
    const vesselId = requireVessel(db, params.vessel ?? '');
    const document = liveSourceDocument(db, body.document, false);
    // Who changes a saved source need not know its password to try it.
    const saved = listLiveSources(db, vesselId).find(({ name }) => name === document.name);
    const password = body.password ?? (saved === undefined ? undefined : passwordFor(db, saved, document));
    return sources.tryOut(vesselId, document, password);
  },
  readSource: ({ sources }, { params }) => sources.view(numberIn(params, 'source')),
  async setSource(parts, { params, body }) {
    const id = numberIn(params, 'source');
    setLiveSource(parts, id, body);
    await parts.sources.refresh(id);
    return parts.sources.view(id);
  },
  async restSource(parts, { params, body }) {
    const id = numberIn(params, 'source');
    restLiveSource(parts, id, body);
    await parts.sources.refresh(id);
    return parts.sources.view(id);
  },
  enterReadings: (parts, { params, body }) => enterReadings(parts, numberIn(params, 'source'), body),
};
