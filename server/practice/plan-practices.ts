import type { Resin } from '../../models/cure/resin.ts';
import type { Cycle } from '../../models/cycle/cycle.ts';
import { RS_175_A, SR_180_A, SR_180_B } from './plan-cycles-autoclave.ts';
import { HB_200_A, PC_190_A, RD_130_B, RD_250_A } from './plan-cycles-others.ts';
import { SKERRY_120, SKERRY_180 } from './plan-resins.ts';
import type { Programme } from './simulator/programme.ts';
import type { PressureProgramme } from './simulator/vessel-pressure.ts';

/** How the workshop usually runs a cycle: what it tells the controller, and when gas and vents are worked. */
export interface Practice {
  readonly cycle: Cycle;
  readonly resin: Resin;
  readonly programme: Programme;
  readonly pressure: PressureProgramme | null;
  readonly ventsAtBar: number | null;
  /** Whether bags are drawn down: `pumpMin` of a sound line; null where the cycle has no bag. */
  readonly pumpMin: number | null;
}

export const AMBIENT_C = 21;

/** Twenty minutes with the fan on and the pump running, before anything is heated. */
const SETTLE = { kind: 'soak', minutes: 14 } as const;

export const STRUTS_A: Practice = {
  cycle: SR_180_A,
  resin: SKERRY_180,
  programme: {
    segments: [
      SETTLE,
      { kind: 'ramp', toC: 110, cPerMin: 1.7 },
      { kind: 'soak', minutes: 68, onceLaggingC: 104.5 },
      { kind: 'ramp', toC: 178.5, cPerMin: 1.05 },
      { kind: 'soak', minutes: 130, onceLaggingC: 174.5 },
      { kind: 'ramp', toC: 42, cPerMin: 2 },
    ],
  },
  pressure: {
    toBar: 6.7,
    barPerMin: 0.5,
    when: { at: 'lagging-reaches', temperatureC: 50 },
    release: { when: { at: 'hottest-cools-to', temperatureC: 57 }, barPerMin: 0.5 },
  },
  ventsAtBar: 1.2,
  pumpMin: 2.5,
};

export const STRUTS_B: Practice = {
  ...STRUTS_A,
  cycle: SR_180_B,
  programme: {
    segments: [
      SETTLE,
      { kind: 'ramp', toC: 110, cPerMin: 1.7 },
      { kind: 'soak', minutes: 63, onceLaggingC: 105.5 },
      { kind: 'ramp', toC: 178.5, cPerMin: 1.05 },
      { kind: 'soak', minutes: 125, onceLaggingC: 175.5 },
      { kind: 'ramp', toC: 42, cPerMin: 1.9 },
    ],
  },
  pressure: {
    toBar: 7,
    barPerMin: 0.55,
    when: { at: 'lagging-reaches', temperatureC: 48 },
    release: { when: { at: 'hottest-cools-to', temperatureC: 57 }, barPerMin: 0.5 },
  },
  ventsAtBar: 1.5,
};

export const STOCKS: Practice = {
  cycle: RS_175_A,
  resin: SKERRY_180,
  programme: {
    segments: [
      SETTLE,
      { kind: 'ramp', toC: 122, cPerMin: 0.9 },
      { kind: 'soak', minutes: 100, onceLaggingC: 118.5 },
      { kind: 'ramp', toC: 173, cPerMin: 0.7 },
      { kind: 'soak', minutes: 170, onceLaggingC: 169.5 },
      { kind: 'ramp', toC: 45, cPerMin: 1.3 },
    ],
  },
  pressure: {
    toBar: 6.2,
    barPerMin: 0.4,
    when: { at: 'lagging-reaches', temperatureC: 60 },
    release: { when: { at: 'hottest-cools-to', temperatureC: 62 }, barPerMin: 0.4 },
  },
  ventsAtBar: 1.5,
  pumpMin: 3,
};

export const RADOMES: Practice = {
  cycle: RD_250_A,
  resin: SKERRY_120,
  programme: {
    segments: [
      { kind: 'soak', minutes: 20 },
      { kind: 'ramp', toC: 119, cPerMin: 1.1 },
      { kind: 'soak', minutes: 100, onceLaggingC: 116.2 },
      { kind: 'ramp', toC: 40, cPerMin: 1.6 },
    ],
  },
  pressure: null,
  ventsAtBar: null,
  pumpMin: 3,
};

export const POST_CURES: Practice = {
  cycle: PC_190_A,
  resin: SKERRY_180,
  programme: {
    segments: [
      { kind: 'soak', minutes: 5 },
      { kind: 'ramp', toC: 100, cPerMin: 1.5 },
      { kind: 'ramp', toC: 190, cPerMin: 0.7 },
      { kind: 'soak', minutes: 195, onceLaggingC: 185.5 },
      { kind: 'ramp', toC: 40, cPerMin: 1.2 },
    ],
  },
  pressure: null,
  ventsAtBar: null,
  pumpMin: null,
};

export const SKINS: Practice = {
  cycle: RD_130_B,
  resin: SKERRY_120,
  programme: {
    segments: [
      { kind: 'soak', minutes: 3 },
      { kind: 'ramp', toC: 128.2, cPerMin: 2.4 },
      { kind: 'soak', minutes: 66, onceLaggingC: 126.4 },
      { kind: 'ramp', toC: 35, cPerMin: 3.2 },
    ],
  },
  pressure: {
    toBar: 7.5,
    barPerMin: 3,
    when: { at: 'lagging-reaches', temperatureC: 70 },
    first: { toBar: 1, when: { at: 'minute', minute: 2 } },
    release: { when: { at: 'hottest-cools-to', temperatureC: 62 }, barPerMin: 4 },
  },
  ventsAtBar: null,
  pumpMin: null,
};

export const REPAIRS: Practice = {
  cycle: HB_200_A,
  resin: SKERRY_120,
  programme: {
    segments: [
      { kind: 'soak', minutes: 15 },
      { kind: 'ramp', toC: 96, cPerMin: 1.2 },
      { kind: 'soak', minutes: 250, onceLaggingC: 88.5 },
      { kind: 'ramp', toC: 30, cPerMin: 1.5 },
    ],
  },
  pressure: null,
  ventsAtBar: null,
  pumpMin: 2,
};

export const PRACTICES = {
  'struts-a': STRUTS_A,
  'struts-b': STRUTS_B,
  stocks: STOCKS,
  radomes: RADOMES,
  'post-cures': POST_CURES,
  skins: SKINS,
  repairs: REPAIRS,
} as const;
export type PracticeName = keyof typeof PRACTICES;
