import type { PartRun } from '../../server/contract/parts.ts';
import { runFilePath } from '../../server/contract/paths.ts';
import { clock, lasting } from '../words/clock.ts';
import { asWritten, bytes, count, figure, listed, plain } from '../words/figures.ts';
import { limitName, observedFigure, worstFirst } from '../words/limits.ts';
import { zone } from '../workshop.ts';
import { Entry } from './notebook.tsx';
import { OutcomeMark } from './outcome-mark.tsx';
import { RunState } from './run-entry.tsx';
import { When } from './when.tsx';

/** One cure of a part: how it was judged and by what, with whom it lay, and the bytes it rests on. */
export function PartRunEntry({ run }: { run: PartRun }) {
  const { line } = run;
  return (
    <Entry when={<When at={line.from} />}>
      <div class="head">
        <a href={`/runs/${line.run}`}>Run {line.run}</a>
        <RunState line={run.evaluation ? { ...line, verdict: run.evaluation.verdict } : line} />
      </div>
      {run.evaluation && <Findings evaluation={run.evaluation} />}
      <dl class="facts">
        <dt>Vessel</dt>
        <dd>
          {line.vessel ?? 'not on record'}, {clock(line.from, zone.value)} to {clock(line.until, zone.value)},{' '}
          {lasting(Date.parse(line.until) - Date.parse(line.from))}
        </dd>
        <dt>Cycle</dt>
        <dd>
          {line.cycle ? (
            <a href={`/cycles/${encodeURIComponent(line.cycle.code)}/${encodeURIComponent(line.cycle.issue)}`}>
              {line.cycle.code} issue {line.cycle.issue}
            </a>
          ) : (
            'not on record'
          )}
          {run.cycleSha256 && (
            <>
              {' '}
              <code class="soft">{run.cycleSha256.slice(0, 12)}</code>
            </>
          )}
        </dd>
        <dt>Work order</dt>
        <dd>{run.workOrder ?? 'not on record'}</dd>
        <dt>Judged by</dt>
        <dd>{judgedBy(run)}</dd>
        <dt>Bag line</dt>
        <dd>{run.bagLine ?? 'not named'}</dd>
        <dt>Leak test</dt>
        <dd>
          {run.leakTest
            ? `${asWritten(run.leakTest.start)} to ${asWritten(run.leakTest.end)} in ${asWritten(run.leakTest.minutes, 'min')}`
            : 'not on record'}
        </dd>
        <dt>Load-mates</dt>
        <dd>
          {run.loadMates.length === 0
            ? 'none'
            : run.loadMates.map((serial, n) => (
                <span key={serial}>
                  {n > 0 && ', '}
                  <a href={`/parts/${encodeURIComponent(serial)}`}>{serial}</a>
                </span>
              ))}
        </dd>
        {run.evaluation && run.evaluation.cure.length > 0 && (
          <>
            <dt>Estimated at its end</dt>
            <dd>{estimates(run)}</dd>
          </>
        )}
        <dt>Files</dt>
        <dd>
          {run.files.map((file) => (
            <span class="breakable" key={file.n}>
              <a href={runFilePath(line.run, file.n)} download={file.name}>
                {file.name}
              </a>{' '}
              {bytes(file.bytes)}, SHA-256 <code class="soft">{file.sha256}</code>
              <br />
            </span>
          ))}
        </dd>
      </dl>
      {run.decisions.map((decision) => (
        <p key={decision.deed.at + decision.channel}>
          {decision.channel} {decision.decision === 'exclude' ? 'excluded' : 'kept'} by {decision.deed.by}:{' '}
          {decision.reason}
        </p>
      ))}
    </Entry>
  );
}

function Findings({ evaluation }: { evaluation: NonNullable<PartRun['evaluation']> }) {
  const open = worstFirst(evaluation.findings).filter(({ outcome }) => outcome !== 'met');
  const met = evaluation.findings.length - open.length;
  return (
    <ul class="plain-list">
      {open.map((finding) => (
        <li key={finding.limit} class="finding-line">
          <OutcomeMark mark={finding.outcome} alone />
          <span>
            <b>
              {limitName(finding.limit)}: {observedFigure(finding)}
            </b>{' '}
            {finding.because}
          </span>
        </li>
      ))}
      <li class="finding-line">
        <OutcomeMark mark="met" alone />
        <span>{open.length === 0 ? `All ${count(met, 'limit')} met.` : `${count(met, 'other limit')} met.`}</span>
      </li>
    </ul>
  );
}

function judgedBy(run: PartRun): string {
  const judged = run.evaluation?.judgedBy ?? [];
  const own = run.sensors.map(({ channel, place, sharedWith }) =>
    [channel, place && `(${place})`, sharedWith.length > 0 && `shared with ${listed(sharedWith)}`]
      .filter(Boolean)
      .join(' '),
  );
  if (own.length > 0) return own.join('; ');
  return judged.length > 0 ? `${listed(judged)}, none of them its own` : 'no thermocouple on record';
}

function estimates(run: PartRun): string {
  const cure = run.evaluation?.cure ?? [];
  const least = cure.reduce((a, b) => (b.degree < a.degree ? b : a));
  const tg = least.tgC === null ? '' : `, Tg ${figure(least.tgC, '°C', 0)}`;
  return `degree of cure ${plain(least.degree, 2)}${tg}, least at ${least.channel}; from a model, not measured`;
}
