import { autocatalyticRate } from './laws/autocatalytic.ts';
import { diffusionFactor } from './laws/diffusion-factor.ts';
import { isoconversionalRate } from './laws/isoconversional.ts';
import { kamalSourourRate } from './laws/kamal-sourour.ts';
import {
  leeLoosSpringerFirstRate,
  leeLoosSpringerSecondRate,
  leeLoosSpringerStallDegree,
} from './laws/lee-loos-springer.ts';
import { nthOrderRate } from './laws/nth-order.ts';
import { twoTermRate } from './laws/two-term.ts';
import type { Resin } from './resin.ts';

/** The rate of cure of one resin, in as many smooth branches as its law has. */
export interface CureRate {
  readonly resinCode: string;
  /** Degree at which each branch ends and the next begins, rising; the last is Infinity. */
  readonly branchEnds: readonly number[];
  /** dα/dt in 1/s by one branch, also a little beyond its end, so that a step may look past it. */
  readonly rate: (branch: number, temperatureK: number, alpha: number) => number;
  /** Degree below its branch's end that the cure creeps up to and never passes at a temperature; Infinity for none. */
  readonly stallsAt: (branch: number, temperatureK: number) => number;
}

/** The rate of cure that a resin's document describes: its law times its diffusion factor. */
export function cureRate(resin: Resin): CureRate {
  const law = lawOf(resin);
  const { diffusion } = resin;
  if (diffusion === undefined) return law;
  return {
    ...law,
    rate: (branch, temperatureK, alpha) =>
      law.rate(branch, temperatureK, alpha) * diffusionFactor(temperatureK, alpha, diffusion),
  };
}

/** The branch that holds at a degree: a branch holds up to and at its end. */
export function branchAt(rate: CureRate, alpha: number): number {
  let branch = 0;
  while (alpha > rate.branchEnds[branch]!) branch += 1;
  return branch;
}

const neverStalls = () => Number.POSITIVE_INFINITY;

function lawOf({ code: resinCode, kinetics, gasConstant }: Resin): CureRate {
  const oneBranch = { resinCode, branchEnds: [Number.POSITIVE_INFINITY], stallsAt: neverStalls };
  switch (kinetics.law) {
    case 'nth-order':
      return { ...oneBranch, rate: (_, t, alpha) => nthOrderRate(t, alpha, kinetics, gasConstant) };
    case 'autocatalytic':
      return { ...oneBranch, rate: (_, t, alpha) => autocatalyticRate(t, alpha, kinetics, gasConstant) };
    case 'kamal-sourour':
      return { ...oneBranch, rate: (_, t, alpha) => kamalSourourRate(t, alpha, kinetics, gasConstant) };
    case 'two-term':
      return { ...oneBranch, rate: (_, t, alpha) => twoTermRate(t, alpha, kinetics, gasConstant) };
    case 'lee-loos-springer':
      return {
        resinCode,
        branchEnds: [kinetics.switchDegree, Number.POSITIVE_INFINITY],
        stallsAt: (branch, t) => (branch === 0 ? leeLoosSpringerStallDegree(t, kinetics, gasConstant) : Infinity),
        rate: (branch, t, alpha) =>
          branch === 0
            ? leeLoosSpringerFirstRate(t, alpha, kinetics, gasConstant)
            : leeLoosSpringerSecondRate(t, alpha, kinetics, gasConstant),
      };
    case 'isoconversional':
      return {
        resinCode,
        branchEnds: [...kinetics.degree.slice(1), Number.POSITIVE_INFINITY],
        stallsAt: neverStalls,
        rate: (branch, t, alpha) => isoconversionalRate(t, alpha, kinetics, gasConstant, branch),
      };
  }
}
