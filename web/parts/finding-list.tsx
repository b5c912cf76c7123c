import { limitTitle } from '../../models/cycle/limits-of-cycle.ts';
import type { Finding, PartEvaluation } from '../../models/evaluation/evaluation.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { asWritten, figure, listed } from '../words/figures.ts';
import { limitName, observedFigure, worstFirst } from '../words/limits.ts';
import { sentence } from '../words/verdicts.ts';
import { OUTCOME_WORDS, OutcomeMark } from './outcome-mark.tsx';

/** What the run shows against each limit for one part, worst first; pointing at one lights its stretch. */
export function FindingList({
  part,
  run,
  lit,
  onLight,
}: {
  part: PartEvaluation;
  run: RunView;
  lit: string | null;
  onLight: (limit: string | null) => void;
}) {
  const rule = run.cycleIssue?.document.decision?.rule ?? 'as-indicated';
  return (
    <section aria-label={`Findings${part.part ? ` for ${part.part}` : ''}, worst first`}>
      <p class="judged-by">
        <b>{part.part ? <a href={`/parts/${encodeURIComponent(part.part)}`}>{part.part}</a> : 'The load'}</b> · judged
        by {part.judgedBy.length > 0 ? listed(part.judgedBy) : 'no thermocouple'}
        {part.ownSensors ? '' : ', none of them its own'}, {rule === 'guarded' ? 'guarded by U' : 'as indicated'}
      </p>
      <ul class="findings">
        {worstFirst(part.findings).map((finding) => (
          <li
            key={finding.limit}
            class={`finding is-${finding.outcome}`}
            data-lit={lit === finding.limit ? 'yes' : 'no'}
          >
            <button
              type="button"
              aria-pressed={lit === finding.limit}
              onPointerEnter={() => onLight(finding.limit)}
              onFocus={() => onLight(finding.limit)}
              onClick={() => onLight(finding.limit)}
            >
              <OutcomeMark mark={finding.outcome} />
              <span class="unseen">{OUTCOME_WORDS[finding.outcome]}: </span>
              <span class="what">{titleOf(run, finding)}</span>
              <span class="figure">{observedFigure(finding)}</span>
            </button>
            <p>{reasonOf(finding)}</p>
          </li>
        ))}
      </ul>
    </section>
  );
}

/** Moves the focus to the finding after the one in focus, and from the last back to the first. */
export function focusNextFinding(list: HTMLElement | null): void {
  const all = [...(list?.querySelectorAll<HTMLButtonElement>('.finding > button') ?? [])];
  // Lists that are there for paper alone are passed by.
  const buttons = all.filter((button) => button.offsetParent !== null);
  const here = buttons.indexOf(document.activeElement as HTMLButtonElement);
  buttons[(here + 1) % buttons.length]?.focus();
}

function titleOf(run: RunView, finding: Finding): string {
  return run.cycleIssue ? limitTitle(run.cycleIssue.document, finding.limit) : limitName(finding.limit);
}

function reasonOf(finding: Finding): string {
  const said = [sentence(finding.because)];
  if (finding.outcome === 'met' && finding.margin !== null && finding.unit !== '') {
    said.push(`${figure(finding.margin, finding.unit)} to spare.`);
  }
  if (finding.forgiven) said.push('Forgiven, as the cycle allows.');
  if (finding.outcome !== 'met' && finding.possible !== null && finding.possible !== finding.observed) {
    said.push(`${figure(finding.possible, finding.unit)} at best, counting what gaps may hide.`);
  }
  if (finding.uncertainty !== null) said.push(`U (k = 2) ${asWritten(uncertaintyOf(finding), finding.unit)}.`);
  return said.filter(Boolean).join(' ');
}

/** As it was written; one that was worked out with two digits, which is all it bears (JCGM 100, 7.2.6). */
function uncertaintyOf({ limit, uncertainty }: Finding): number {
  return limit.startsWith('cure/') ? Number(uncertainty?.toPrecision(2)) : (uncertainty ?? Number.NaN);
}
