import { useState } from 'preact/hooks';
import { limitTitle } from '../../models/cycle/limits-of-cycle.ts';
import type { Evaluation, OpenDecision } from '../../models/evaluation/evaluation.ts';
import { runExclusionsPath } from '../../server/contract/paths.ts';
import type { DecideSuspectRequest, RunView } from '../../server/contract/runs.ts';
import { postJson } from '../api.ts';
import { useKeptForm } from '../kept-form.ts';
import { usePost } from '../use-post.ts';
import { clockWithSeconds, instantOfWallClock, wallClock } from '../words/clock.ts';
import { listed } from '../words/figures.ts';
import { limitName } from '../words/limits.ts';
import { sentence } from '../words/verdicts.ts';
import { workshop, zone } from '../workshop.ts';
import { AreaField, TextField } from './field.tsx';
import { OutcomeMark } from './outcome-mark.tsx';
import { Problem } from './problem.tsx';

const KINDS: Readonly<Record<OpenDecision['kind'], string>> = {
  open: 'may be open',
  stuck: 'may be stuck',
  reversed: 'may be reversed',
  'follows-air': 'may hang in the air',
  jumping: 'jumps',
  offset: 'may be offset',
  'wrong-unit': 'may be in another unit',
  unused: 'may be on nothing',
};

/** Sensors that may lie, each asked about once, before anything that hangs on the answer. */
export function Decisions({
  run,
  evaluation,
  onDecided,
}: {
  run: RunView;
  evaluation: Evaluation;
  onDecided: () => void;
}) {
  const weighty = evaluation.decisions.filter(({ changes }) => changes.length > 0);
  const idle = evaluation.decisions.filter(({ changes }) => changes.length === 0);
  const decide = (decision: OpenDecision) => (
    <Decide key={decision.channel} run={run} decision={decision} onDecided={onDecided} />
  );
  if (evaluation.decisions.length === 0) return null;
  return (
    <section class="decisions" aria-label="Decisions to take">
      {weighty.map(decide)}
      {idle.length > 0 && (
        // While it runs all is pending: what will hang on it cannot be known.
        <details open={run.live !== null}>
          <summary>
            {listed(idle.map(({ channel }) => channel))} may not be telling the truth; no finding hangs on{' '}
            {idle.length === 1 ? 'it' : 'them'}
            {run.live === null ? '' : ' yet'}
          </summary>
          <div class="decisions">{idle.map(decide)}</div>
        </details>
      )}
    </section>
  );
}

function Decide({ run, decision, onDecided }: { run: RunView; decision: OpenDecision; onDecided: () => void }) {
  const start = { reason: '', from: wallClock(decision.from, zone.value) };
  const [form, setForm, { clear }] = useKeptForm(`decision.${run.run}.${decision.channel}`, start);
  const [isMissing, setIsMissing] = useState(false);
  const fromMs = instantOfWallClock(form.from, zone.value);
  const deciding = usePost(async (request: DecideSuspectRequest) => {
    await postJson<RunView>(runExclusionsPath(run.run), request);
    clear();
    onDecided();
  });
  const decide = (choice: 'exclude' | 'keep') => {
    const reason = form.reason.trim();
    setIsMissing(reason === '');
    if (reason === '' || fromMs === null) return;
    const about = { channel: decision.channel, kind: decision.kind, reason };
    // The fault's own instant where the clock was left alone: a second's fraction must not move it.
    const from = form.from === start.from ? decision.from : new Date(fromMs).toISOString();
    void deciding.post(choice === 'keep' ? { decision: 'keep', ...about } : { decision: 'exclude', from, ...about });
  };
  const changes = decision.changes.map((name) =>
    run.cycleIssue ? limitTitle(run.cycleIssue.document, name) : limitName(name),
  );
  return (
    <div class="decision notice amber">
      <h2 class="outcome-line outcome-cannot-tell">
        <OutcomeMark mark="cannot-tell" />
        {decision.channel} {KINDS[decision.kind]}
      </h2>
      <p>
        {sentence(decision.because)}{' '}
        {changes.length > 0
          ? `${changes.length === 1 ? 'On it hangs' : 'On it hang'}: ${changes.join('; ')}.`
          : run.live === null
            ? 'No finding would change.'
            : 'While the run goes on it is counted against.'}
      </p>
      <div class="decide">
        <AreaField
          label="Reason"
          rows={1}
          maxLength={2000}
          value={form.reason}
          wrong={isMissing && form.reason.trim() === '' ? 'Say why: the record keeps it.' : null}
          onValue={(reason) => setForm({ ...form, reason })}
        />
        <TextField
          label="Not to be believed from"
          type="datetime-local"
          step={1}
          value={form.from}
          wrong={fromMs === null ? 'This time does not exist in the shop’s zone.' : null}
          onValue={(from) => setForm({ ...form, from })}
        />
      </div>
      {deciding.problem && <Problem problem={deciding.problem} kept="Your reason is kept on this page." />}
      <div class="row">
        <button type="button" disabled={deciding.isUnderWay} onClick={() => decide('exclude')}>
          Exclude {decision.channel} from {fromMs === null ? '–' : clockWithSeconds(fromMs, zone.value)}
        </button>
        <button type="button" class="quiet" disabled={deciding.isUnderWay} onClick={() => decide('keep')}>
          Keep believing {decision.channel}
        </button>
      </div>
      <p class="soft small">Written in the name of {workshop.value?.actor.name ?? 'whoever is using this'}.</p>
    </div>
  );
}
