import { useState } from 'preact/hooks';
import type { PartView } from '../../server/contract/parts.ts';
import { partResultsPath } from '../../server/contract/paths.ts';
import type { AddPartResultRequest } from '../../server/contract/results.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { instantOfWallClock, wallClock } from '../words/clock.ts';
import { asWritten } from '../words/figures.ts';
import { zone } from '../workshop.ts';
import { ChoiceField, TextField } from './field.tsx';
import { Entry } from './notebook.tsx';
import { OutcomeMark } from './outcome-mark.tsx';
import { Problem } from './problem.tsx';
import { When } from './when.tsx';

const MARKS = { passed: 'met', failed: 'not-met', noted: 'pending' } as const;

/** Tests and inspections of a part, and a form for one more. */
export function PartResults({ view, onAdded }: { view: PartView; onAdded: () => void }) {
  return (
    <section class="section">
      <h2>Tests and inspections</h2>
      {view.results.length === 0 ? (
        <p class="soft">None on record.</p>
      ) : (
        <ul class="entries">
          {view.results.map((result) => (
            <Entry key={result.deed.at + result.test} when={<When at={result.at} />}>
              <div class="head">
                <h3>{result.test}</h3>
                <span class={`outcome-line outcome-${MARKS[result.outcome]}`}>
                  <OutcomeMark mark={MARKS[result.outcome]} />
                  {result.outcome}
                </span>
                {result.figure !== null && <span>{asWritten(result.figure, result.unit ?? '')}</span>}
              </div>
              {result.text && <p>{result.text}</p>}
              <p class="soft small">written by {result.deed.by}</p>
            </Entry>
          ))}
        </ul>
      )}
      <details class="section">
        <summary>Write down a test or an inspection</summary>
        <ResultForm serial={view.serial} onAdded={onAdded} />
      </details>
    </section>
  );
}

const EMPTY = { at: '', test: '', outcome: 'passed', figure: '', unit: '', text: '' };

function ResultForm({ serial, onAdded }: { serial: string; onAdded: () => void }) {
  const [form, setForm, { clear }] = useKeptForm(`result.${serial}`, EMPTY);
  const [now] = useState(() => wallClock(Date.now(), zone.value).slice(0, 16));
  const change = (next: Partial<typeof EMPTY>) => setForm({ ...form, ...next });
  const at = instantOfWallClock(form.at || now, zone.value);
  const adding = usePost(async () => {
    const request: AddPartResultRequest = {
      at: new Date(at ?? Date.now()).toISOString(),
      test: form.test.trim(),
      outcome: form.outcome as AddPartResultRequest['outcome'],
      figure: form.figure.trim() === '' ? null : Number(form.figure.replace(',', '.')),
      unit: form.unit.trim() || null,
      text: form.text,
    };
    await postJson<PartView>(partResultsPath(serial), request);
    clear();
    onAdded();
  });
  const add = (event: Event) => {
    event.preventDefault();
    void adding.post();
  };
  return (
    <form class="stack section" onSubmit={add}>
      <div class="fields">
        <TextField
          label="Test or inspection"
          hint="DSC residual cure, ultrasonic, proof load"
          required
          maxLength={200}
          value={form.test}
          onValue={(test) => change({ test })}
        />
        <ChoiceField
          label="Outcome"
          choices={['passed', 'failed', 'noted'].map((word) => ({ value: word, text: word }))}
          value={form.outcome}
          onValue={(outcome) => change({ outcome })}
        />
        <TextField
          label={`When, in ${zone.value}`}
          type="datetime-local"
          required
          value={form.at || now}
          wrong={at === null ? 'This time does not exist in the shop’s zone.' : null}
          onValue={(value) => change({ at: value })}
        />
        <TextField
          label="Figure"
          inputMode="decimal"
          pattern="-?[0-9]+([.,][0-9]+)?"
          value={form.figure}
          onValue={(value) => change({ figure: value })}
        />
        <TextField label="Unit" maxLength={40} value={form.unit} onValue={(unit) => change({ unit })} />
        <TextField label="What was seen" maxLength={2000} value={form.text} onValue={(text) => change({ text })} />
      </div>
      {adding.problem && <Problem problem={adding.problem} kept="What you typed is kept on this page." />}
      <button type="submit" disabled={adding.isUnderWay || at === null}>
        Write it down
      </button>
    </form>
  );
}
