import type { Resin } from '../../models/cure/resin.ts';

/** The resins of the practice workshop. Every figure is invented. */
export const SKERRY_180: Resin = {
  format: 'dwellbook-resin/1',
  code: 'skerry-180',
  name: 'Practice 180 °C epoxy',
  source: { citation: 'invented for practice', status: 'illustrative' },
  validC: [60, 200],
  initialDegree: 0.01,
  gasConstant: 8.314462618,
  kinetics: { law: 'kamal-sourour', A1: 2600, E1: 61300, A2: 11800, E2: 59200, m: 0.94, n: 1.31 },
  diffusion: { law: 'logistic', C: 34, alphaC0: -1.355, alphaCT: 0.00502 },
  glassTransition: { law: 'dibenedetto', tg0C: -8, tgInfC: 221, lambda: 0.58, method: 'DMA, storage modulus onset' },
  gel: { degree: 0.5 },
  viscosity: { law: 'castro-macosko', A: 2.1e-9, E: 68000, gelDegree: 0.5, a: 1.6, b: 1.2, flowsBelow: 100 },
  thermal: { heatOfReaction: 466000, basis: 'resin' },
};

export const SKERRY_120: Resin = {
  format: 'dwellbook-resin/1',
  code: 'skerry-120',
  name: 'Practice 120 °C epoxy',
  source: { citation: 'invented for practice', status: 'illustrative' },
  validC: [50, 150],
  initialDegree: 0.02,
  gasConstant: 8.314462618,
  kinetics: { law: 'autocatalytic', A: 2.05e6, E: 70500, m: 0.52, n: 1.44 },
  glassTransition: { law: 'dibenedetto', tg0C: -4, tgInfC: 138, lambda: 0.5, method: 'DMA, storage modulus onset' },
  gel: { degree: 0.46 },
  thermal: { heatOfReaction: 390000, basis: 'resin' },
};

export const RESINS: readonly Resin[] = [SKERRY_180, SKERRY_120];
