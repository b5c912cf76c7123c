import type { Dot, Flow, LineRole } from './chart.ts';
import type { CureOfPart } from './chart-inputs.ts';
import type { ClockTime } from './clock-time.ts';
import { cureLines } from './cure-drawing.ts';
import { flowWords } from './estimate-words.ts';
import { flowsOf, thinnestDots } from './flow-drawing.ts';
import type { DrawnLine } from './lines.ts';
import type { Conversion } from './shown-unit.ts';
import { strongCourses } from './strong-courses.ts';
import type { TimeScale } from './time-scale.ts';
import { viscosityLines } from './viscosity-lines.ts';
import { voidConversion, voidLine, voidWords } from './void-drawing.ts';

interface EstimateInputs {
  readonly cure: CureOfPart | undefined;
  readonly roleOf: (channel: string) => LineRole;
  /** From °C to the temperatures' unit. */
  readonly tgConversion: Conversion;
  /** Undefined where there is no pressure strip. */
  readonly pressureUnit: string | undefined;
  readonly barometerPa: number | null;
  readonly isHumidityKnown: boolean;
  /** The set's figures are from memory. */
  readonly isRecalled: boolean;
  readonly clock: ClockTime;
  readonly scale: TimeScale;
  readonly options: { readonly points: number; readonly longestGapMs: number };
}

/** What is drawn and said of the estimates of a part. */
export interface EstimatesDrawn {
  readonly lines: readonly DrawnLine[];
  readonly dots: readonly Dot[];
  readonly flows: readonly Flow[];
  readonly words: readonly string[];
}

/** A course of cure never falls and has no spikes: so many times fewer points draw it as well as a temperature. */
const FEWER_POINTS = 4;
const LEAST_POINTS = 20;

const RECALLED =
  'The figures of the resin set are from memory: for tests and trials, never a limit in a real workshop.';

export function drawEstimates(inputs: EstimateInputs): EstimatesDrawn {
  const { cure, roleOf, tgConversion, pressureUnit, barometerPa, clock, scale } = inputs;
  if (cure === undefined) return { lines: [], dots: [], flows: [], words: [] };
  const { options } = inputs;
  const points = Math.max(LEAST_POINTS, Math.floor(options.points / FEWER_POINTS));
  const { courses, voidGrowth } = cure;
  const strong = strongCourses(courses, roleOf);
  const viscosity = viscosityLines(strong, roleOf, scale, options);
  const conversion = voidConversion(pressureUnit, barometerPa);
  return {
    lines: [
      ...cureLines(courses, roleOf, tgConversion, scale, { ...options, points }),
      ...viscosity,
      ...(voidGrowth === null || conversion === null ? [] : [voidLine(voidGrowth, conversion, scale, options)]),
    ],
    dots: thinnestDots(strong, clock, scale),
    flows: flowsOf(strong, roleOf, viscosity.length > 0, scale),
    words: [
      ...(inputs.isRecalled ? [RECALLED] : []),
      ...flowWords(strong, cure, clock),
      ...(voidGrowth !== null
        ? voidWords(voidGrowth, pressureUnit, conversion, clock)
        : inputs.isHumidityKnown
          ? ['No least resin pressure against void growth is told: it takes a set that says when the resin gels.']
          : []),
    ],
  };
}
