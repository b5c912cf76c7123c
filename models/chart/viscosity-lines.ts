import type { LineRole } from './chart.ts';
import type { CureCourse } from './chart-inputs.ts';
import { decimate } from './decimate.ts';
import { labelOfLine } from './line-roles.ts';
import type { DrawnLine } from './lines.ts';
import { lineHours, type TimeScale } from './time-scale.ts';

/**
 * Pa s up to which a viscosity is drawn. Above, no resin goes anywhere in the time of a cure, and the decades it takes
 * on its way to gel would flatten the rest (common practice: gel is often read where 1000 Pa s are passed).
 */
export const STIFFEST_DRAWN_PA_S = 1000;

export function isDrawn(viscosityPaS: number): boolean {
  return viscosityPaS <= STIFFEST_DRAWN_PA_S;
}

/** Estimated viscosity along each course that has one, in Pa s. */
export function viscosityLines(
  courses: readonly CureCourse[],
  roleOf: (channel: string) => LineRole,
  scale: TimeScale,
  options: { readonly points: number; readonly longestGapMs: number },
): DrawnLine[] {
  return courses.flatMap(({ channel, timeMs, viscosityPaS }): DrawnLine[] => {
    const figures = viscosityPaS?.map((figure) => (isDrawn(figure) ? figure : Number.NaN));
    if (figures === undefined || figures.every(Number.isNaN)) return [];
    const { fromMs, untilMs } = scale;
    const kept = decimate(timeMs, figures, { ...options, fromMs, untilMs });
    const role = roleOf(channel);
    return [
      {
        line: {
          ...{ channel, strip: 'viscosity', role, state: 'working', excludedFromH: null },
          label: labelOfLine(channel, role),
          hours: lineHours(scale, kept.timeMs),
          value: Array.from(kept.value, (value) => (Number.isNaN(value) ? null : fourDigits(value))),
        },
        gaps: [],
      },
    ];
  });
}

/** `4.1`, in Pa s: two digits, for no set knows more. */
export function viscosityFigure(viscosityPaS: number): string {
  return String(Number(viscosityPaS.toPrecision(2)));
}

function fourDigits(value: number): number {
  return Number(value.toPrecision(4));
}
