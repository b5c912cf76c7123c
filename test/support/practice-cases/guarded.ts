import { celsiusFrom } from '../../../models/units.ts';
import { minutesAllIn } from '../../../server/practice/simulator/truth.ts';
import { BAGGED_AT_250, bagged } from './bagged-at-250.ts';
import { column, inOven, recorder, thermocouples } from './made-of.ts';
import type { PracticeCase } from './practice-case.ts';

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
