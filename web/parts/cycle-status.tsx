import { useState } from 'preact/hooks';
import type { CycleView } from '../../server/contract/cycles.ts';
import { cycleReleasePath, cycleWithdrawPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { TextField } from './field.tsx';
import { Problem } from './problem.tsx';

/** Release or withdrawal of an issue: asked with its reason, because neither can be undone. */
export function CycleStatus({ view, onChanged }: { view: CycleView; onChanged: () => void }) {
  const [reason, setReason] = useState('');
  const changing = usePost(async (path: string) => {
    await postJson<CycleView>(path, { reason: reason.trim() });
    setReason('');
    onChanged();
  });
  if (view.status === 'withdrawn') {
    return (
      <section class="section">
        <h2>Withdrawn</h2>
        <p>No new run can be judged by this issue. Runs judged by it before keep their verdict.</p>
      </section>
    );
  }
  const isDraft = view.status === 'draft';
  const act = (event: Event) => {
    event.preventDefault();
    void changing.post((isDraft ? cycleReleasePath : cycleWithdrawPath)(view.code, view.issue));
  };
  return (
    <section class="section">
      <h2>{isDraft ? 'Release this issue' : 'Withdraw this issue'}</h2>
      <p>
        {isDraft
          ? 'From then on it is frozen: what changes later is a new issue. Read every line above against the document it comes from.'
          : 'No new run can then be judged by it. Runs judged by it before keep their verdict. This cannot be undone.'}
      </p>
      <form class="stack" onSubmit={act}>
        <TextField label="Reason" required maxLength={2000} value={reason} onValue={setReason} />
        {changing.problem && <Problem problem={changing.problem} />}
        <button type="submit" class={isDraft ? 'primary' : 'grave'} disabled={changing.isUnderWay}>
          {isDraft ? `Release ${view.code} issue ${view.issue}` : `Withdraw ${view.code} issue ${view.issue}`}
        </button>
      </form>
    </section>
  );
}
