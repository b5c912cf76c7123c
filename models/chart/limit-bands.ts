import type { Cycle } from '../cycle/cycle.ts';
import { figure } from '../cycle/words-of-figures.ts';
import type { PartEvaluation } from '../evaluation/evaluation.ts';
import type { Band, Strip } from './chart.ts';
import { worstOf } from './outcomes.ts';
import { type Conversion, converted, drawn } from './shown-unit.ts';
import { hoursAt, hoursOf, hoursOrEnd, type TimeScale } from './time-scale.ts';

/** Pressure and vacuum windows between the instants that bounded them, and the ceiling over the whole log. */
export function limitBands(
  cycle: Cycle,
  part: PartEvaluation,
  fromWritten: ReadonlyMap<Strip, Conversion | null>,
  scale: TimeScale,
): Band[] {
  return [...windowBands(cycle, part, fromWritten, scale), ...ceilingBand(cycle, part, fromWritten, scale)];
}

function windowBands(
  cycle: Cycle,
  part: PartEvaluation,
  fromWritten: ReadonlyMap<Strip, Conversion | null>,
  scale: TimeScale,
): Band[] {
  return (cycle.windows ?? []).flatMap((window): Band[] => {
    const record = part.windows.find(({ name }) => name === window.name);
    const fromH = hoursOf(scale, record?.from ?? null);
    const untilH = hoursOrEnd(scale, record?.until ?? null);
    const conversion = fromWritten.get(window.quantity);
    if (fromH === null || untilH < fromH || conversion === undefined) return [];
    const [low, high] = sides(window.atLeast ?? null, window.atMost ?? null, conversion);
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

/** Both sides in the strip's unit; a unit that runs the other way turns them round. */
function sides(
  atLeast: number | null,
  atMost: number | null,
  conversion: Conversion | null,
): readonly [number | null, number | null] {
  if (conversion === null) return [null, null];
  const side = (value: number | null) => (value === null ? null : drawn(converted(value, conversion)));
  return conversion.slope < 0 ? [side(atMost), side(atLeast)] : [side(atLeast), side(atMost)];
}

function ceilingBand(
  cycle: Cycle,
  part: PartEvaluation,
  fromWritten: ReadonlyMap<Strip, Conversion | null>,
  scale: TimeScale,
): Band[] {
  const conversion = fromWritten.get('temperature');
  if (cycle.ceiling === undefined || conversion === undefined || conversion === null) return [];
  return [
    {
      strip: 'temperature',
      kind: 'ceiling',
      fromH: hoursAt(scale, scale.logFromMs),
      untilH: hoursAt(scale, scale.logUntilMs),
      low: null,
      high: drawn(converted(cycle.ceiling, conversion)),
      text: `ceiling ${figure(cycle.ceiling)} ${cycle.units.temperature}`,
      limit: 'ceiling',
      outcome: worstOf(part, ['ceiling']),
    },
  ];
}
