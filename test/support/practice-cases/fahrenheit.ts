import { celsiusFrom } from '../../../models/units.ts';
import { nextUp } from '../../../server/practice/simulator/crossings.ts';
import { minutesAllIn } from '../../../server/practice/simulator/truth.ts';
import { column, inAutoclave, inOven, recorder, thermocouples } from './made-of.ts';
import { CYCLE, LAGGING_TO_FIRST, type PracticeCase } from './practice-case.ts';
import { greatestSlope, heatOnMin, junctionOf, least } from './read-off.ts';

/** Degrees Fahrenheit, inches, pounds and torr, each against the units of another document. */

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

const BAGGED_AT_250 = {
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

const bagged = (targetC: number, leakAt: readonly [number, number] | null) => ({
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

const TORR_PER_BAR = 1e5 / (101325 / 760);
const INHG_PER_BAR = 1e5 / 3386.389;

export const TORR_AGAINST_INCHES: PracticeCase = {
  name: 'torr-against-inches',
  what: 'The bag is logged in torr absolute, asked for in inches below ambient, and leaks in the dwell',
  plan: inOven({
    ...bagged(119.5, [120, 140]),
    run: 'O-3',
    startsAt: '2026-03-02T23:15:00Z',
    cycle: BAGGED_AT_250,
    isBarometerRecorded: true,
    barometerMbar: 1001,
    sensors: [0.94, 1.02, 1.1].map((position, i) => ({
      channel: `TC${i + 1}`,
      point: column('glass', { position }),
    })),
    recorder: recorder({
      vacuum: { decimals: 0, noise: 0.4 },
      absent: 'NaN',
      lineEnd: '\n',
      layout: {
        format: 'dwellbook-layout/1',
        name: 'lab logger',
        header: 1,
        time: { columns: ['stamp'], pattern: "yyyy-MM-dd'T'HH:mm:ss", zone: 'Pacific/Auckland' },
        channels: [
          ...thermocouples(3, '°C', (n) => `T${n}`),
          { column: 'p_bag', name: 'bag', role: 'vacuum', unit: 'torr abs' },
        ],
        missing: ['NaN'],
      },
    }),
  }),
  expects: (truth) => {
    const { history } = truth;
    const weakestBar = least(history.vacuumBar[0]!, history.stepS / 60, heatOnMin(truth), 200);
    const observed = Math.round(weakestBar * TORR_PER_BAR) * (INHG_PER_BAR / TORR_PER_BAR);
    return {
      verdict: 'does-not-conform',
      exit: 1,
      findings: [
        { limit: 'window/bag', outcome: 'not-met', observed, within: 0.15 },
        { limit: 'cure/time', outcome: 'met', observed: minutesAllIn(truth, 'cure', truth.channels), within: 1 },
      ],
    };
  },
};

export const GUARDED_IN_FAHRENHEIT: PracticeCase = {
  name: 'guarded-in-fahrenheit',
  what: 'Three degrees Fahrenheit inside the band, with thermocouples known to four',
  plan: inOven({
    ...bagged(celsiusFrom(243, '°F'), null),
    run: 'G-1',
    startsAt: '2026-09-21T10:00:00Z',
    cycle: { ...BAGGED_AT_250, decision: { rule: 'guarded' } },
    parts: [{ part: 'G-1' }],
    sensors: [1, 1.04].map((position, i) => ({
      channel: `TC${i + 1}`,
      parts: ['G-1'],
      uncertainty: 4,
      point: column('glass', { position }),
    })),
    recorder: recorder({
      intervalS: 30,
      lineEnd: '\n',
      layout: {
        format: 'dwellbook-layout/1',
        name: 'calibrated logger',
        delimiter: ';',
        header: 1,
        time: { columns: ['date', 'time'], pattern: 'dd.MM.yy HH:mm:ss', zone: 'Europe/Athens' },
        channels: [
          ...thermocouples(2, '°F', (n) => `TE${n}`),
          { column: 'VE1', name: 'bag', role: 'vacuum', unit: 'kPa' },
        ],
      },
    }),
  }),
  expects: (truth) => ({
    verdict: 'cannot-tell',
    exit: 2,
    notFindings: ['not-met'],
    findings: [
      { limit: 'cure/time', outcome: 'cannot-tell', observed: minutesAllIn(truth, 'cure', truth.channels), within: 1 },
      { limit: 'ceiling', outcome: 'met' },
    ],
  }),
};

export const DEGREES_PER_HOUR: PracticeCase = {
  name: 'degrees-per-hour',
  what: 'A post-cure heated faster than its °C/h, logged in °F by the hour',
  plan: inOven({
    run: 'PC',
    startsAt: '2026-06-30T18:00:00Z',
    cycle: {
      ...CYCLE,
      code: 'PC-150',
      title: 'Post-cure',
      units: { temperature: '°C', rate: '°C/h' },
      stages: [
        {
          name: 'heat-up',
          kind: 'heat',
          rate: { atMost: 30, over: [80, 140], average: 'window', window: 30, of: 'every' },
        },
        {
          name: 'post-cure',
          kind: 'dwell',
          target: 150,
          plus: 5,
          minus: 5,
          time: { atLeast: 120 },
          clock: LAGGING_TO_FIRST,
          counting: 'accumulated',
          forgive: { below: { by: 1, for: 5 } },
        },
        {
          name: 'cool-down',
          kind: 'cool',
          rate: { atMost: 90, over: [140, 80], average: 'chord', of: 'every' },
          until: 70,
        },
      ],
      ceiling: 160,
    },
    programme: {
      segments: [
        { kind: 'ramp', toC: 150, cPerMin: 0.62 },
        { kind: 'soak', minutes: 130, onceLaggingC: 145.5 },
        { kind: 'ramp', toC: 40, cPerMin: 1 },
      ],
    },
    sensors: [0.95, 1.05].map((position, i) => ({
      channel: `TC${i + 1}`,
      point: column('stand', { position, bagM2KPerW: 0.004 }),
    })),
    recorder: recorder({
      intervalS: 120,
      layout: {
        format: 'dwellbook-layout/1',
        name: 'hour counter',
        delimiter: ';',
        decimal: ',',
        header: 1,
        units: 2,
        time: { columns: ['h'], elapsed: 'h', startsAt: '2026-06-30T18:00:00Z' },
        channels: thermocouples(2, '°F', (n) => `K${n}`),
      },
    }),
  }),
  expects: (truth) => {
    const slopes = truth.channels.map((channel) => greatestSlope(junctionOf(truth, channel), [80, 140], 30, 2));
    return {
      verdict: 'does-not-conform',
      exit: 1,
      findings: [
        { limit: 'heat-up/fastest', outcome: 'not-met', observed: 60 * Math.max(...slopes), within: 0.3 },
        {
          limit: 'post-cure/time',
          outcome: 'met',
          observed: minutesAllIn(truth, 'post-cure', truth.channels),
          within: 1.5,
        },
      ],
    };
  },
};

export const GAS_LATE_AND_ABSOLUTE: PracticeCase = {
  name: 'gas-late-and-absolute',
  what: 'Gas came after the parts were warm; logged in kPa absolute, asked for in psi',
  args: ['--barometer', '1005 mbar'],
  plan: inAutoclave({
    run: 'L-2',
    startsAt: '2026-11-02T05:30:00Z',
    barometerMbar: 1005,
    cycle: {
      ...CYCLE,
      code: 'AC-250',
      title: 'Autoclave cure at 250 °F',
      units: { temperature: '°F', pressure: 'psi' },
      stages: BAGGED_AT_250.stages,
      windows: [
        {
          name: 'gas',
          quantity: 'pressure',
          atLeast: 40,
          from: { at: 'all-reach', value: 180 },
          until: { at: 'all-cool-to', value: 150 },
          forgive: { by: 5, for: 2 },
        },
      ],
      ceiling: 275,
    },
    programme: bagged(119.5, null).programme,
    pressure: {
      toBar: 3.2,
      barPerMin: 0.4,
      when: { at: 'minute', minute: 90 },
      release: { when: { at: 'hottest-cools-to', temperatureC: 60 }, barPerMin: 0.5 },
    },
    sensors: [0.95, 1.05].map((position, i) => ({ channel: `TC${i + 1}`, point: column('glass', { position }) })),
    recorder: recorder({
      layout: {
        format: 'dwellbook-layout/1',
        name: 'panel',
        encoding: 'utf-16be',
        delimiter: ',',
        header: 1,
        time: { columns: ['t'], pattern: 'yyyy-MM-dd HH:mm', zone: '+01:00' },
        channels: [
          ...thermocouples(2, '°F', (n) => `F${n}`),
          { column: 'P', name: 'gas', role: 'pressure', unit: 'kPa abs' },
        ],
      },
      byteOrderMark: true,
      pressure: { decimals: 1, noise: 0.1 },
    }),
  }),
  expects: (truth) => {
    if (nextUp(junctionOf(truth, 'TC1'), celsiusFrom(180, '°F'), 0)! > 80) throw new Error('the gas is not late');
    return {
      verdict: 'does-not-conform',
      exit: 1,
      findings: [
        { limit: 'window/gas', outcome: 'not-met', observed: 0, within: 0.1 },
        { limit: 'cure/time', outcome: 'met', observed: minutesAllIn(truth, 'cure', truth.channels), within: 1 },
      ],
    };
  },
};
