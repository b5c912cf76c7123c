import type { CoolStage, HeatStage, RateLimit } from '../../models/cycle/cycle.ts';

/** Limits that no made ramp breaks unless a test means it to, in °C/min. */
export const LIMITS = { atLeast: 0.5, atMost: 5 };
export const CHORD = { average: 'chord' } as const;

/** A stage of heating from 50 to 100 °C, of cooling from 170 to 70 °C, with a rate of every sensor unless said otherwise. */
export const heat = (rate: Partial<RateLimit> & Pick<RateLimit, 'average'>): HeatStage => ({
  name: 'heat',
  kind: 'heat',
  rate: { ...LIMITS, over: [50, 100], of: 'every', ...rate },
});
export const cool = (rate: Partial<RateLimit>): CoolStage => ({
  name: 'cool',
  kind: 'cool',
  rate: { ...LIMITS, over: [170, 70], average: 'chord', of: 'every', ...rate },
});
