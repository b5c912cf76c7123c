import { minutesAllIn } from '../../../server/practice/simulator/truth.ts';
import { column, inAutoclave, recorder, thermocouples } from './made-of.ts';
import { CYCLE, LAGGING_TO_FIRST, type PracticeCase } from './practice-case.ts';

export const THICK_TOOL_IN_FAHRENHEIT: PracticeCase = {
  name: 'thick-tool-in-fahrenheit',
  what: 'Two parts by one programme; the one on a steel block is short of its dwell',
  plan: inAutoclave({
    run: '17-B',
    startsAt: '2026-07-15T15:02:00Z',
    cycle: {
      ...CYCLE,
      code: 'AC-350',
      title: 'Autoclave cure at 350 °F',
      units: { temperature: '°F', pressure: 'psi', vacuum: 'inHg' },
      stages: [
        { name: 'heat-up', kind: 'heat', rate: { atMost: 6, over: [120, 330], average: 'chord', of: 'every' } },
        {
          name: 'cure',
          kind: 'dwell',
          target: 350,
          plus: 10,
          minus: 10,
          time: { atLeast: 120, atMost: 180 },
          clock: LAGGING_TO_FIRST,
          counting: 'contiguous',
          forgive: { below: { by: 1, for: 4 } },
        },
        {
          name: 'cool-down',
          kind: 'cool',
          rate: { atMost: 6, over: [330, 180], average: 'chord', of: 'every' },
          until: 150,
        },
      ],
      windows: [
        {
          name: 'bag vacuum',
          quantity: 'vacuum',
          atLeast: 22,
          from: { at: 'heat-on' },
          until: { at: 'pressure-reaches', value: 15 },
        },
        {
          name: 'gas',
          quantity: 'pressure',
          atLeast: 85,
          atMost: 105,
          from: { at: 'all-reach', value: 220 },
          until: { at: 'all-cool-to', value: 150 },
        },
      ],
      ceiling: 375,
    },
    programme: {
      segments: [
        { kind: 'soak', minutes: 12 },
        { kind: 'ramp', toC: 176.7, cPerMin: 1.7 },
        { kind: 'soak', minutes: 119 },
        { kind: 'ramp', toC: 40, cPerMin: 2.2 },
      ],
    },
    pressure: {
      toBar: 6.6,
      barPerMin: 0.6,
      when: { at: 'minute', minute: 42 },
      release: { when: { at: 'hottest-cools-to', temperatureC: 62 }, barPerMin: 0.8 },
    },
    ventsAtBar: 1.3,
    lines: [
      { name: 'bag A', sourceBar: 0.9, pumpMin: 2, leakPerMin: 0.003 },
      { name: 'bag B', sourceBar: 0.9, pumpMin: 2, leakPerMin: 0.003 },
    ],
    parts: [
      { part: 'P-1', bagLine: 'bag A' },
      { part: 'P-2', bagLine: 'bag B' },
    ],
    sensors: [
      { channel: 'TC1', parts: ['P-1'], point: column('carbon') },
      { channel: 'TC2', parts: ['P-1'], point: column('carbon', { position: 0.92 }) },
      { channel: 'TC3', parts: ['P-2'], point: column('steel block') },
      { channel: 'TC4', parts: ['P-2'], point: column('steel', { position: 1.08 }) },
    ],
    recorder: recorder({
      preamble: ['AUTOCLAVE 17\t{run}'],
      layout: {
        format: 'dwellbook-layout/1',
        name: 'strip recorder',
        delimiter: '\t',
        header: 2,
        units: 3,
        time: { columns: ['Time'], pattern: 'M/d/yyyy h:mm:ss a', zone: 'America/Denver' },
        channels: [
          ...thermocouples(4, '°F', (n) => `TC-${n}`),
          { column: 'PRESS', name: 'gas', role: 'pressure', unit: 'psi' },
          { column: 'VAC A', name: 'bag A', role: 'vacuum', unit: 'inHg' },
          { column: 'VAC B', name: 'bag B', role: 'vacuum', unit: 'inHg' },
        ],
      },
    }),
  }),
  expects: (truth) => ({
    verdict: 'does-not-conform',
    exit: 1,
    findings: [],
    parts: {
      'P-1': {
        verdict: 'conforms',
        findings: [
          { limit: 'cure/time', outcome: 'met', observed: minutesAllIn(truth, 'cure', ['TC1', 'TC2']), within: 1 },
        ],
      },
      'P-2': {
        verdict: 'does-not-conform',
        findings: [
          { limit: 'cure/time', outcome: 'not-met', observed: minutesAllIn(truth, 'cure', ['TC3', 'TC4']), within: 1 },
          { limit: 'ceiling', outcome: 'met' },
        ],
      },
    },
  }),
};
