import { useState } from 'preact/hooks';
import type { PartView } from '../../server/contract/parts.ts';
import { partResultsPath } from '../../server/contract/paths.ts';
import type { AddPartResultRequest } from '../../server/contract/results.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { instantOfWallClock, wallClock } from '../words/clock.ts';
import { asWritten } from '../words/figures.ts';
import { KIND_NAMES, type MeasuredKind, measuredWords } from '../words/measured.ts';
import { EMPTY_MEASURED, measuredOf } from '../words/measured-form.ts';
import { numberIn } from '../words/typed.ts';
import { zone } from '../workshop.ts';
import { ChoiceField, TextField } from './field.tsx';
import { FigureField } from './figure-field.tsx';
import { MeasuredFields } from './measured-fields.tsx';
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
            <Entry key={result.id} when={<When at={result.at} />}>
              <div class="head">
                <h3>{result.test}</h3>
                <span class={`outcome-line outcome-${MARKS[result.outcome]}`}>
                  <OutcomeMark mark={MARKS[result.outcome]} />
                  {result.outcome}
                </span>
                {result.figure !== null && <span>{asWritten(result.figure, result.unit ?? '')}</span>}
              </div>
              {result.measured && <p>{measuredWords(result.measured)}</p>}
              {result.text && <p>{result.text}</p>}
              <p class="soft small">
                written by {result.deed.by}
                {result.reason ? `, put right: ${result.reason}` : ''}
              </p>
            </Entry>
          ))}
        </ul>
      )}
      <details class="section">
        <summary>Write down a test or an inspection</summary>
        <ResultForm view={view} onAdded={onAdded} />
      </details>
    </section>
  );
}

const EMPTY = {
  kind: 'other',
  at: '',
  test: '',
  outcome: 'passed',
  figure: '',
  unit: '',
  text: '',
  replaces: '',
  reason: '',
  measured: EMPTY_MEASURED,
};

function ResultForm({ view, onAdded }: { view: PartView; onAdded: () => void }) {
  const { serial } = view;
  const [form, setForm, { clear }] = useKeptForm(`measured.${serial}`, EMPTY);
  const kind = form.kind as MeasuredKind;
  const isOther = kind === 'other';
  const [now] = useState(() => wallClock(Date.now(), zone.value).slice(0, 16));
  const change = (next: Partial<typeof EMPTY>) => setForm({ ...form, ...next });
  const at = instantOfWallClock(form.at || now, zone.value);
  const adding = usePost(async () => {
    const request: AddPartResultRequest = {
      at: new Date(at ?? Date.now()).toISOString(),
      test: form.test.trim() || KIND_NAMES[kind],
      outcome: form.outcome as AddPartResultRequest['outcome'],
      ...(isOther ? { figure: numberIn(form.figure), unit: form.unit.trim() || null } : {}),
      ...(isOther ? {} : { measured: measuredOf(kind, form.measured) }),
      ...(form.replaces === '' ? {} : { replaces: Number(form.replaces), reason: form.reason.trim() }),
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
        <ChoiceField
          label="Kind"
          choices={Object.entries(KIND_NAMES).map(([value, text]) => ({ value, text }))}
          value={form.kind}
          onValue={(value) => change({ kind: value })}
        />
        <TextField
          label="Test or inspection"
          hint={isOther ? 'Tap test, dimensions, proof load' : `Left empty: ${KIND_NAMES[kind]}`}
          required={isOther}
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
        {isOther && <FigureField label="Figure" value={form.figure} onValue={(value) => change({ figure: value })} />}
        {isOther && <TextField label="Unit" maxLength={40} value={form.unit} onValue={(unit) => change({ unit })} />}
        <MeasuredFields
          kind={kind}
          form={form.measured}
          onChange={(next) => change({ measured: { ...form.measured, ...next } })}
        />
        <TextField label="What was seen" maxLength={2000} value={form.text} onValue={(text) => change({ text })} />
        {view.results.length > 0 && (
          <ChoiceField
            label="Stands in place of"
            choices={[
              { value: '', text: 'nothing: it is another result' },
              ...view.results.map(({ id, test, outcome }) => ({ value: String(id), text: `${test}: ${outcome}` })),
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
        Write it down
      </button>
    </form>
  );
}
