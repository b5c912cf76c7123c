import { refuse } from '../document.ts';
import { kelvinFromCelsius } from '../units.ts';
import { beginCure } from './cure-progress.ts';
import { arrhenius } from './laws/arrhenius.ts';
import type { Resin } from './resin.ts';

/**
 * Refuses figures that are possible but look like another unit or a lost sign, unless `source.confirmed` says in words
 * that the source prints them so. The bounds come from the sets gathered for autoclave, oven and out-of-autoclave
 * epoxies: there half of a cure at the hottest valid temperature takes 2 to 25 min, 60 times less if 1/min is taken for
 * 1/s. Very fast resins (frontal, room-temperature) do exist: theirs is the confirmation.
 */
export function refuseImplausible(resin: Resin): void {
  if (resin.source.confirmed !== undefined) return;
  refuseRatesPerMinute(resin);
  refuseCelsiusLine(resin);
  refuseLostSign(resin);
}

const CONFIRM = 'if the source prints it so, say so in source.confirmed';

/** Two fifths of the cure in less than this at the hottest valid temperature: asked about. */
const HASTY_S = 15;

function refuseRatesPerMinute(resin: Resin): void {
  if (resin.validC === undefined || resin.initialDegree >= 0.4) return;
  const hottestK = kelvinFromCelsius(resin.validC[1]);
  const { glassTransition: _, validC: __, ...kinetics } = resin;
  const trial = beginCure({ ...kinetics, gel: { degree: 0.4 } }, { tolerance: 1e-4 });
  trial.accept(0, hottestK);
  trial.accept(HASTY_S, hottestK);
  if (trial.gelS === null) return;
  refuse(
    'kinetics',
    `rate constants in 1/s: at ${resin.validC[1]} °C, the hottest of validC, degree 0.4 would be reached in ` +
      `${trial.gelS.toPrecision(2)} s. Are they in 1/min? ${CONFIRM}`,
    resin.kinetics,
  );
}

function refuseCelsiusLine({ diffusion, kinetics, validC }: Resin): void {
  const limits = [
    ...(diffusion === undefined ? [] : [{ path: 'diffusion', ...diffusion }]),
    ...(kinetics.law === 'two-term'
      ? [{ path: 'kinetics', alphaC0: kinetics.alphaC0, alphaCT: kinetics.alphaCT }]
      : []),
  ];
  const middleC = validC === undefined ? 120 : (validC[0] + validC[1]) / 2;
  const hottestC = validC === undefined ? 180 : validC[1];
  for (const { path, alphaC0, alphaCT } of limits) {
    const at = (temperatureC: number) => alphaC0 + alphaCT * kelvinFromCelsius(temperatureC);
    if (at(middleC) > 1.5) {
      refuse(
        `${path}.alphaC0`,
        `a line for T in K: alphaC0 + alphaCT T is ${at(middleC).toPrecision(3)} at ${middleC} °C, where diffusion ` +
          `would never be felt. Is it for °C? ${CONFIRM}`,
        alphaC0,
      );
    }
    if (at(hottestC) <= 0.05) {
      refuse(
        `${path}.alphaC0`,
        `a line for T in K: alphaC0 + alphaCT T is ${at(hottestC).toPrecision(3)} at ${hottestC} °C, where diffusion ` +
          `would stop the cure before it starts. ${CONFIRM}`,
        alphaC0,
      );
    }
  }
}

function refuseLostSign({ kinetics, gasConstant, validC }: Resin): void {
  if (kinetics.law !== 'lee-loos-springer') return;
  const { A1, E1, A2, E2, switchDegree } = kinetics;
  if (A2 >= 0) refuse('kinetics.A2', `a number below 0, as in the law of Lee, Loos and Springer; ${CONFIRM}`, A2);
  const hottestK = kelvinFromCelsius(validC?.[1] ?? 180);
  const atSwitch = arrhenius(A1, E1, hottestK, gasConstant) + switchDegree * arrhenius(A2, E2, hottestK, gasConstant);
  if (atSwitch > 0) return;
  refuse('kinetics.A2', 'a first branch that reaches its switch degree; this one stalls before it when hottest', A2);
}
