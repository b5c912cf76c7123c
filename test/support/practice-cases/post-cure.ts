import { minutesAllIn } from '../../../server/practice/simulator/truth.ts';
import { column, inOven, recorder, thermocouples } from './made-of.ts';
import { CYCLE, LAGGING_TO_FIRST, type PracticeCase } from './practice-case.ts';
import { greatestSlope, junctionOf } from './read-off.ts';

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
