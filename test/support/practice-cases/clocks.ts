import { TOOLS } from '../../../server/practice/plan-kinds.ts';
import { dipsUnder, minutesAllIn } from '../../../server/practice/simulator/truth.ts';
import { column, inOven, recorder, thermocouples } from './made-of.ts';
import { CYCLE, LAGGING_TO_FIRST, type PracticeCase } from './practice-case.ts';

/** Time columns of every kind: half-hour changes, serial days, pieces in the wrong order. */

const CURE_AT_120 = {
  ...CYCLE,
  code: 'OV-120',
  title: 'Oven cure at 120 °C',
  units: { temperature: '°C' },
  stages: [
    {
      name: 'heat-up',
      kind: 'heat',
      rate: { atLeast: 0.5, atMost: 3, over: [40, 100], average: 'chord', of: 'every' },
    },
    {
      name: 'cure',
      kind: 'dwell',
      target: 120,
      plus: 5,
      minus: 5,
      time: { atLeast: 90, atMost: 150 },
      clock: LAGGING_TO_FIRST,
      counting: 'contiguous',
      forgive: { below: { by: 1, for: 2 } },
    },
    { name: 'cool-down', kind: 'cool', rate: { atMost: 4, over: [110, 60], average: 'chord', of: 'every' }, until: 50 },
  ],
  ceiling: 130,
} as const;

const PROGRAMME = {
  segments: [
    { kind: 'soak', minutes: 8 },
    { kind: 'ramp', toC: 119, cPerMin: 1.4 },
    { kind: 'soak', minutes: 100, onceLaggingC: 115.5 },
    { kind: 'ramp', toC: 35, cPerMin: 1.8 },
  ],
} as const;

const SENSORS = [
  { channel: 'TC1', point: column('glass') },
  { channel: 'TC2', point: column('carbon', { position: 0.9 }) },
  { channel: 'TC3', point: column('carbon', { position: 1.1, laminateM: 0.0045 }) },
];

export const CLOCKS_BACK_HALF_AN_HOUR: PracticeCase = {
  name: 'clocks-back-half-an-hour',
  what: 'A zone that goes back by half an hour in the dwell',
  plan: inOven({
    run: 'night run',
    startsAt: '2026-04-04T13:05:00Z',
    cycle: CURE_AT_120,
    programme: PROGRAMME,
    sensors: SENSORS,
    recorder: recorder({
      byteOrderMark: true,
      intervalS: 30,
      preamble: ['oven;{run}'],
      layout: {
        format: 'dwellbook-layout/1',
        name: 'island oven',
        delimiter: ';',
        header: 2,
        units: 3,
        time: { columns: ['Day', 'Clock'], pattern: 'yyyy/MM/dd HH:mm:ss', zone: 'Australia/Lord_Howe' },
        channels: thermocouples(3, '°C', (n) => `probe ${n}`),
      },
    }),
  }),
  expects: (truth) => ({
    verdict: 'conforms',
    exit: 0,
    repairs: true,
    findings: [
      { limit: 'cure/time', outcome: 'met', observed: minutesAllIn(truth, 'cure', truth.channels), within: 0.6 },
    ],
  }),
};

