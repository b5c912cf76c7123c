import type { Cycle, DwellStage, Forgiveness } from './cycle.ts';
import { differenceWords, figure, listWords } from './words-of-figures.ts';
import { DECISION } from './words-of-others.ts';

/** Every rule the cycle leaves to a default or to the rules themselves, each as a sentence. */
export function defaultSentences(cycle: Cycle): string[] {
  const dwells = cycle.stages.filter((stage) => stage.kind === 'dwell');
  const sentences = [
    ...dwellDefaults(cycle, dwells),
    ...forgivenessDefaults(cycle, dwells),
    ...(dwells.some((dwell) => dwell.time !== undefined) ? [coolingDefault(cycle)] : []),
    ...logDefaults(cycle),
  ];
  if (cycle.sensors?.own !== true) {
    sentences.push(
      `A part with no ${cycle.judgedBy} thermocouples of its own is judged by all ${cycle.judgedBy} thermocouples in the load, and the verdict says so.`,
    );
  }
  if (cycle.decision === undefined) sentences.push(DECISION['as-indicated']);
  const absent = notAsked(cycle);
  if (absent.length > 0) sentences.push(`Not asked for: ${listWords(absent)}.`);
  return sentences;
}

function dwellDefaults(cycle: Cycle, dwells: readonly DwellStage[]): string[] {
  const sentences: string[] = [];
  if (dwells.some((dwell) => dwell.clock !== undefined && dwell.below === undefined)) {
    sentences.push('A dip below the band stops the clock.');
  }
  const clockless = dwells.filter((dwell) => dwell.clock === undefined).map((dwell) => dwell.name);
  if (clockless.length > 0) {
    sentences.push(
      `No clock is written for ${listWords(clockless)}: where another limit needs its opening and closing, they are when the last judged sensor enters and when the first leaves.`,
    );
  }
  if (dwells.length > 0) {
    sentences.push(
      `Chatter of less than ${differenceWords(cycle, 1, 2)} about the upper end of a band on the way out is not a return.`,
    );
  }
  return sentences;
}

function forgivenessDefaults(cycle: Cycle, dwells: readonly DwellStage[]): string[] {
  const written = [
    ...dwells.flatMap(({ forgive }) => [forgive?.below, forgive?.above]),
    ...(cycle.windows ?? []).map(({ forgive }) => forgive),
  ].filter((forgiveness): forgiveness is Forgiveness => forgiveness !== undefined);
  const sentences = ['Nothing is forgiven but what is written as forgiven.'];
  if (written.some(({ times, inTotal }) => times === undefined && inTotal === undefined)) {
    sentences.push('Where no number and no total of forgiven excursions is written, any number is forgiven.');
  }
  return sentences;
}

function coolingDefault(cycle: Cycle): string {
  const until = cycle.stages.findLast((stage) => stage.kind === 'cool')?.until;
  const cooled =
    until === undefined
      ? `${differenceWords(cycle, 15, 27)} below their hottest as the log ends`
      : `to ${figure(until)} ${cycle.units.temperature}`;
  return `The record shows the cooling when all judged sensors have cooled ${cooled}; a time that is short then is not met, before that it cannot be told.`;
}

function logDefaults({ log, units }: Cycle): string[] {
  const gap =
    log?.longestGap === undefined
      ? 'Gaps longer than the greater of 5 median intervals and 60 s count as missing'
      : `Gaps longer than ${figure(log.longestGap)} min count as missing`;
  const sentences = [`${gap}; shorter ones are bridged by a straight line.`];
  if (log?.changesAtMost === undefined) {
    sentences.push(
      `In a gap a temperature may change by at most ${units.temperature === '°C' ? 20 : 36} ${units.temperature}/min (assumed); pressure and vacuum may be anything.`,
    );
  } else {
    sentences.push('In a gap pressure and vacuum may be anything.');
  }
  return sentences;
}

function notAsked(cycle: Cycle): string[] {
  const { sensors, stages } = cycle;
  const asked: readonly (readonly [string, boolean])[] = [
    ['a dwell', stages.some((stage) => stage.kind === 'dwell')],
    ['pressure', (cycle.windows ?? []).some((window) => window.quantity === 'pressure')],
    ['vacuum', (cycle.windows ?? []).some((window) => window.quantity === 'vacuum')],
    ['a ceiling', cycle.ceiling !== undefined],
    ['a spread', cycle.spread !== undefined],
    ['a least number of working sensors', sensors?.workingAtLeast !== undefined],
    ['a longest gap', cycle.log?.longestGap !== undefined],
    ['a bag leak test', cycle.leakTest !== undefined],
    ['out-life', cycle.material?.outLife === true],
    ['calibration', cycle.instruments?.calibration === true],
  ];
  return asked.filter(([, isAsked]) => !isAsked).map(([what]) => what);
}
