import { SKERRY_180 } from '../../../server/practice/plan-resins.ts';
import { nextUp } from '../../../server/practice/simulator/crossings.ts';
import { minutesAllIn, type Truth } from '../../../server/practice/simulator/truth.ts';
import { column, inAutoclave, inOven, recorder, thermocouples } from './made-of.ts';
import { CYCLE, LAGGING_TO_FIRST, type PracticeCase } from './practice-case.ts';

/** Heat of reaction, estimates of cure, and a thermocouple on the other scale. */

const AT_180 = {
  ...CYCLE,
  code: 'AC-180',
  title: 'Autoclave cure at 180 °C',
  units: { temperature: '°C', pressure: 'kPa' },
  stages: [
    { name: 'heat-up', kind: 'heat', rate: { atMost: 4, over: [60, 150], average: 'window', window: 10, of: 'every' } },
    {
      name: 'cure',
      kind: 'dwell',
      target: 180,
      plus: 6,
      minus: 6,
      time: { atLeast: 100, atMost: 160 },
      clock: LAGGING_TO_FIRST,
      counting: 'contiguous',
      forgive: { below: { by: 1, for: 3 }, above: { by: 2, for: 3 } },
    },
    { name: 'cool-down', kind: 'cool', rate: { atMost: 5, over: [165, 80], average: 'chord', of: 'every' }, until: 70 },
  ],
  ceiling: 205,
} as const;

const RISING = (toC: number, cPerMin: number) => ({
  segments: [
    { kind: 'soak' as const, minutes: 6 },
    { kind: 'ramp' as const, toC, cPerMin },
    { kind: 'soak' as const, minutes: 110, onceLaggingC: 174.5 },
    { kind: 'ramp' as const, toC: 45, cPerMin: 2.4 },
  ],
});

export const TENTHS_IN_UTF_16: PracticeCase = {
  name: 'tenths-in-utf-16',
  what: 'A thick part overshoots on its own heat; whole tenths of a degree in UTF-16',
  plan: inAutoclave({
    run: 'E-9',
    startsAt: '2026-08-13T03:45:00Z',
    resin: SKERRY_180,
    cycle: AT_180,
    programme: RISING(178.5, 1.3),
    sensors: [
      { channel: 'TC1', point: column('carbon', { startDegree: 0.01 }) },
      { channel: 'TC2', point: column('carbon', { laminateM: 0.011, nodes: 2, junction: 1, startDegree: 0.01 }) },
    ],
    recorder: recorder({
      byteOrderMark: true,
      absent: '-32768',
      layout: {
        format: 'dwellbook-layout/1',
        name: 'register dump',
        encoding: 'utf-16le',
        delimiter: '\t',
        header: 1,
        time: { columns: ['Datum', 'Uhr'], pattern: 'dd.MM.yyyy HH:mm:ss', zone: 'Europe/Berlin' },
        channels: thermocouples(2, '°C', (n) => `HR4000${n}`).map((channel) => ({ ...channel, scale: 0.1 })),
        missing: ['-32768'],
      },
    }),
  }),
  expects: (truth) => ({
    verdict: 'does-not-conform',
    exit: 1,
    findings: [
      { limit: 'cure/upper', outcome: 'not-met', observed: peakOf(truth, 'TC2'), within: 0.4, sensor: 'TC2' },
      { limit: 'ceiling', outcome: 'met', observed: peakOf(truth, 'TC2'), within: 0.4, sensor: 'TC2' },
      { limit: 'cure/time', outcome: 'met', observed: minutesAllIn(truth, 'cure', truth.channels), within: 1 },
    ],
  }),
};

/** DiBenedetto's line with the figures of the practice resin. */
function tgC(degree: number): number {
  const { tg0C, tgInfC, lambda } = SKERRY_180.glassTransition!;
  return tg0C + ((tgInfC - tg0C) * lambda * degree) / (1 - (1 - lambda) * degree);
}

