import type { Warning } from '../../server/contract/live.ts';
import { warningAcknowledgePath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { clock, dayAndClock } from '../words/clock.ts';
import { sentence } from '../words/verdicts.ts';
import { zone } from '../workshop.ts';
import { Problem } from './problem.tsx';
import { WarningMark } from './warning-mark.tsx';

/** Warnings nobody has acknowledged, latest first, each with the one tap that does. */
export function WarningStrip({ warnings, onTaken }: { warnings: readonly Warning[]; onTaken?: () => void }) {
  const open = warnings.filter(({ acknowledged }) => acknowledged === null);
  if (open.length === 0) return null;
  const latestFirst = open.toSorted((a, b) => Date.parse(b.began) - Date.parse(a.began));
  return (
    <section class="warning-strip" aria-label="Warnings">
      <ul>
        {latestFirst.slice(0, 4).map((warning) => (
          <WarningLine key={warning.id} warning={warning} onTaken={onTaken} />
        ))}
      </ul>
      {open.length > 4 && (
        <p>
          <a href="/warnings">{open.length - 4} more warnings</a>
        </p>
      )}
    </section>
  );
}

export function WarningLine({ warning, onTaken }: { warning: Warning; onTaken?: (() => void) | undefined }) {
  const taking = usePost(async () => {
    await postJson<unknown>(warningAcknowledgePath(warning.id), {});
    onTaken?.();
  });
  return (
    <li class="warning" data-lasts={warning.over === null ? 'yes' : 'no'}>
      <WarningMark kind={warning.kind} />
      <div>
        <p>
          <b>{WARNING_WORDS[warning.kind]}</b>
          {warning.vessel && ` · ${warning.vessel}`}
          {warning.run !== null && (
            <>
              {' · '}
              <a href={`/runs/${warning.run}`}>run {warning.run}</a>
            </>
          )}
        </p>
        <p>{sentence(warning.text)}</p>
        <p class="soft small">
          Since {dayAndClock(warning.began, zone.value)}
          {warning.over !== null && `, over at ${clock(warning.over, zone.value)}`}
          {warning.acknowledged &&
            ` · acknowledged by ${warning.acknowledged.by}, ${dayAndClock(warning.acknowledged.at, zone.value)}`}
        </p>
        {taking.problem && <Problem problem={taking.problem} />}
      </div>
      {warning.acknowledged === null && (
        <button type="button" disabled={taking.isUnderWay} onClick={() => void taking.post()}>
          Acknowledge
          <span class="unseen">: {warning.text}</span>
        </button>
      )}
    </li>
  );
}

export const WARNING_WORDS: Readonly<Record<Warning['kind'], string>> = {
  'approaching-limit': 'A limit is near',
  'limit-broken': 'A limit is broken',
  'sensor-fault': 'A sensor may lie',
  'source-silent': 'A source is silent',
  'disk-low': 'The disk is nearly full',
  'cannot-be-kept': 'Readings cannot be kept',
  'clock-jumped': 'The clock jumped',
  'program-restarted': 'The program was restarted',
  damaged: 'What was kept is damaged',
};
