import { useState } from 'preact/hooks';
import type { VerdictChange, VerdictProgress } from '../../server/contract/ask.ts';
import { listenTo } from '../event-feed.ts';
import { count } from '../words/figures.ts';
import { limitName } from '../words/limits.ts';
import { Entry } from './notebook.tsx';
import { VerdictLine } from './outcome-mark.tsx';
import { When } from './when.tsx';

interface Answered {
  readonly done: number;
  readonly of: number | null;
  readonly changes: readonly VerdictChange[];
  readonly refused: readonly string[];
  readonly isOver: boolean;
}

const NOTHING: Answered = { done: 0, of: null, changes: [], refused: [], isOver: false };

/** Asks which runs would be judged otherwise, and tells each as it is judged. Nothing of it is stored. */
export function VerdictQuestion({ path, ask }: { path: string; ask: string }) {
  const [answer, setAnswer] = useState<Answered | null>(null);
  const begin = () => {
    setAnswer(NOTHING);
    const stop = listenTo(path, {
      events: {
        progress: ({ done, of, change, refused }: VerdictProgress) =>
          setAnswer((now) => ({
            ...(now ?? NOTHING),
            done,
            of,
            changes: [...(now?.changes ?? []), ...(change === null ? [] : [change])],
            refused: [...(now?.refused ?? []), ...(refused === null ? [] : [refused.because])],
          })),
        refused: ({ detail }: { detail: string }) => {
          stop();
          setAnswer((now) => ({ ...(now ?? NOTHING), refused: [detail], isOver: true }));
        },
        done: () => {
          stop();
          setAnswer((now) => ({ ...(now ?? NOTHING), isOver: true }));
        },
      },
      onLine: () => undefined,
      onLost: () => setAnswer(NOTHING),
    });
  };
  return (
    <>
      <button type="button" disabled={answer !== null && !answer.isOver} onClick={begin}>
        {ask}
      </button>
      {answer && <AnswerShown answer={answer} />}
    </>
  );
}

function AnswerShown({ answer }: { answer: Answered }) {
  const { done, of, changes, refused, isOver } = answer;
  return (
    <div class="section" aria-live="polite">
      {!isOver && of !== null && (
        <>
          <progress value={done} max={Math.max(1, of)} aria-label="Runs judged" />
          <p class="soft">
            {done} of {count(of, 'run')} judged
          </p>
        </>
      )}
      {isOver && of !== null && (
        <p>
          {changes.length === 0
            ? `None of ${count(of, 'run')} would be judged otherwise.`
            : `${changes.length} of ${count(of, 'run')} would be judged otherwise. Nothing of this is stored.`}
        </p>
      )}
      <ul class="entries">
        {changes.map((change) => (
          <ChangeEntry key={change.run} change={change} />
        ))}
      </ul>
      {refused.map((because) => (
        <p key={because}>{because}</p>
      ))}
    </div>
  );
}

function ChangeEntry({ change }: { change: VerdictChange }) {
  return (
    <Entry when={<When at={change.from} />}>
      <div class="head">
        <a href={`/runs/${change.run}`}>Run {change.run}</a>
        <span class="soft">{change.vessel}</span>
      </div>
      {change.parts.map(({ part, was, becomes }) => (
        <p key={part ?? ''}>
          {part ? <a href={`/parts/${encodeURIComponent(part)}`}>{part}</a> : 'The run'}:{' '}
          {was ? <VerdictLine verdict={was} /> : 'not judged'}
          {was === becomes ? ' all the same' : ' would be '}
          {was !== becomes && <VerdictLine verdict={becomes} />}
        </p>
      ))}
      <ul>
        {change.limits.map(({ part, limit, because }) => (
          <li key={`${part} ${limit}`}>
            {limitName(limit)}: {because}
          </li>
        ))}
      </ul>
    </Entry>
  );
}
