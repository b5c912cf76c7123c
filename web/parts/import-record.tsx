import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import type { Layout } from '../../models/log/layout.ts';
import type { ImportView, RecordedRun, RecordRunRequest } from '../../server/contract/imports.ts';
import { importRunPath, VESSELS_PATH } from '../../server/contract/paths.ts';
import type { Vessels } from '../../server/contract/workshop.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { readWorkshop } from '../workshop.ts';
import { ChoiceField, TextField } from './field.tsx';
import { Problem } from './problem.tsx';

/** Makes a run of the file: which recorder its layout is kept for, which vessel it ran in. */
export function ImportRecord({
  view,
  layout,
  source,
  isReady,
}: {
  view: ImportView;
  layout: Layout;
  source: string | null;
  isReady: boolean;
}) {
  const { route } = useLocation();
  const vessels = useRead<Vessels>(VESSELS_PATH).value?.vessels ?? [];
  const [recorder, setRecorder] = useState(source ?? view.recorder ?? '');
  const [isKept, setIsKept] = useState(true);
  const [vessel, setVessel] = useState(view.knownLayouts.find((one) => one.recorder === source)?.vessel ?? '');
  const [run, setRun] = useState('');
  const recording = usePost(async () => {
    const request: RecordRunRequest = {
      layout: { ...layout, name: recorder.trim() || layout.name },
      recorder: isKept && recorder.trim() !== '' ? recorder.trim() : null,
      vessel: vessel || null,
      run: run.trim() === '' ? null : Number(run),
    };
    const made = await postJson<RecordedRun>(importRunPath(view.id), request);
    await readWorkshop();
    route(run.trim() === '' ? `/runs/${made.run}/load` : `/runs/${made.run}`);
  });
  const record = (event: Event) => {
    event.preventDefault();
    void recording.post();
  };
  return (
    <section class="section">
      <h2>Make it a run</h2>
      <form class="stack" onSubmit={record}>
        <div class="fields">
          <TextField label="Recorder it came from" maxLength={120} value={recorder} onValue={setRecorder} />
          <ChoiceField
            label="Vessel"
            choices={[{ value: '', text: 'not said' }, ...vessels.map(({ name }) => ({ value: name, text: name }))]}
            value={vessel}
            onValue={setVessel}
            hint={
              vessels.length === 0 ? (
                <>
                  None is known yet; name yours on the <a href="/workshop">workshop</a> page.
                </>
              ) : undefined
            }
          />
          <TextField
            label="Another file of run"
            type="number"
            min={1}
            value={run}
            onValue={setRun}
            hint="Only where this file goes with one that is on record; empty makes a new run."
          />
        </div>
        <label class="tick">
          <input
            type="checkbox"
            checked={isKept && recorder.trim() !== ''}
            disabled={recorder.trim() === ''}
            onChange={(event) => setIsKept(event.currentTarget.checked)}
          />
          {recorder.trim() === ''
            ? 'Keep this layout for its recorder, once you have named it, so that the next file is read without questions'
            : `Keep this layout for ${recorder.trim()}, so that its next file is read without questions`}
        </label>
        {recording.problem && (
          <Problem problem={recording.problem} kept="The file and its layout are kept on this page." />
        )}
        <button type="submit" class="primary" disabled={!isReady || recording.isUnderWay}>
          {run.trim() === '' ? 'Make it a run, then say what was in it' : `Add it to run ${run}`}
        </button>
      </form>
    </section>
  );
}