export const SERIAL_DAYS_AND_A_POWER_CUT: PracticeCase = {
  name: 'serial-days-and-a-power-cut',
  what: 'Heat lost in a dwell whose time adds up; spreadsheet days, decimal commas, a zone of five and a half hours',
  plan: inOven({
    run: 'K7',
    startsAt: '2026-01-19T04:10:00Z',
    cycle: {
      ...CURE_AT_120,
      stages: CURE_AT_120.stages.map((stage) =>
        stage.kind === 'dwell' ? { ...stage, counting: 'accumulated', time: { atLeast: 90, atMost: 150 } } : stage,
      ),
    },
    programme: PROGRAMME,
    sensors: SENSORS,
    mishaps: [{ kind: 'power-cut', fromMin: 130, untilMin: 152 }],
    recorder: recorder({
      preamble: ['Messschrieb;{run}', 'Tage seit 1899-12-30'],
      layout: {
        format: 'dwellbook-layout/1',
        name: 'spreadsheet export',
        encoding: 'windows-1252',
        delimiter: ';',
        decimal: ',',
        header: 3,
        units: 4,
        time: { columns: ['Zeit'], serialDays: true, zone: 'Asia/Kolkata' },
        channels: thermocouples(3, '°C', (n) => `Fühler ${n}`),
      },
    }),
  }),
  expects: (truth) => {
    const passages = truth.sensors.map(({ dwells }) => dwells[0]!);
    const opens = Math.max(...passages.map(({ entersMin }) => entersMin));
    const closes = Math.min(...passages.map(({ leavesMin }) => leavesMin));
    const lost = dipsUnder(truth, 115, truth.channels, [opens + 1, closes - 1]).reduce(
      (sum, { fromMin, untilMin }) => sum + untilMin - fromMin,
      0,
    );
    return {
      verdict: 'conforms',
      exit: 0,
      findings: [{ limit: 'cure/time', outcome: 'met', observed: closes - opens - lost, within: 1 }],
    };
  },
};

export const PIECES_OUT_OF_ORDER: PracticeCase = {
  name: 'pieces-out-of-order',
  what: 'The later half of the record stands first in the file',
  plan: inOven({
    run: 'half and half',
    startsAt: '2026-02-09T21:40:00Z',
    cycle: CURE_AT_120,
    programme: PROGRAMME,
    sensors: SENSORS,
    recorderMishaps: [{ kind: 'pieces-swapped', atMin: 97 }],
    recorder: recorder({
      lineEnd: '\n',
      layout: {
        format: 'dwellbook-layout/1',
        name: 'logger with a ring buffer',
        header: 1,
        time: { columns: ['at'], pattern: 'dd-MMM-yyyy HH:mm:ss', zone: 'America/St_Johns' },
        channels: thermocouples(3, '°C', (n) => `t${n}`),
      },
    }),
  }),
  expects: (truth) => ({
    verdict: 'conforms',
    exit: 0,
    repairs: true,
    findings: [
      { limit: 'cure/time', outcome: 'met', observed: minutesAllIn(truth, 'cure', truth.channels), within: 1 },
    ],
  }),
};

const HOT_AIR_POINT = { toolJPerM2K: TOOLS.glass, sinkWPerM2K: 1.5 };

export const FELL_OFF: PracticeCase = {
  name: 'fell-off',
  what: 'A thermocouple hangs in air hotter than the part may be; nobody has decided',
  plan: inOven({
    run: 'sink',
    startsAt: '2026-05-04T06:00:00Z',
    cycle: { ...CURE_AT_120, ceiling: 145 },
    programme: {
      segments: [
        { kind: 'soak', minutes: 8 },
        { kind: 'ramp', toC: 130, cPerMin: 1.4 },
        { kind: 'soak', minutes: 100, onceLaggingC: 115.5 },
        { kind: 'ramp', toC: 35, cPerMin: 1.8 },
      ],
    },
    sensors: [0.95, 1, 1.02, 1.05].map((position, i) => ({
      channel: `TC${i + 1}`,
      point: column('glass', { ...HOT_AIR_POINT, position }),
    })),
    faults: [{ kind: 'in-the-air', channel: 'TC2', fromMin: 0 }],
    recorder: recorder({
      layout: {
        format: 'dwellbook-layout/1',
        name: 'bench logger',
        delimiter: '\t',
        header: 1,
        units: 2,
        time: { columns: ['time'], elapsed: 's', startsAt: '2026-05-04T06:00:00Z' },
        channels: [
          ...thermocouples(4, '°C', (n) => `in ${n}`),
          { column: 'air', name: 'air', role: 'air', unit: '°C' },
        ],
      },
    }),
  }),
  expects: () => ({
    verdict: 'cannot-tell',
    exit: 2,
    notFindings: ['not-met'],
    faults: { TC2: 'follows-air' },
    findings: [{ limit: 'cure/upper', outcome: 'cannot-tell' }],
  }),
};
