import { useEffect, useState } from 'preact/hooks';
import type { BeginRunRequest, DoorCheck, DoorChecks } from '../../server/contract/live.ts';
import { vesselDoorChecksPath } from '../../server/contract/paths.ts';
import { asProblem, isAborted, postJson } from '../api.ts';
import type { ProblemError } from '../problem-error.ts';
import { raised } from '../words/figures.ts';
import { sentence } from '../words/verdicts.ts';
import { OutcomeMark } from './outcome-mark.tsx';
import { Problem } from './problem.tsx';

const LOOKED_AFTER_MS = 400;

/** What is to be seen before the door closes. It is told; whether the run begins is the person's to say. */
export function BeginChecks({ vessel, request }: { vessel: string; request: BeginRunRequest }) {
  const [checks, setChecks] = useState<readonly DoorCheck[] | null>(null);
  const [problem, setProblem] = useState<ProblemError | null>(null);
  const asked = JSON.stringify({ load: request.load, cycle: request.cycle });
  const [turn, setTurn] = useState(0);
  useEffect(() => {
    const stop = new AbortController();
    const timer = setTimeout(() => {
      postJson<DoorChecks>(vesselDoorChecksPath(vessel), JSON.parse(asked), stop.signal).then(
        (answer) => {
          setChecks(answer.checks);
          setProblem(null);
        },
        (error: unknown) => {
          if (!isAborted(error)) setProblem(asProblem(error));
        },
      );
    }, LOOKED_AFTER_MS);
    return () => {
      clearTimeout(timer);
      stop.abort();
    };
  }, [vessel, asked, turn]);
  return (
    <section class="section">
      <h2>Before the door closes</h2>
      <p>Told, not enforced: a run can begin all the same, and what was told stays on record.</p>
      {problem && <Problem problem={problem} again={() => setTurn(turn + 1)} />}
      <ul class="door-checks" aria-live="polite">
        {checks?.toSorted(worstFirst).map((check) => (
          <li key={check.check}>
            <span class="check-mark">
              <OutcomeMark mark={MARKS[check.outcome]} />
            </span>
            <p>
              <b>
                {CHECK_WORDS[check.check] ?? raised(check.check.replaceAll('-', ' '))}: {OUTCOME_WORDS[check.outcome]}.
              </b>{' '}
              {sentence(check.because)}
            </p>
          </li>
        ))}
      </ul>
      <button type="button" class="quiet" onClick={() => setTurn(turn + 1)}>
        Look again
      </button>
    </section>
  );
}

const MARKS = { 'in-order': 'met', 'not-in-order': 'not-met', 'not-on-record': 'cannot-tell' } as const;
const OUTCOME_WORDS = {
  'in-order': 'in order',
  'not-in-order': 'not in order',
  'not-on-record': 'not on record',
} as const;

const CHECK_WORDS: Readonly<Record<string, string>> = {
  'sensors-agree': 'Sensors agree at ambient',
  calibration: 'Calibration in date',
  survey: 'Uniformity survey in date',
  'material-life': 'Material in life at the planned start',
  'leak-test': 'Leak test recorded',
  'enough-sensors': 'Enough sensors for the cycle',
  'sources-sending': 'Sources send',
};

const ORDER: readonly DoorCheck['outcome'][] = ['not-in-order', 'not-on-record', 'in-order'];

function worstFirst(a: DoorCheck, b: DoorCheck): number {
  return ORDER.indexOf(a.outcome) - ORDER.indexOf(b.outcome);
}
