import { say } from '../evaluation/finding.ts';
import { decimalsOf } from '../evaluation/pressure-scale.ts';
import type { VoidGrowth } from './chart-inputs.ts';
import type { ClockTime } from './clock-time.ts';
import { decimate } from './decimate.ts';
import type { DrawnLine } from './lines.ts';
import { type Conversion, converted, drawn, pressureConversion } from './shown-unit.ts';
import { lineHours, type TimeScale } from './time-scale.ts';
import { wholeMinutes } from './whole-minutes.ts';

const NAME = 'void guide';

/** From absolute Pa to the unit of the pressure strip; null without that strip, or the barometer it takes. */
export function voidConversion(unit: string | undefined, barometerPa: number | null): Conversion | null {
  return unit === undefined ? null : pressureConversion('pressure', 'Pa abs', unit, barometerPa);
}

/** Least resin pressure against void growth, as a thin line on the pressure strip. */
export function voidLine(
  { timeMs, leastPa }: VoidGrowth,
  conversion: Conversion,
  scale: TimeScale,
  options: { readonly points: number; readonly longestGapMs: number },
): DrawnLine {
  const { fromMs, untilMs } = scale;
  const kept = decimate(timeMs, leastPa, { ...options, fromMs, untilMs });
  return {
    line: {
      ...{ channel: NAME, strip: 'pressure', role: 'guide', state: 'working', excludedFromH: null, label: NAME },
      hours: lineHours(scale, kept.timeMs),
      value: Array.from(kept.value, (pa) => (Number.isNaN(pa) ? null : drawn(converted(pa, conversion)))),
    },
    gaps: [],
  };
}

/** What the line is and where it ends, and how the vessel's pressure stood against it: facts, no verdict. */
export function voidWords(
  growth: VoidGrowth,
  unit: string | undefined,
  conversion: Conversion | null,
  clock: ClockTime,
): string[] {
  const { humidityPercent, most, gelMs } = growth;
  const shownIn = conversion === null ? 'bar abs' : (unit ?? '');
  const figure = converted(most.leastPa, conversion ?? { slope: 1e-5, intercept: 0 });
  const named = shownIn.endsWith(' abs') ? shownIn : `${shownIn} gauge`;
  const needed = `${say(figure, Math.max(1, decimalsOf(shownIn) - 1))} ${named}`;
  const end = gelMs === null ? 'the end of the log, before gel' : `gel at ${clock.minute(gelMs)}`;
  const line = conversion === null ? 'The' : `The thin line “${NAME}” on the pressure strip is the`;
  return [
    `${line} least resin pressure at which voids of water vapour do not grow at ${humidityPercent} % relative humidity ` +
      `of the lay-up (Kardos, Duduković and Dave), by the hottest judged sensor that has not gelled${conversion === null ? ', is' : ':'} ` +
      `at most ${needed}, at ${clock.minute(most.atMs)}. The pressure in the resin falls below the one applied as the fibre bed ` +
      'takes up load: a guide, never a limit.',
    conversion === null && unit !== undefined
      ? 'The barometer of the day is not on record, so the gauge pressure of the vessel cannot be set against it.'
      : againstWords(growth, needed, end, clock),
  ];
}

/** Stretches named before the rest are only counted. */
const NAMED = 3;

function againstWords({ vessel }: VoidGrowth, needed: string, end: string, clock: ClockTime): string {
  if (vessel === null) return 'No vessel pressure that could be set against it is on record.';
  if (vessel.below.length === 0) {
    return `The vessel pressure stayed above the least resin pressure of ${needed} from ${clock.minute(vessel.fromMs)} to ${end}.`;
  }
  const minutes = vessel.below.reduce((sum, { fromMs, untilMs }) => sum + (untilMs - fromMs) / 60_000, 0);
  const stretches = vessel.below
    .slice(0, NAMED)
    .map(({ fromMs, untilMs }) => `${clock.minute(fromMs)} to ${clock.minute(untilMs)}`);
  const more = vessel.below.length - stretches.length;
  return (
    `The vessel pressure lay below the least resin pressure for ${wholeMinutes(minutes)} min before ${end}: ` +
    `${stretches.join(', ')}${more > 0 ? ` and ${more} times more` : ''}.`
  );
}