export const ESTIMATES_OF_CURE: PracticeCase = {
  name: 'estimates-of-cure',
  what: 'Degree reached, Tg estimated short of what is asked, gas on before gel',
  isCureEstimated: true,
  plan: inAutoclave({
    run: 'C-4',
    startsAt: '2026-10-05T12:00:00Z',
    resin: SKERRY_180,
    cycle: { ...AT_180, cure: { resin: 'skerry-180', degreeAtLeast: 0.9, tgAtLeast: 218, pressureBeforeGel: 300 } },
    programme: RISING(178, 1.1),
    pressure: {
      toBar: 5,
      barPerMin: 0.5,
      when: { at: 'minute', minute: 50 },
      release: { when: { at: 'hottest-cools-to', temperatureC: 60 }, barPerMin: 0.8 },
    },
    sensors: [0.97, 1.03].map((position, i) => ({
      channel: `TC${i + 1}`,
      point: column('carbon', { position, laminateM: 0.003, startDegree: SKERRY_180.initialDegree }),
    })),
    recorder: recorder({
      intervalS: 30,
      temperature: { decimals: 2, noise: 0.05 },
      lineEnd: '\n',
      layout: {
        format: 'dwellbook-layout/1',
        name: 'fine logger',
        header: 1,
        time: { columns: ['utc'], pattern: "yyyy-MM-dd'T'HH:mm:ss'Z'", zone: 'UTC' },
        channels: [
          ...thermocouples(2, '°C', (n) => `tc${n}`),
          { column: 'kpa', name: 'gas', role: 'pressure', unit: 'kPa' },
        ],
      },
    }),
  }),
  expects: (truth) => {
    const degrees = truth.sensors.map(({ degree }) => degree);
    const gelMin = (i: number) =>
      nextUp({ values: truth.history.degree[i]!, stepMin: truth.history.stepS / 60 }, 0.5, 0)!;
    return {
      verdict: 'does-not-conform',
      exit: 1,
      findings: [
        { limit: 'cure/degree', outcome: 'met', observed: Math.min(...degrees), within: 0.001 },
        { limit: 'cure/tg', outcome: 'not-met', observed: tgC(Math.min(...degrees)), within: 0.4 },
        { limit: 'cure/pressure-before-gel', outcome: 'met' },
      ],
      cure: truth.channels.map((channel, i) => ({
        channel,
        degree: degrees[i]!,
        tgC: tgC(degrees[i]!),
        gelAt: new Date(truth.history.startMs + Math.round(gelMin(i) * 60_000)).toISOString(),
        within: { degree: 0.001, tgC: 0.4, gelS: 15 },
      })),
    };
  },
};

export const SET_TO_THE_OTHER_SCALE: PracticeCase = {
  name: 'set-to-the-other-scale',
  what: 'One input gives °F among °C; nobody has decided',
  plan: inOven({
    run: 'S-5',
    startsAt: '2026-12-01T08:00:00Z',
    cycle: {
      ...AT_180,
      units: { temperature: '°C' },
      stages: [
        { name: 'heat-up', kind: 'heat' },
        { ...AT_180.stages[1], target: 120, time: { atLeast: 60, atMost: 120 } },
        { name: 'cool-down', kind: 'cool', until: 50 },
      ],
      ceiling: 140,
    },
    programme: {
      segments: [
        { kind: 'soak', minutes: 6 },
        { kind: 'ramp', toC: 119, cPerMin: 1.6 },
        { kind: 'soak', minutes: 75, onceLaggingC: 114.5 },
        { kind: 'ramp', toC: 35, cPerMin: 2 },
      ],
    },
    sensors: [0.98, 1, 1.01, 1.03].map((position, i) => ({
      channel: `TC${i + 1}`,
      point: column('glass', { position }),
    })),
    faults: [{ kind: 'wrong-unit', channel: 'TC3', written: '°F' }],
    recorder: recorder({
      preamble: ['# four inputs', '# {run}', '#'],
      layout: {
        format: 'dwellbook-layout/1',
        name: 'four-input meter',
        delimiter: ',',
        header: 4,
        time: { columns: ['when'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: '-03:30' },
        channels: thermocouples(4, '°C', (n) => `input ${n}`),
      },
    }),
  }),
  expects: () => ({
    verdict: 'cannot-tell',
    exit: 2,
    notFindings: ['not-met'],
    faults: { TC3: 'wrong-unit' },
    findings: [{ limit: 'ceiling', outcome: 'cannot-tell' }],
  }),
};

function peakOf(truth: Truth, channel: string): number {
  return truth.sensors.find((sensor) => sensor.channel === channel)!.highestC;
}
