import { CYCLE, LAGGING_TO_FIRST } from './practice-case.ts';

/** A vacuum-bag cure in °F and inHg, and how it is run. */

export const BAGGED_AT_250 = {
  ...CYCLE,
  code: 'VB-250',
  title: 'Vacuum-bag cure at 250 °F',
  units: { temperature: '°F', vacuum: 'inHg' },
  stages: [
    { name: 'heat-up', kind: 'heat', rate: { atLeast: 1, atMost: 5, over: [110, 220], average: 'chord', of: 'every' } },
    {
      name: 'cure',
      kind: 'dwell',
      target: 250,
      plus: 10,
      minus: 10,
      time: { atLeast: 90, atMost: 150 },
      clock: LAGGING_TO_FIRST,
      counting: 'contiguous',
      forgive: { below: { by: 1, for: 3 } },
    },
    {
      name: 'cool-down',
      kind: 'cool',
      rate: { atMost: 6, over: [230, 150], average: 'chord', of: 'every' },
      until: 140,
    },
  ],
  windows: [
    { name: 'bag', quantity: 'vacuum', atLeast: 22, from: { at: 'heat-on' }, until: { at: 'all-cool-to', value: 140 } },
  ],
  ceiling: 275,
} as const;

export const bagged = (targetC: number, leakAt: readonly [number, number] | null) => ({
  programme: {
    segments: [
      { kind: 'soak' as const, minutes: 10 },
      { kind: 'ramp' as const, toC: targetC, cPerMin: 1.5 },
      { kind: 'soak' as const, minutes: 100, onceLaggingC: 115.9 },
      { kind: 'ramp' as const, toC: 35, cPerMin: 2 },
    ],
  },
  lines: [{ name: 'bag', sourceBar: 0.9, pumpMin: 2, leakPerMin: 0.003 }],
  mishaps:
    leakAt === null
      ? []
      : [{ kind: 'bag-leak' as const, line: 'bag', fromMin: leakAt[0], untilMin: leakAt[1], perMin: 0.2 }],
});
