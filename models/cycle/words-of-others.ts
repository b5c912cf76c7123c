import type { Bounds, Cycle } from './cycle.ts';
import { vacuumWords } from './words-of-event.ts';
import { bandWords, figure, listWords } from './words-of-figures.ts';

/** A limit outside stages and windows, with its sentences. */
export interface NamedSentences {
  readonly name: string;
  readonly sentences: readonly string[];
}

/** Ceiling, spread, sensors, log, leak test, cure estimates, material, instruments, decision rule: those written. */
export function otherSentences(cycle: Cycle): NamedSentences[] {
  return [
    { name: 'Ceiling', sentences: ceilingSentences(cycle) },
    { name: 'Spread', sentences: spreadSentences(cycle) },
    { name: 'Sensors', sentences: sensorSentences(cycle) },
    { name: 'Log', sentences: logSentences(cycle) },
    { name: 'Bag leak test', sentences: leakTestSentences(cycle) },
    { name: 'Cure, estimated', sentences: cureSentences(cycle) },
    { name: 'Material', sentences: cycle.material?.outLife ? [OUT_LIFE] : [] },
    {
      name: 'Instruments',
      sentences: cycle.instruments?.calibration ? ['All instruments were in calibration on the day of the run.'] : [],
    },
    { name: 'Decision rule', sentences: cycle.decision === undefined ? [] : [DECISION[cycle.decision.rule]] },
  ].filter(({ sentences }) => sentences.length > 0);
}

const OUT_LIFE =
  'As the heat came on, all material was within its out-life and whatever else its document limits: shelf life, tack, re-freezing.';

/** What each decision rule means. */
export const DECISION = {
  'as-indicated': 'Limits apply to calibrated readings as they stand; their uncertainty moves no limit.',
  guarded:
    'Limits on temperature, pressure and vacuum are moved inwards by the uncertainty of the reading (k = 2): within that distance of a limit the finding is "cannot tell". A reading of unknown uncertainty is judged as it stands.',
} as const;

function ceilingSentences({ ceiling, units }: Cycle): string[] {
  return ceiling === undefined
    ? []
    : [`No judged sensor reads above ${figure(ceiling)} ${units.temperature} anywhere in the log.`];
}

function spreadSentences({ spread, units }: Cycle): string[] {
  if (spread === undefined) return [];
  const delay = spread.after === undefined ? 'each opening' : `${figure(spread.after)} min after each opening`;
  const during = {
    heating: 'while heating: from heat-on to the opening of the first dwell, and between dwells',
    dwells: `in the dwells: from ${delay} to its closing`,
    run: 'over the whole run',
  }[spread.during];
  return [
    `The hottest and the coldest judged sensor are at most ${figure(spread.atMost)} ${units.temperature} apart ${during}.`,
  ];
}

function sensorSentences({ sensors }: Cycle): string[] {
  const sentences: string[] = [];
  if (sensors?.workingAtLeast !== undefined) {
    sentences.push(
      `At least ${sensors.workingAtLeast} judged sensor${sensors.workingAtLeast === 1 ? '' : 's'} work at every instant from heat-on to the closing of the last dwell.`,
    );
  }
  if (sensors?.own === true) sentences.push('Each part has sensors of its own.');
  if (sensors?.mustWork !== undefined) {
    sentences.push(`A sensor placed at ${listWords(sensors.mustWork)} must not be lost.`);
  }
  return sentences;
}

function logSentences({ log, units }: Cycle): string[] {
  const sentences: string[] = [];
  if (log?.longestGap !== undefined) {
    sentences.push(
      `No channel that a limit uses is without readings for longer than ${figure(log.longestGap)} min between heat-on and the end of the last window or stage.`,
    );
  }
  if (log?.changesAtMost !== undefined) {
    sentences.push(`In a gap a temperature changes by at most ${figure(log.changesAtMost)} ${units.temperature}/min.`);
  }
  return sentences;
}

function leakTestSentences(cycle: Cycle): string[] {
  const { leakTest } = cycle;
  if (leakTest === undefined) return [];
  const unit = cycle.units.vacuum ?? '';
  const start =
    leakTest.startAtLeast === undefined
      ? []
      : [
          `The bag vacuum is ${bandWords(startBounds(leakTest.startAtLeast, vacuumWords(cycle)), vacuumWords(cycle))} as the test starts.`,
        ];
  return [
    ...start,
    `It loses at most ${figure(leakTest.lossAtMost)} ${unit} in ${figure(leakTest.over)} min; a test of another length is compared by its loss per minute.`,
  ];
}

function cureSentences({ cure, units }: Cycle): string[] {
  if (cure === undefined) return [];
  const sentences: string[] = [];
  if (cure.degreeAtLeast !== undefined) {
    sentences.push(
      `The degree of cure is at least ${figure(cure.degreeAtLeast)} at every judged sensor as the log ends.`,
    );
  }
  if (cure.tgAtLeast !== undefined) {
    sentences.push(
      `The glass transition is at least ${figure(cure.tgAtLeast)} ${units.temperature} at every judged sensor as the log ends.`,
    );
  }
  if (cure.pressureBeforeGel !== undefined) {
    sentences.push(
      `The vessel pressure has reached ${figure(cure.pressureBeforeGel)} ${units.pressure ?? ''} by the earliest gel and has not fallen below it since.`,
    );
  }
  return [...sentences, `Estimates by the resin set ${cure.resin}: a model, not a measurement.`];
}

/** A deeper vacuum is more below ambient and less absolute. */
function startBounds(start: number, unit: string): Bounds {
  return unit.endsWith(' abs') ? { atMost: start } : { atLeast: start };
}
