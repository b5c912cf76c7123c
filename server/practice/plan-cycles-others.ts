import type { Cycle } from '../../models/cycle/cycle.ts';

/** Oven, press and heat-blanket cycles of Skerry Row. Every figure is invented; none is a recommendation. */

/** Radomes under a vacuum bag alone, in the units of the drawing: °F and inHg. */
export const RD_250_A: Cycle = {
  format: 'dwellbook-cycle/1',
  code: 'RD-250',
  issue: 'A',
  title: 'Oven cure of instrument radomes under vacuum bag',
  origin: { document: 'SR-PS-030', issue: '1', clause: '4.2' },
  units: { temperature: '°F', vacuum: 'inHg' },
  judgedBy: 'part',
  stages: [
    {
      name: 'heat-up',
      kind: 'heat',
      rate: { atLeast: 1, atMost: 5, over: [120, 230], average: 'window', window: 15, of: 'every' },
    },
    {
      name: 'cure',
      kind: 'dwell',
      target: 250,
      plus: 10,
      minus: 10,
      time: { atLeast: 90, atMost: 150 },
      clock: { opens: 'lagging-enters', closes: 'first-leaves' },
      counting: 'contiguous',
      forgive: { below: { by: 2, for: 5 } },
    },
    {
      name: 'cool-down',
      kind: 'cool',
      rate: { atMost: 5, over: [230, 150], average: 'chord', of: 'every' },
      until: 140,
    },
  ],
  windows: [
    {
      name: 'bag vacuum',
      quantity: 'vacuum',
      atLeast: 22,
      from: { at: 'heat-on' },
      until: { at: 'all-cool-to', value: 140 },
    },
  ],
  ceiling: 275,
  spread: { atMost: 18, during: 'dwells', after: 15 },
  sensors: { workingAtLeast: 2 },
  leakTest: { startAtLeast: 25, over: 5, lossAtMost: 2 },
  cure: { resin: 'skerry-120', degreeAtLeast: 0.85 },
};

/** Free-standing post-cure of struts, slow enough that the glass transition stays ahead of the oven. */
export const PC_190_A: Cycle = {
  format: 'dwellbook-cycle/1',
  code: 'PC-190',
  issue: 'A',
  title: 'Free-standing post-cure',
  origin: { document: 'SR-PS-015', issue: '2', clause: '7' },
  units: { temperature: '°C', rate: '°C/h' },
  judgedBy: 'part',
  stages: [
    {
      name: 'heat-up',
      kind: 'heat',
      rate: { atMost: 50, over: [100, 180], average: 'window', window: 20, of: 'every' },
    },
    {
      name: 'post-cure',
      kind: 'dwell',
      target: 190,
      plus: 6,
      minus: 5,
      time: { atLeast: 180, atMost: 300 },
      clock: { opens: 'lagging-enters', closes: 'first-leaves' },
      counting: 'accumulated',
      forgive: { below: { by: 1, for: 5 } },
    },
    {
      name: 'cool-down',
      kind: 'cool',
      rate: { atMost: 120, over: [180, 80], average: 'chord', of: 'every' },
      until: 70,
    },
  ],
  ceiling: 200,
  sensors: { workingAtLeast: 2 },
  log: { longestGap: 10, changesAtMost: 5 },
};

/** Radome skins in the heated press: force written as pressure on the skin, in MPa. */
export const RD_130_B: Cycle = {
  format: 'dwellbook-cycle/1',
  code: 'RD-130',
  issue: 'B',
  title: 'Press cure of radome skins',
  origin: { document: 'SR-PS-031', issue: '5', clause: '3' },
  units: { temperature: '°C', pressure: 'MPa' },
  judgedBy: 'part',
  stages: [
    { name: 'heat-up', kind: 'heat', rate: { atLeast: 1, atMost: 6, over: [50, 115], average: 'chord', of: 'every' } },
    {
      name: 'cure',
      kind: 'dwell',
      target: 130,
      plus: 4,
      minus: 4,
      time: { atLeast: 60, atMost: 90 },
      clock: { opens: 'lagging-enters', closes: 'first-leaves' },
      counting: 'each',
      below: 'not-allowed',
      forgive: { below: { by: 1, for: 2 } },
    },
    { name: 'cool-down', kind: 'cool', rate: { atMost: 6, over: [120, 70], average: 'chord', of: 'every' }, until: 60 },
  ],
  windows: [
    {
      name: 'closing pressure',
      quantity: 'pressure',
      atLeast: 0.65,
      atMost: 0.85,
      from: { at: 'all-reach', value: 90 },
      until: { at: 'all-cool-to', value: 70 },
      forgive: { by: 0.05, for: 1 },
    },
  ],
  ceiling: 140,
  sensors: { workingAtLeast: 2 },
  cure: { resin: 'skerry-120', degreeAtLeast: 0.88 },
  material: { outLife: true },
};

/** Repairs under a heat blanket: vacuum kept to the end, the coldest thermocouple counts. */
export const HB_200_A: Cycle = {
  format: 'dwellbook-cycle/1',
  code: 'HB-200',
  issue: 'A',
  title: 'Heat-blanket repair',
  origin: { document: 'SR-PS-040', issue: '1', clause: '8' },
  units: { temperature: '°F', vacuum: 'inHg' },
  judgedBy: 'part',
  stages: [
    {
      name: 'heat-up',
      kind: 'heat',
      rate: { atLeast: 0.5, atMost: 5, over: [100, 170], average: 'chord', of: 'every' },
    },
    {
      name: 'repair dwell',
      kind: 'dwell',
      target: 200,
      plus: 15,
      minus: 10,
      time: { atLeast: 240, atMost: 330 },
      clock: { opens: 'lagging-enters', closes: 'first-leaves' },
      counting: 'accumulated',
      forgive: { below: { by: 3, for: 10, times: 3 } },
    },
    {
      name: 'cool-down',
      kind: 'cool',
      rate: { atMost: 6, over: [180, 120], average: 'chord', of: 'every' },
      until: 110,
    },
  ],
  windows: [
    {
      name: 'bag vacuum',
      quantity: 'vacuum',
      atLeast: 20,
      from: { at: 'start', plus: 10 },
      until: { at: 'all-cool-to', value: 120 },
      forgive: { by: 2, for: 5 },
    },
  ],
  ceiling: 225,
  sensors: { workingAtLeast: 2 },
  log: { longestGap: 5 },
};
