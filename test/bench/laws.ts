import { readFileSync } from 'node:fs';
import { parseResin } from '../../models/cure/parse-resin.ts';
import type { Kinetics, Resin } from '../../models/cure/resin.ts';

const PRACTICE = new URL('../../models/cure/resins/skerry-180.json', import.meta.url);

/** The invented practice resin: Kamal–Sourour with a diffusion factor. */
export const practiceResin: Resin = parseResin(JSON.parse(readFileSync(PRACTICE, 'utf8')));

/** One invented set for each law, that cures over the run of the benchmarks as an autoclave epoxy would. */
export const kineticsByLaw: readonly Kinetics[] = [
  { law: 'nth-order', A: 2.6e4, E: 61300, n: 1.4 },
  { law: 'autocatalytic', A: 7e4, E: 65000, m: 0.5, n: 1.5 },
  { law: 'kamal-sourour', A1: 2600, E1: 61300, A2: 11800, E2: 59200, m: 0.94, n: 1.31 },
  {
    law: 'lee-loos-springer',
    A1: 3.5e7,
    E1: 80700,
    A2: -3.36e7,
    E2: 77800,
    A3: 3270,
    E3: 56600,
    B: 0.47,
    switchDegree: 0.3,
  },
  {
    law: 'two-term',
    A1: 8.2e7,
    E1: 82400,
    m1: 0.75,
    n1: 12,
    A2: 1.04e5,
    E2: 62400,
    m2: 0.9,
    n2: 2.1,
    D: 40,
    alphaC0: -1.12,
    alphaCT: 0.00453,
  },
  {
    law: 'isoconversional',
    degree: [0.01, 0.1, 0.3, 0.6, 0.9, 0.99],
    E: [62000, 61000, 60000, 60500, 63000, 66000],
    lnAf: [7.5, 8.4, 8.6, 8.2, 7.4, 5.2],
  },
];

/** Exponentials of the law at one reading: one for each rate constant it needs. A diffusion factor's is not counted. */
export function exponentialsOf({ law }: Kinetics): number {
  return law === 'kamal-sourour' || law === 'lee-loos-springer' || law === 'two-term' ? 2 : 1;
}

export function resinOf(kinetics: Kinetics): Resin {
  const { diffusion: _, ...practice } = practiceResin;
  return { ...practice, code: kinetics.law, kinetics };
}
