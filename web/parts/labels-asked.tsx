import { useState } from 'preact/hooks';
import { labelPath } from '../../server/contract/record-paths.ts';
import { readPicture } from '../api.ts';
import { usePost } from '../use-post.ts';
import type { Asked } from '../words/label-sheet.ts';
import { ChoiceField, TextField } from './field.tsx';
import { Problem } from './problem.tsx';

const KINDS = ['part', 'tool', 'roll', 'kit'];
const MOST_COPIES = 500;

/** What labels are printed of, and how many of each. */
export function LabelsAsked({
  asked,
  onAsked,
}: {
  asked: readonly Asked[];
  onAsked: (asked: readonly Asked[]) => void;
}) {
  const [typed, setTyped] = useState({ kind: 'part', code: '' });
  const adding = usePost(async () => {
    const code = typed.code.trim();
    // Asked for once here: a label that would lead nowhere is refused before it is on a sheet.
    await readPicture(labelPath(typed.kind, code, 'qr'));
    onAsked([...asked, { kind: typed.kind, code, copies: 1 }]);
    setTyped({ ...typed, code: '' });
  });
  const add = (event: Event) => {
    event.preventDefault();
    if (typed.code.trim() !== '') void adding.post();
  };
  const change = (n: number, copies: number) =>
    onAsked(asked.flatMap((one, at) => (at !== n ? [one] : copies < 1 ? [] : [{ ...one, copies }])));
  return (
    <section class="section">
      <h2>Labels of</h2>
      <ul class="entries">
        {asked.map((one, n) => (
          <li class="entry" key={`${one.kind} ${one.code} ${n}`}>
            <div class="row">
              <span>
                {one.kind} <b>{one.code}</b>
              </span>
              <TextField
                label={`How many of ${one.code}`}
                type="number"
                min={1}
                value={String(one.copies)}
                onLeave={(value) => change(n, Math.min(MOST_COPIES, Math.trunc(Number(value)) || 1))}
              />
              <button type="button" onClick={() => change(n, 0)}>
                Leave out {one.code}
              </button>
            </div>
          </li>
        ))}
      </ul>
      <form class="row" onSubmit={add}>
        <ChoiceField
          label="Kind"
          choices={KINDS.map((kind) => ({ value: kind, text: kind }))}
          value={typed.kind}
          onValue={(kind) => setTyped({ ...typed, kind })}
        />
        <TextField label="Code" maxLength={120} value={typed.code} onValue={(code) => setTyped({ ...typed, code })} />
        <button type="submit" disabled={adding.isUnderWay}>
          Add to the sheet
        </button>
      </form>
      {adding.problem && <Problem problem={adding.problem} />}
    </section>
  );
}
