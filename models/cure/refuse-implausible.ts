import { refuse } from '../document.ts';
import { kelvinFromCelsius } from '../units.ts';
import { refuseImplausibleRates } from './implausible-rates.ts';
import { arrhenius } from './laws/arrhenius.ts';
import type { Resin } from './resin.ts';

/**
 * Refuses figures that are possible but look like another unit or a lost sign, unless `source.confirmed` says in words
 * that the source prints them so.
 */
export function refuseImplausible(resin: Resin): void {
  if (resin.source.confirmed !== undefined) return;
  refuseKelvinTg(resin);
  refuseFahrenheitRange(resin);
  refuseCelsiusLine(resin);
  refuseLostSign(resin);
  refuseImplausibleRates(resin, CONFIRM);
}

const CONFIRM = 'if the source prints it so, say so in source.confirmed';

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

/** Uncured resins are glasses below 190 °C; −80 °C in K is 193. */
function refuseKelvinTg({ glassTransition }: Resin): void {
  if (glassTransition === undefined || glassTransition.tg0C < 190) return;
  refuse(
    'glassTransition.tg0C',
    `a temperature in °C below 190: this looks like K, take 273.15 off it and off tgInfC; ${CONFIRM}`,
    glassTransition.tg0C,
  );
}

/** Only resins for hot structures, whose Tg says so, are cured beyond 320 °C; 180 °C in °F is 356. */
function refuseFahrenheitRange({ validC, glassTransition }: Resin): void {
  if (validC === undefined || validC[1] <= 320 || (glassTransition?.tgInfC ?? 0) >= 300) return;
  refuse(
    'validC',
    `temperatures in °C: ${validC[1]} °C is beyond what such a resin is cured at. Is it °F? ${CONFIRM}`,
    validC,
  );
}
