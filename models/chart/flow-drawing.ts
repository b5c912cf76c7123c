import type { Dot, Flow, LineRole } from './chart.ts';
import type { CureCourse } from './chart-inputs.ts';
import type { ClockTime } from './clock-time.ts';
import { hoursAt, type TimeScale } from './time-scale.ts';
import { isDrawn, viscosityFigure } from './viscosity-lines.ts';
import { wholeMinutes } from './whole-minutes.ts';

/** Where the resin flows, on the strip of its viscosity, or of its degree where there is none. */
export function flowsOf(
  courses: readonly CureCourse[],
  roleOf: (channel: string) => LineRole,
  hasViscosity: boolean,
  scale: TimeScale,
): Flow[] {
  return courses.flatMap(({ channel, flow }): Flow[] => {
    if (flow === null) return [];
    const minutes = wholeMinutes((flow.untilMs - flow.fromMs) / 60_000);
    return [
      {
        ...{ channel, role: roleOf(channel), strip: hasViscosity ? 'viscosity' : 'cure' },
        fromH: hoursAt(scale, flow.fromMs),
        untilH: hoursAt(scale, flow.untilMs),
        text: `${channel} flows ${minutes} min`,
      },
    ];
  });
}

/** Where the resin is thinnest; written out once, at the last: `thinnest 09:52 to 10:01, 4.1 Pa s`. */
export function thinnestDots(courses: readonly CureCourse[], clock: ClockTime, scale: TimeScale): Dot[] {
  const came = courses
    .flatMap(({ channel, thinnest }) =>
      thinnest === null || !isDrawn(thinnest.viscosityPaS) ? [] : [{ channel, ...thinnest }],
    )
    .sort((a, b) => a.atMs - b.atMs);
  const least = viscosityFigure(Math.min(...came.map(({ viscosityPaS }) => viscosityPaS)));
  const instants = span(came.map(({ atMs }) => clock.minute(atMs)));
  return came.map(
    ({ channel, atMs, viscosityPaS }, i): Dot => ({
      ...{ kind: 'thinnest', strip: 'viscosity', channel },
      atH: hoursAt(scale, atMs),
      value: viscosityPaS,
      text: i === came.length - 1 ? `thinnest ${instants}, ${least} Pa s` : '',
    }),
  );
}

/** The first and the last, or the one where they are the same. */
function span(words: readonly string[]): string {
  const [first, last] = [words[0] ?? '', words.at(-1) ?? ''];
  return first === last ? first : `${first} to ${last}`;
}
