import type { Clock, Cycle, DwellStage } from './cycle.ts';
import { bandWords, figure, isStepDown, lowerOf, upperOf } from './words-of-figures.ts';
import { forgivenessSentence } from './words-of-forgiveness.ts';

/** A dwell in sentences: band, time, clock, what a dip does, what is forgiven. */
export function dwellSentences(cycle: Cycle, dwell: DwellStage): string[] {
  const unit = cycle.units.temperature;
  const lower = `${figure(lowerOf(dwell))} ${unit}`;
  const upper = `${figure(upperOf(dwell))} ${unit}`;
  const band = bandWords({ atLeast: lowerOf(dwell), atMost: upperOf(dwell) }, unit);
  const { time, clock, counting, below, longest, forgive } = dwell;
  const sentences = [`Held at ${band}; the target is ${figure(dwell.target)} ${unit}.`];
  sentences.push(time === undefined ? 'No time is asked.' : `The dwell lasts ${bandWords(time, 'min')}.`);
  if (clock !== undefined) {
    sentences.push(`Its clock starts when ${openingWords(cycle, dwell, clock)} and stops when ${closingWords(clock)}.`);
    sentences.push(`Time counts while ${holdingWords(clock)} ${lower} or above.`);
  }
  if (time !== undefined && counting !== undefined) sentences.push(COUNTING[counting]);
  if (clock !== undefined && below !== undefined) {
    sentences.push(
      below === 'stops-clock' ? `A dip below ${lower} stops the clock.` : `A dip below ${lower} is not allowed.`,
    );
  }
  if (forgive?.below !== undefined) {
    sentences.push(
      forgivenessSentence(`dips below ${lower}`, forgive.below, unit),
      `A forgiven dip counts as if it had not happened; two dips less than ${figure(forgive.below.for)} min apart are one.`,
    );
  }
  sentences.push(`No judged sensor reads above ${upper} from its entering to its leaving.`);
  if (forgive?.above !== undefined) {
    sentences.push(forgivenessSentence(`readings above ${upper}`, forgive.above, unit));
  }
  if (longest !== undefined) {
    sentences.push(
      `At most ${figure(longest.atMost)} min, dips included, from when ${openingWords(cycle, dwell, longest.clock)} to when ${closingWords(longest.clock)}.`,
    );
  }
  return sentences;
}

const COUNTING = {
  contiguous: 'The longest unbroken stretch is the time.',
  accumulated: 'All stretches together are the time.',
  each: 'Every judged sensor gathers its own time between its own entering and leaving; the least of them is the time.',
} as const;

function openingWords(cycle: Cycle, dwell: DwellStage, clock: Clock): string {
  const unit = cycle.units.temperature;
  const reached = isStepDown(cycle, dwell)
    ? `has cooled to ${figure(upperOf(dwell))} ${unit}`
    : `has reached ${figure(lowerOf(dwell))} ${unit}`;
  switch (clock.opens) {
    case 'lagging-enters':
      return `the last judged sensor ${reached}`;
    case 'leading-enters':
      return `the first judged sensor ${reached}`;
    case 'mean-enters':
      return `the mean of the judged sensors ${reached}`;
    case 'air-enters':
      return `the air ${reached} (of several air channels, the coldest)`;
  }
}

function closingWords({ closes }: Clock): string {
  switch (closes) {
    case 'first-leaves':
      return 'the first judged sensor leaves the band';
    case 'last-leaves':
      return 'the last judged sensor leaves the band';
    case 'mean-leaves':
      return 'the mean of the judged sensors leaves the band';
    case 'air-leaves':
      return 'the air leaves the band';
  }
}

function holdingWords({ opens }: Clock): string {
  switch (opens) {
    case 'lagging-enters':
      return 'every judged sensor is at';
    case 'leading-enters':
      return 'at least one judged sensor is at';
    case 'mean-enters':
      return 'the mean of the judged sensors is at';
    case 'air-enters':
      return 'the air is at';
  }
}
