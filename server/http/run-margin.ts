import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import type { MarginEntry, Note, RunLine, SensorDecision } from '../contract/runs.ts';

/** What stands in the margin beside a run: what happened when, in order of time. */
export function marginOf(
  run: RunLine,
  evaluation: Evaluation | null,
  decisions: readonly SensorDecision[],
  notes: readonly Note[],
): MarginEntry[] {
  const entries: MarginEntry[] = [
    { at: run.from, kind: 'log', text: 'logging began' },
    ...(run.live === 'running' ? [] : [{ at: run.until, kind: 'log', text: 'logging ended' } as const]),
    ...(evaluation === null ? [] : eventsOf(evaluation)),
    ...decisions.flatMap(({ channel, from, reason }): MarginEntry[] =>
      from === null ? [] : [{ at: from, kind: 'decision', text: `${channel} excluded: ${reason}` }],
    ),
    ...notes.map(({ at, text }): MarginEntry => ({ at, kind: 'note', text })),
  ];
  const once = new Map(entries.map((entry) => [`${entry.at} ${entry.text}`, entry]));
  return [...once.values()].sort((a, b) => Date.parse(a.at) - Date.parse(b.at));
}

/** Parts of one load mostly share their events; where they do not, the part is named. */
function eventsOf({ parts }: Evaluation): MarginEntry[] {
  return parts.flatMap((part) => {
    const whose = parts.length > 1 && part.ownSensors && part.part !== null ? ` (${part.part})` : '';
    const entries: MarginEntry[] = [];
    const add = (at: string | null, kind: MarginEntry['kind'], text: string) => {
      if (at !== null) entries.push({ at, kind, text: `${text}${whose}` });
    };
    add(part.heatOn, 'heat-on', 'heat-on');
    for (const { kind, name, opens, closes, openedBy, closedBy } of part.stages) {
      if (kind !== 'dwell') continue;
      add(opens, 'dwell', `${name} opens${by(openedBy)}`);
      add(closes, 'dwell', `${name} closes${by(closedBy)}`);
    }
    const gel = part.cure.flatMap(({ gelAt, channel }) => (gelAt === null ? [] : [{ gelAt, channel }]));
    gel.sort((a, b) => Date.parse(a.gelAt) - Date.parse(b.gelAt));
    const [first] = gel;
    if (first !== undefined) add(first.gelAt, 'gel', `estimated gel, ${first.channel}`);
    return entries;
  });
}

function by(sensor: string | null): string {
  return sensor === null ? '' : `, ${sensor}`;
}
