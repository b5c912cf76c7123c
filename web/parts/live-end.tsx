import { useState } from 'preact/hooks';
import type { EndRunRequest } from '../../server/contract/live.ts';
import { runClosePath, runEndPath } from '../../server/contract/paths.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { clock } from '../words/clock.ts';
import { instantIn } from '../words/typed.ts';
import { zone } from '../workshop.ts';
import { TextField } from './field.tsx';
import { Problem } from './problem.tsx';

/** Ends the logging of a run, and then closes its record: each asked first, because neither is undone. */
export function LiveEnd({ run, ended, again }: { run: RunView; ended: string | null; again: () => void }) {
  return (
    <section class="section" aria-label="End of the run">
      {ended === null ? <EndRun run={run} again={again} /> : <CloseRecord run={run} ended={ended} again={again} />}
    </section>
  );
}

function EndRun({ run, again }: { run: RunView; again: () => void }) {
  const [isAsked, setIsAsked] = useState(false);
  const [at, setAt] = useState('');
  const [reason, setReason] = useState('');
  const ending = usePost(async () => {
    const instant = instantIn(at, zone.value);
    const request: EndRunRequest = {
      ...(instant === null ? {} : { at: instant }),
      ...(reason.trim() === '' ? {} : { reason: reason.trim() }),
    };
    await postJson<unknown>(runEndPath(run.run), request);
    again();
  });
  if (!isAsked) {
    return (
      <button type="button" class="wide" onClick={() => setIsAsked(true)}>
        End the run
      </button>
    );
  }
  return (
    <div class="notice stack">
      <h2>End run {run.run}?</h2>
      <p>Scans up to the instant count; later ones belong to no run. It says nothing about the vessel.</p>
      <div class="fields">
        <TextField label="Ended at" hint="Left empty: now" type="datetime-local" step={1} value={at} onValue={setAt} />
        <TextField label="Why" hint="Where it was cut short" maxLength={2000} value={reason} onValue={setReason} />
      </div>
      {ending.problem && <Problem problem={ending.problem} kept="The run goes on." />}
      <div class="row">
        <button type="button" class="primary" disabled={ending.isUnderWay} onClick={() => void ending.post()}>
          End it
        </button>
        <button type="button" class="quiet" onClick={() => setIsAsked(false)}>
          Let it go on
        </button>
      </div>
    </div>
  );
}

function CloseRecord({ run, ended, again }: { run: RunView; ended: string; again: () => void }) {
  const closing = usePost(async () => {
    await postJson<unknown>(runClosePath(run.run), {});
    again();
  });
  return (
    <div class="notice stack">
      <h2>Ended at {clock(ended, zone.value)}; its record is open</h2>
      <p>
        Closing merges the scans, verifies that nothing of them changed, and judges the run for good. Decisions, the
        load and notes can be added before and after.
      </p>
      {closing.problem && <Problem problem={closing.problem} kept="Every scan is kept as it was." />}
      <button type="button" class="primary" disabled={closing.isUnderWay} onClick={() => void closing.post()}>
        {closing.isUnderWay ? 'Closing the record …' : 'Close the record'}
      </button>
    </div>
  );
}
