import { useState } from 'preact/hooks';
import type { AskedParts, WithoutRecord } from '../../server/contract/ask.ts';
import { askPartsPath, askVerdictsPath, WITHOUT_RECORD_PATH } from '../../server/contract/instrument-paths.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePageTitle } from '../page-title.ts';
import { ChoiceField, TextField } from '../parts/field.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { VerdictLine } from '../parts/outcome-mark.tsx';
import { Shown } from '../parts/shown.tsx';
import { VerdictQuestion } from '../parts/verdict-question.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';
import { count } from '../words/figures.ts';
import { instantIn } from '../words/typed.ts';
import { zone } from '../workshop.ts';

/** Questions backwards: which parts saw it, which runs would be judged otherwise, of which parts something lacks. */
export default function AskPage() {
  usePageTitle('Questions');
  return (
    <Notebook>
      <PageHead title="Questions">
        <p class="soft">From a roll, a tool, a sensor, a vessel to the parts that saw it. An answer changes nothing.</p>
      </PageHead>
      <SeenParts />
      <OtherIssue />
      <OtherExclusion />
      <Without />
    </Notebook>
  );
}

const KINDS = [
  ['roll', 'roll'],
  ['kit', 'kit'],
  ['batch', 'batch'],
  ['tool', 'tool'],
  ['thermocouple', 'thermocouple of a vessel'],
  ['instrument', 'instrument'],
  ['vessel', 'vessel'],
] as const;

const SEEN = { kind: 'roll', code: '', vessel: '', from: '', until: '' };

function SeenParts() {
  const [form, setForm] = useKeptForm('ask.seen', SEEN);
  const [asked, setAsked] = useState<string | null>(null);
  const reading = useRead<AskedParts>(asked);
  const change = (next: Partial<typeof SEEN>) => setForm({ ...form, ...next });
  const ask = (event: Event) => {
    event.preventDefault();
    const { kind, code, vessel } = form;
    const dates = { from: instantIn(form.from, zone.value), until: instantIn(form.until, zone.value) };
    setAsked(
      askPartsPath({ kind, code: code.trim(), vessel: kind === 'thermocouple' ? vessel.trim() : null, ...dates }),
    );
  };
  return (
    <section class="section">
      <h2>Which parts saw it</h2>
      <form class="stack" onSubmit={ask}>
        <div class="fields">
          <ChoiceField
            label="What"
            choices={KINDS.map(([value, text]) => ({ value, text }))}
            value={form.kind}
            onValue={(kind) => change({ kind })}
          />
          <TextField label="Its code" required maxLength={120} value={form.code} onValue={(code) => change({ code })} />
          {form.kind === 'thermocouple' && (
            <TextField
              label="Of vessel"
              required
              maxLength={120}
              value={form.vessel}
              onValue={(vessel) => change({ vessel })}
            />
          )}
          <TextField label="Cured from" type="datetime-local" value={form.from} onValue={(from) => change({ from })} />
          <TextField
            label="Cured before"
            type="datetime-local"
            value={form.until}
            onValue={(until) => change({ until })}
          />
        </div>
        <button type="submit" class="primary">
          Which parts
        </button>
      </form>
      {asked && (
        <Shown reading={reading} what="Looking for the parts">
          {(answer) => <PartsThatSaw answer={answer} />}
        </Shown>
      )}
    </section>
  );
}

function PartsThatSaw({ answer: { what, total, parts } }: { answer: AskedParts }) {
  return (
    <div aria-live="polite">
      <p>
        <b>{count(total, 'part')}</b> saw {what}.{parts.length < total && ` The latest ${parts.length} are listed.`}
      </p>
      <ul class="entries">
        {parts.map((part) => (
          <Entry key={part.serial} when={part.lastRunAt && <When at={part.lastRunAt} />}>
            <div class="head">
              <a href={`/parts/${encodeURIComponent(part.serial)}`}>{part.serial}</a>
              {part.verdict ? <VerdictLine verdict={part.verdict} /> : <span class="soft">not judged yet</span>}
            </div>
            <p class="soft">
              {[
                part.title,
                part.runs.length > 0 && `run ${part.runs.join(', ')}`,
                part.whereabouts &&
                  (part.whereabouts.customer ? `shipped to ${part.whereabouts.customer}` : 'in the shop'),
              ]
                .filter(Boolean)
                .join(' · ')}
            </p>
          </Entry>
        ))}
      </ul>
    </div>
  );
}

function OtherIssue() {
  const [form, setForm] = useKeptForm('ask.issue', { cycle: '', issue: '', other: '' });
  const change = (next: Partial<typeof form>) => setForm({ ...form, ...next });
  const { cycle, issue, other } = form;
  return (
    <section class="section">
      <h2>By another issue of their cycle</h2>
      <div class="fields">
        <TextField label="Cycle" maxLength={120} value={cycle} onValue={(text) => change({ cycle: text })} />
        <TextField label="Runs of issue" maxLength={120} value={issue} onValue={(text) => change({ issue: text })} />
        <TextField label="Judged by issue" maxLength={120} value={other} onValue={(text) => change({ other: text })} />
      </div>
      <VerdictQuestion
        key={`${cycle} ${issue} ${other}`}
        path={askVerdictsPath({ by: 'issue', cycle: cycle.trim(), issue: issue.trim(), other: other.trim() })}
        ask="Which runs would be judged otherwise"
      />
    </section>
  );
}

function OtherExclusion() {
  const [form, setForm] = useKeptForm('ask.exclusion', { run: '', channel: '', from: '' });
  const change = (next: Partial<typeof form>) => setForm({ ...form, ...next });
  const { run, channel } = form;
  const from = instantIn(form.from, zone.value);
  return (
    <section class="section">
      <h2>Without a sensor</h2>
      <div class="fields">
        <TextField label="Run" inputMode="numeric" value={run} onValue={(text) => change({ run: text })} />
        <TextField label="Channel" maxLength={120} value={channel} onValue={(text) => change({ channel: text })} />
        <TextField
          label="Not believed from"
          type="datetime-local"
          value={form.from}
          onValue={(text) => change({ from: text })}
        />
      </div>
      <VerdictQuestion
        key={`${run} ${channel} ${from}`}
        path={askVerdictsPath({ by: 'exclusion', run: run.trim(), channel: channel.trim(), from })}
        ask="Would it be judged otherwise"
      />
    </section>
  );
}

function Without() {
  const reading = useRead<WithoutRecord>(WITHOUT_RECORD_PATH);
  return (
    <section class="section">
      <h2>Not on record</h2>
      <Shown reading={reading} what="Looking for what is not on record">
        {({ parts, noRun, noLayup, noMaterial }) => (
          <>
            <Lacking of={parts} what="no run" gap={noRun} />
            <Lacking of={parts} what="no lay-up" gap={noLayup} />
            <Lacking of={parts} what="no material" gap={noMaterial} />
          </>
        )}
      </Shown>
    </section>
  );
}

function Lacking({ of, what, gap }: { of: number; what: string; gap: WithoutRecord['noRun'] }) {
  if (gap.total === 0)
    return (
      <p>
        Of all {count(of, 'part')} there is a record: none with {what}.
      </p>
    );
  return (
    <details>
      <summary>
        {gap.total} of {count(of, 'part')} with {what}
      </summary>
      <p>
        {gap.parts.map((serial, n) => (
          <>
            {n > 0 && ', '}
            <a href={`/parts/${encodeURIComponent(serial)}`}>{serial}</a>
          </>
        ))}
        {gap.parts.length < gap.total && ` and ${gap.total - gap.parts.length} more`}
      </p>
    </details>
  );
}
