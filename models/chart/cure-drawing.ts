import type { PartEvaluation } from '../evaluation/evaluation.ts';
import type { Dot, LineRole, Strip } from './chart.ts';
import type { CureCourse } from './chart-inputs.ts';
import type { ClockTime } from './clock-time.ts';
import { decimate } from './decimate.ts';
import { labelOfLine } from './line-roles.ts';
import type { DrawnLine } from './lines.ts';
import { type Conversion, converted, drawn } from './shown-unit.ts';
import { hoursAt, lineHours, type TimeScale } from './time-scale.ts';

interface CureLine {
  readonly strip: Extract<Strip, 'cure' | 'tg'>;
  readonly figures: Float64Array;
  readonly conversion: Conversion;
}

/** Estimated degree of cure and Tg along each channel. */
export function cureLines(
  courses: readonly CureCourse[],
  roleOf: (channel: string) => LineRole,
  tgConversion: Conversion,
  scale: TimeScale,
  options: { readonly points: number; readonly longestGapMs: number },
): DrawnLine[] {
  return courses.flatMap((course) =>
    linesOf(course, tgConversion).map(({ strip, figures, conversion }): DrawnLine => {
      const { fromMs, untilMs } = scale;
      const kept = decimate(course.timeMs, figures, { ...options, fromMs, untilMs });
      const role = roleOf(course.channel);
      return {
        line: {
          channel: course.channel,
          strip,
          role,
          state: 'working',
          excludedFromH: null,
          label: labelOfLine(course.channel, role),
          hours: lineHours(scale, kept.timeMs),
          value: Array.from(kept.value, (value) => (Number.isNaN(value) ? null : drawn(converted(value, conversion)))),
        },
        gaps: [],
      };
    }),
  );
}

function linesOf({ degree, tgC }: CureCourse, tgConversion: Conversion): CureLine[] {
  const lines: CureLine[] = [{ strip: 'cure', figures: degree, conversion: { slope: 1, intercept: 0 } }];
  if (tgC !== null) lines.push({ strip: 'tg', figures: tgC, conversion: tgConversion });
  return lines;
}

/** Estimated gel and vitrification on the degree's course; each kind is written out once, at its last. */
export function cureDots(
  part: PartEvaluation,
  courses: readonly CureCourse[],
  clock: ClockTime,
  scale: TimeScale,
): Dot[] {
  return (['gel', 'vitrification'] as const).flatMap((kind) => {
    const came = part.cure
      .flatMap(({ channel, gelAt, vitrifiesAt }) => {
        const course = courses.find((one) => one.channel === channel);
        const instant = kind === 'gel' ? gelAt : vitrifiesAt;
        return course === undefined || instant === null ? [] : [{ channel, course, ms: Date.parse(instant) }];
      })
      .sort((a, b) => a.ms - b.ms);
    return came.map(({ channel, course, ms }, i): Dot => {
      const isLast = i === came.length - 1;
      return {
        ...{ kind, channel, strip: 'cure' },
        atH: hoursAt(scale, ms),
        value: drawn(degreeAt(course, ms)),
        text: isLast ? dotText(kind, came, clock) : '',
      };
    });
  });
}

/** `TC3 gels 11:29`, or where several do: `gel 11:21 (TC1) to 11:29 (TC3)`. */
function dotText(
  kind: Dot['kind'],
  came: readonly { readonly channel: string; readonly ms: number }[],
  clock: ClockTime,
): string {
  const [first, last] = [came[0]!, came.at(-1)!];
  if (came.length === 1) return `${last.channel} ${kind === 'gel' ? 'gels' : 'vitrifies'} ${clock.minute(last.ms)}`;
  return `${kind} ${clock.minute(first.ms)} (${first.channel}) to ${clock.minute(last.ms)} (${last.channel})`;
}

/** Degree of cure at an instant, on the straight line between scans, held beyond the ends. */
function degreeAt({ timeMs, degree }: CureCourse, ms: number): number {
  const after = timeMs.findIndex((t) => t >= ms);
  if (after === 0) return degree[0] ?? 0;
  if (after < 0) return degree.at(-1) ?? 0;
  const share = (ms - timeMs[after - 1]!) / (timeMs[after]! - timeMs[after - 1]!);
  return degree[after - 1]! + share * (degree[after]! - degree[after - 1]!);
}
