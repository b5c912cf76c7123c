import { addCalibration } from '../actions/add-calibration.ts';
import { addAccuracyTest, addSurvey, setQualifiedRange } from '../actions/add-survey.ts';
import { placeInstrument } from '../actions/place-instrument.ts';
import { setInstrument } from '../actions/set-instrument.ts';
import { OVEN_2 } from './plan-vessels.ts';
import type { PracticeDeed } from './practice-deed.ts';

const BEGINS_MS = Date.parse('2025-10-22T09:00:00Z');
const BENCH = 'Skerry Row calibration bench (invented)';
const vessel = OVEN_2.name;
const NO_CORRECTION: [number, number][] = [
  [0, 0],
  [200, 0],
];

/**
 * Thermocouples of the oven with half-yearly calibrations, and its surveys. One came back a fortnight late in spring,
 * so that what was cured meanwhile was read by an instrument out of date; in autumn one was found out of tolerance.
 */
export function instrumentDeeds(): PracticeDeed[] {
  return [1, 2, 3, 4].flatMap((n) => {
    const instrument = `SR-K-0${n}`;
    const springDone = n === 2 ? '2026-05-06' : '2026-04-20';
    const isFoundOut = n === 3;
    const calibration = (done: string, until: string, asFound: Parameters<typeof addCalibration>[2]['asFound']) => ({
      atMs: Math.max(BEGINS_MS + n * 60_000, Date.parse(`${done}T15:00:00Z`)),
      by: 'inspector 1',
      does: (parts: Parameters<PracticeDeed['does']>[0]) =>
        addCalibration(parts, instrument, {
          done,
          until,
          by: BENCH,
          certificate: `SR-CAL-${done.slice(2, 4)}${done.slice(5, 7)}-${n}`,
          unit: '°C',
          points: NO_CORRECTION,
          asFound,
        }),
    });
    return [
      {
        atMs: BEGINS_MS + n * 1000,
        by: 'process engineer 1',
        does: (parts) => {
          setInstrument(parts, { instrument, kind: 'thermocouple', type: 'K', makerNumber: `inv-${4400 + n}` });
          const on = { kind: 'vessel', name: vessel } as const;
          placeInstrument(parts, instrument, { on, channel: `TC${n}`, from: '2025-10-20T08:00:00Z' });
        },
      },
      calibration('2025-10-20', '2026-04-19', null),
      calibration(springDone, '2026-10-22', { outOfTolerance: false }),
      calibration(
        '2026-10-20',
        n === 4 ? '2026-12-05' : '2027-04-19',
        isFoundOut
          ? {
              outOfTolerance: true,
              points: [
                [20, 0],
                [130, -6],
              ],
            }
          : { outOfTolerance: false },
      ),
    ] satisfies PracticeDeed[];
  });
}

/** The oven's uniformity survey, accuracy test and range. */
export function surveyDeeds(): PracticeDeed[] {
  return [
    {
      atMs: BEGINS_MS + 3_600_000,
      by: 'inspector 1',
      does: (parts) => {
        const range = { unit: '°C', lowest: 50, highest: 190 } as const;
        setQualifiedRange(parts, vessel, { ...range, document: 'SR-Q-12 (invented)' });
        const survey = { ...range, zone: 'between the shelf marks, 0.8 m across', uniformity: 3.8 };
        addSurvey(parts, vessel, { ...survey, done: '2025-10-21', until: '2026-10-20', certificate: 'SR-TUS-25-2' });
        addAccuracyTest(parts, vessel, { done: '2025-10-21', until: '2026-04-20', unit: '°C', difference: 0.6 });
      },
    },
    {
      atMs: Date.parse('2026-10-19T14:00:00Z'),
      by: 'inspector 1',
      does: (parts) => {
        const survey = { unit: '°C', lowest: 50, highest: 190, zone: 'between the shelf marks, 0.8 m across' } as const;
        const certificate = 'SR-TUS-26-2';
        addSurvey(parts, vessel, { ...survey, uniformity: 4.4, done: '2026-10-19', until: '2027-10-18', certificate });
      },
    },
  ];
}
