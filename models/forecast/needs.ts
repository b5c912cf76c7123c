import { limitTitle } from '../cycle/limits-of-cycle.ts';
import type { Evaluation, PartEvaluation } from '../evaluation/evaluation.ts';
import { iso, say } from '../evaluation/finding.ts';
import { isExcluded, type Judgement } from '../evaluation/judgement.ts';
import type { Forecast } from './forecast.ts';

/** What needs a person now, oldest first: sensors to decide on, sensors that fell silent, limits that are broken. */
export function needsOf(j: Judgement, evaluation: Evaluation, part: PartEvaluation): Forecast['needs'] {
  const sensors = new Set(part.judgedBy);
  const needs = [
    ...evaluation.sensors
      .filter(({ channel, state }) => state === 'suspect' && sensors.has(channel))
      .flatMap(({ channel, faults: [fault] }) =>
        fault === undefined ? [] : [{ text: `Decide on ${channel}: ${fault.because}`, since: fault.from }],
      ),
    ...silent(j),
    ...part.findings
      .filter(({ outcome }) => outcome === 'not-met')
      .map(({ limit, because, until, from }) => ({
        text: `${limitTitle(j.cycle, limit)} is not met: ${because}`,
        since: until ?? from ?? iso(j.log.until)!,
      })),
  ];
  return needs.sort((a, b) => Date.parse(a.since) - Date.parse(b.since));
}

function silent(j: Judgement): { text: string; since: string }[] {
  return j.sensors
    .filter((s) => !isExcluded(s) && j.log.until - s.lastMs > j.longestGapMs)
    .map((s) =>
      s.track.length === 0
        ? { text: `${s.name} has not been read at all.`, since: iso(j.log.from)! }
        : {
            text: `${s.name} has not been read for ${say((j.log.until - s.lastMs) / 60_000, 0)} min.`,
            since: iso(s.lastMs)!,
          },
    );
}
