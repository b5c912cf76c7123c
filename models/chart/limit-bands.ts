import type { Cycle } from '../cycle/cycle.ts';
import { figure } from '../cycle/words-of-figures.ts';
import type { PartEvaluation } from '../evaluation/evaluation.ts';
import type { Band, Strip } from './chart.ts';
import { worstOf } from './outcomes.ts';
import { hoursAt, hoursOf, hoursOrEnd, type TimeScale } from './time-scale.ts';

/** Pressure and vacuum windows between the instants that bounded them, and the ceiling over the whole log. */
export function limitBands(
  cycle: Cycle,
  part: PartEvaluation,
  inWritten: ReadonlySet<Strip>,
  scale: TimeScale,
): Band[] {
  return [...windowBands(cycle, part, inWritten, scale), ...ceilingBand(cycle, part, scale)];
}

function windowBands(cycle: Cycle, part: PartEvaluation, inWritten: ReadonlySet<Strip>, scale: TimeScale): Band[] {
  return (cycle.windows ?? []).flatMap((window): Band[] => {
    const record = part.windows.find(({ name }) => name === window.name);
    const fromH = hoursOf(scale, record?.from ?? null);
    const untilH = hoursOrEnd(scale, record?.until ?? null);
    if (fromH === null || untilH < fromH) return [];
    const hasLevel = inWritten.has(window.quantity);
    const low = hasLevel ? (window.atLeast ?? null) : null;
    const high = hasLevel ? (window.atMost ?? null) : null;
    const limit = `window/${window.name}`;
    return [
      {
        strip: window.quantity,
        kind: 'window',
        ...{ fromH, untilH, low, high, limit },
        text: window.name,
        outcome: worstOf(part, [limit]),
      },
    ];
  });
}

function ceilingBand(cycle: Cycle, part: PartEvaluation, scale: TimeScale): Band[] {
  if (cycle.ceiling === undefined) return [];
  return [
    {
      strip: 'temperature',
      kind: 'ceiling',
      fromH: hoursAt(scale, scale.logFromMs),
      untilH: hoursAt(scale, scale.logUntilMs),
      low: null,
      high: cycle.ceiling,
      text: `ceiling ${figure(cycle.ceiling)} ${cycle.units.temperature}`,
      limit: 'ceiling',
      outcome: worstOf(part, ['ceiling']),
    },
  ];
}
