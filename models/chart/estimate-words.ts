import type { CureCourse, CureOfPart, FlowWindow } from './chart-inputs.ts';
import type { ClockTime } from './clock-time.ts';
import { isDrawn, STIFFEST_DRAWN_PA_S, viscosityFigure } from './viscosity-lines.ts';
import { wholeMinutes } from './whole-minutes.ts';

/** When the resin is thinnest and how long it flows, of the courses that are drawn, and where the model ends. */
export function flowWords(
  courses: readonly CureCourse[],
  { viscosity }: Pick<CureOfPart, 'viscosity'>,
  clock: ClockTime,
): string[] {
  const said = courses.flatMap(({ channel, thinnest, flow }) => {
    const claims = [
      ...(flow === null ? [] : [flowClaim(flow, viscosity?.flowsBelowPaS ?? null, clock)]),
      ...(thinnest === null || !isDrawn(thinnest.viscosityPaS)
        ? []
        : [`is thinnest at ${clock.minute(thinnest.atMs)}, ${viscosityFigure(thinnest.viscosityPaS)} Pa s`]),
    ];
    return claims.length === 0 ? [] : [`${channel} ${claims.join('; it ')}.`];
  });
  if (viscosity === null) return said;
  const upTo =
    viscosity.validTo === null
      ? 'it ends at gel'
      : `it was fitted up to a degree of ${viscosity.validTo} and ends there`;
  return [
    ...said,
    `Viscosity is that of the neat resin by its set’s law: ${upTo}; above ${STIFFEST_DRAWN_PA_S} Pa s it is not drawn.`,
  ];
}

function flowClaim(flow: FlowWindow, belowPaS: number | null, clock: ClockTime): string {
  const minutes = wholeMinutes((flow.untilMs - flow.fromMs) / 60_000);
  const mark = flow.by === 'viscosity' ? `${belowPaS} Pa s` : 'its Tg';
  const from = flow.isFromStart
    ? `the first scan, ${flow.by === 'viscosity' ? 'thinner than' : 'warmer than'} ${mark} already,`
    : `${clock.minute(flow.fromMs)}, when ${flow.by === 'viscosity' ? 'its viscosity falls below' : 'the temperature passes'} ${mark},`;
  return `flows for ${minutes} min from ${from} to gel at ${clock.minute(flow.untilMs)}`;
}
