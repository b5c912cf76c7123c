import { useState } from 'preact/hooks';
import type { RestSourceRequest, SourceLine, SourceView } from '../../server/contract/live.ts';
import { sourceRestPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { TextField } from './field.tsx';
import { Problem } from './problem.tsx';

/** Lets a source rest, or wakes it; with a reason, because a resting source is a gap in what is kept. */
export function SourceRest({ line, onChanged }: { line: SourceLine; onChanged: () => void }) {
  const rests = line.state === 'resting';
  const [reason, setReason] = useState('');
  const changing = usePost(async () => {
    const request: RestSourceRequest = { resting: !rests, reason: reason.trim() };
    await postJson<SourceView>(sourceRestPath(line.id), request);
    setReason('');
    onChanged();
  });
  return (
    <form
      class="stack"
      onSubmit={(event) => {
        event.preventDefault();
        void changing.post();
      }}
    >
      <h3>{rests ? 'It rests: nothing of it is kept' : 'Let it rest'}</h3>
      <div class="row">
        <TextField
          label={rests ? 'Why it is woken' : 'Why it rests'}
          required
          maxLength={2000}
          value={reason}
          onValue={setReason}
        />
        <button type="submit" class="quiet" disabled={changing.isUnderWay || reason.trim() === ''}>
          {rests ? 'Wake it' : 'Let it rest'}
        </button>
      </div>
      {changing.problem && <Problem problem={changing.problem} />}
    </form>
  );
}
