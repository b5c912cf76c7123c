import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import type { Imports } from '../../server/contract/imports.ts';
import { importDiscardPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { TextField } from './field.tsx';
import { Problem } from './problem.tsx';

/** Sets a file aside that is no log of this shop; why is asked, because the trail keeps it. */
export function ImportDiscard({ id }: { id: number }) {
  const { route } = useLocation();
  const [reason, setReason] = useState('');
  const discarding = usePost(async () => {
    await postJson<Imports>(importDiscardPath(id), { reason: reason.trim() });
    route('/import');
  });
  const discard = (event: Event) => {
    event.preventDefault();
    void discarding.post();
  };
  return (
    <details class="section">
      <summary>Set this file aside instead</summary>
      <form class="stack section" onSubmit={discard}>
        <TextField label="Reason" required maxLength={2000} value={reason} onValue={setReason} />
        {discarding.problem && <Problem problem={discarding.problem} />}
        <button type="submit" class="grave" disabled={discarding.isUnderWay}>
          Set aside
        </button>
      </form>
    </details>
  );
}
