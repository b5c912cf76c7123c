import { useState } from 'preact/hooks';
import type { AddPartWorkRequest, PartWork } from '../../server/contract/layups.ts';
import type { PartView } from '../../server/contract/parts.ts';
import { partWorksPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { wallClock } from '../words/clock.ts';
import { raised } from '../words/figures.ts';
import { instantIn } from '../words/typed.ts';
import { zone } from '../workshop.ts';
import { ChoiceField, TextField } from './field.tsx';
import { Entry } from './notebook.tsx';
import { Problem } from './problem.tsx';
import { When } from './when.tsx';

const WORKS: readonly PartWork['work'][] = ['trimming', 'drilling', 'other'];
const EMPTY = { work: 'trimming', text: '', at: '', replaces: '', reason: '' };

/** Trimming, drilling and what else was done to a part after its cure. */
export function PartWorks({ view, onChanged }: { view: PartView; onChanged: () => void }) {
  return (
    <section class="section">
      <h2>Work after cure</h2>
      {view.works.length === 0 ? (
        <p class="soft">None on record.</p>
      ) : (
        <ul class="entries">
          {view.works.map((work) => (
            <Entry key={work.id} when={<When at={work.at} />}>
              <p>
                <b>{raised(work.work)}</b> {work.text}
              </p>
              <p class="soft small">
                written by {work.deed.by}
                {work.reason ? `, put right: ${work.reason}` : ''}
              </p>
            </Entry>
          ))}
        </ul>
      )}
      <details>
        <summary>Write down work on it</summary>
        <WorkForm view={view} onChanged={onChanged} />
      </details>
    </section>
  );
}

function WorkForm({ view, onChanged }: { view: PartView; onChanged: () => void }) {
  const [form, setForm, { clear }] = useKeptForm(`work.${view.serial}`, EMPTY);
  const [now] = useState(() => wallClock(Date.now(), zone.value).slice(0, 16));
  const change = (next: Partial<typeof EMPTY>) => setForm({ ...form, ...next });
  const at = instantIn(form.at || now, zone.value);
  const adding = usePost(async () => {
    const request: AddPartWorkRequest = {
      work: form.work as AddPartWorkRequest['work'],
      text: form.text.trim(),
      at: at ?? '',
      ...(form.replaces === '' ? {} : { replaces: Number(form.replaces), reason: form.reason.trim() }),
    };
    await postJson<PartView>(partWorksPath(view.serial), request);
    clear();
    onChanged();
  });
  const add = (event: Event) => {
    event.preventDefault();
    void adding.post();
  };
  return (
    <form class="stack" onSubmit={add}>
      <div class="fields">
        <ChoiceField
          label="Work"
          choices={WORKS.map((work) => ({ value: work, text: work }))}
          value={form.work}
          onValue={(work) => change({ work })}
        />
        <TextField
          label="What was done"
          required
          maxLength={2000}
          value={form.text}
          onValue={(text) => change({ text })}
        />
        <TextField
          label={`When, in ${zone.value}`}
          type="datetime-local"
          required
          value={form.at || now}
          wrong={at === null ? 'This time does not exist in the shop’s zone.' : null}
          onValue={(value) => change({ at: value })}
        />
        {view.works.length > 0 && (
          <ChoiceField
            label="Stands in place of"
            choices={[
              { value: '', text: 'nothing: it is more work' },
              ...view.works.map(({ id, work, text }) => ({ value: String(id), text: `${work}: ${text}` })),
            ]}
            value={form.replaces}
            onValue={(replaces) => change({ replaces })}
          />
        )}
        {form.replaces !== '' && (
          <TextField
            label="Why it is put right"
            required
            maxLength={2000}
            value={form.reason}
            onValue={(reason) => change({ reason })}
          />
        )}
      </div>
      {adding.problem && <Problem problem={adding.problem} kept="What you typed is kept on this page." />}
      <button type="submit" disabled={adding.isUnderWay || at === null}>
        Write the work down
      </button>
    </form>
  );
}
