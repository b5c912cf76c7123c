import type { ComponentChildren } from 'preact';
import type { RunLine } from '../../server/contract/runs.ts';
import { lasting } from '../words/clock.ts';
import { listed } from '../words/figures.ts';
import { limitName } from '../words/limits.ts';
import { Entry } from './notebook.tsx';
import { OutcomeMark, VerdictLine } from './outcome-mark.tsx';
import { When } from './when.tsx';

/** A run as one line of the book: when, which, what it came to, and why. */
export function RunEntry({ line, children }: { line: RunLine; children?: ComponentChildren }) {
  return (
    <Entry when={<When at={line.from} />}>
      <div class="head">
        <a href={`/runs/${line.run}`}>Run {line.run}</a>
        <RunState line={line} />
      </div>
      <p class="soft">{aboutRun(line)}</p>
      {whyOf(line) && <p>{whyOf(line)}</p>}
      {children && <div class="act">{children}</div>}
    </Entry>
  );
}

export function RunState({ line }: { line: RunLine }) {
  if (line.live !== null) return <LiveRunState line={line} />;
  if (line.state === 'awaiting-load' || line.state === 'awaiting-cycle' || line.verdict === null) {
    return (
      <span class="outcome-line outcome-awaits">
        <OutcomeMark mark="awaits" />
        {line.state === 'awaiting-cycle' ? 'Awaits its cycle' : 'Awaits its load'}
      </span>
    );
  }
  return <VerdictLine verdict={line.verdict} />;
}

/** A run that is being logged: what it came to so far is said on its page. */
function LiveRunState({ line }: { line: RunLine }) {
  return (
    <span class="outcome-line outcome-pending">
      <OutcomeMark mark="pending" />
      {line.live === 'ended' ? 'Ended, its record is open' : 'Running'}
    </span>
  );
}

/** `Autoclave 1 · SR-180 issue B · W-2231 · 2 parts · 6 h 31 min` */
export function aboutRun(line: RunLine): string {
  return [
    line.vessel ?? line.recorder,
    line.cycle && `${line.cycle.code} issue ${line.cycle.issue}`,
    line.workOrder,
    partsOf(line.parts),
    lasting(Date.parse(line.until) - Date.parse(line.from)),
  ]
    .filter(Boolean)
    .join(' · ');
}

function partsOf(parts: readonly string[]): string {
  if (parts.length === 0) return '';
  return parts.length <= 3 ? listed(parts) : `${parts[0]}, ${parts[1]} and ${parts.length - 2} more`;
}

function whyOf(line: RunLine): string {
  const names = (limits: readonly string[]) => {
    const shown = limits.slice(0, 3).map(limitName);
    return limits.length > 3 ? `${shown.join('; ')} and ${limits.length - 3} more` : shown.join('; ');
  };
  const said = [
    line.notMet.length > 0 ? `Not met: ${names(line.notMet)}.` : '',
    line.cannotTell.length > 0 ? `Cannot tell: ${names(line.cannotTell)}.` : '',
  ];
  return said.filter(Boolean).join(' ');
}
