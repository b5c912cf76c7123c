import { useState } from 'preact/hooks';
import type { PartView } from '../../server/contract/parts.ts';
import { partDecisionsPath } from '../../server/contract/record-paths.ts';
import type { Nonconformance, SetNonconformanceRequest } from '../../server/contract/results.ts';
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

type Word = NonNullable<Nonconformance['decision']>['word'];
const WORDS: readonly Word[] = ['concession', 'rework', 'repair', 'regrade', 'scrap'];

/** What does not conform of a part, and what a named authority decided on it elsewhere. */
export function PartNonconformances({ view, onChanged }: { view: PartView; onChanged: () => void }) {
  return (
    <section class="section">
      <h2>Nonconformances</h2>
      {view.nonconformances.length === 0 ? (
        <p class="soft">None on record.</p>
      ) : (
        <ul class="entries">
          {view.nonconformances.map(({ number, text, decision, reason, deed }) => (
            <Entry key={number} when={<When at={decision?.at ?? deed.at} />}>
              <div class="head">
                <h3>{number}</h3>
                <span>{decision === null ? 'not decided yet' : raised(decision.word)}</span>
              </div>
              <p>{text}</p>
              {decision && (
                <p>
                  Decided by {decision.authority}: {decision.because}
                  {decision.conditions && `. Conditions: ${decision.conditions}`}
                </p>
              )}
              <p class="soft small">
                written by {deed.by}
                {reason ? `, again because: ${reason}` : ''}
              </p>
            </Entry>
          ))}
        </ul>
      )}
      <details>
        <summary>Write down a nonconformance or a decision on it</summary>
        <DecisionForm view={view} onChanged={onChanged} />
      </details>
    </section>
  );
}

const EMPTY = { number: '', text: '', word: '', authority: '', because: '', conditions: '', at: '', reason: '' };

function DecisionForm({ view, onChanged }: { view: PartView; onChanged: () => void }) {
  const [form, setForm, { clear }] = useKeptForm(`nonconformance.${view.serial}`, EMPTY);
  const [now] = useState(() => wallClock(Date.now(), zone.value).slice(0, 16));
  const change = (next: Partial<typeof EMPTY>) => setForm({ ...form, ...next });
  const at = instantIn(form.at || now, zone.value);
  const known = view.nonconformances.some(({ number }) => number === form.number.trim());
  const keeping = usePost(async () => {
    const request: SetNonconformanceRequest = {
      number: form.number.trim(),
      text: form.text.trim(),
      decision:
        form.word === ''
          ? null
          : {
              word: form.word as Word,
              authority: form.authority.trim(),
              because: form.because.trim(),
              conditions: form.conditions.trim() || null,
              at: at ?? '',
            },
      ...(known ? { reason: form.reason.trim() } : {}),
    };
    await postJson<PartView>(partDecisionsPath(view.serial), request);
    clear();
    onChanged();
  });
  const keep = (event: Event) => {
    event.preventDefault();
    void keeping.post();
  };
  const line = (key: keyof typeof EMPTY, label: string, required = true) => (
    <TextField
      label={label}
      required={required}
      maxLength={key === 'number' || key === 'authority' ? 120 : 2000}
      value={form[key]}
      onValue={(value) => change({ [key]: value })}
    />
  );
  return (
    <form class="stack" onSubmit={keep}>
      <p class="soft">Decisions are taken by whoever has the authority; here they are written down.</p>
      <div class="fields">
        {line('number', 'Number')}
        {line('text', 'What does not conform')}
        <ChoiceField
          label="Decision"
          choices={[{ value: '', text: 'not decided yet' }, ...WORDS.map((word) => ({ value: word, text: word }))]}
          value={form.word}
          onValue={(word) => change({ word })}
        />
        {form.word !== '' && (
          <>
            {line('authority', 'Decided by')}
            {line('because', 'Because')}
            {line('conditions', 'Conditions', false)}
            <TextField
              label={`Decided when, in ${zone.value}`}
              type="datetime-local"
              required
              value={form.at || now}
              wrong={at === null ? 'This time does not exist in the shop’s zone.' : null}
              onValue={(value) => change({ at: value })}
            />
          </>
        )}
        {known && line('reason', 'Why it is written again')}
      </div>
      {keeping.problem && <Problem problem={keeping.problem} kept="What you typed is kept on this page." />}
      <button type="submit" disabled={keeping.isUnderWay || at === null}>
        Write it down
      </button>
    </form>
  );
}
