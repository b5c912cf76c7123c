import { runNotesPath } from '../../server/contract/paths.ts';
import type { AddNoteRequest, RunView } from '../../server/contract/runs.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { AreaField } from './field.tsx';
import { Entry } from './notebook.tsx';
import { Problem } from './problem.tsx';
import { When } from './when.tsx';

/** What people wrote in the run's margin. */
export function RunNotes({ run, onAdded }: { run: RunView; onAdded: () => void }) {
  const [text, setText, { clear }] = useKeptForm(`note.${run.run}`, '');
  const adding = usePost(async () => {
    await postJson<RunView>(runNotesPath(run.run), { text: text.trim() } satisfies AddNoteRequest);
    clear();
    onAdded();
  });
  const add = (event: Event) => {
    event.preventDefault();
    void adding.post();
  };
  return (
    <section id="notes" class={run.notes.length === 0 ? 'section no-print' : 'section'}>
      <h2>Notes</h2>
      {run.notes.length > 0 && (
        <ul class="entries">
          {run.notes.map((note) => (
            <Entry key={note.deed.at + note.text} when={<When at={note.at} />}>
              <p>{note.text}</p>
              <p class="soft small">{note.deed.by}</p>
            </Entry>
          ))}
        </ul>
      )}
      <form class="stack section no-print" onSubmit={add}>
        <AreaField label="Write in the margin" rows={2} required maxLength={2000} value={text} onValue={setText} />
        {adding.problem && <Problem problem={adding.problem} kept="What you typed is kept on this page." />}
        <button type="submit" disabled={adding.isUnderWay || text.trim() === ''}>
          Write it down
        </button>
      </form>
    </section>
  );
}
