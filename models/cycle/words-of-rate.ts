import type { CoolStage, Cycle, HeatStage, RateLimit } from './cycle.ts';
import { bandWords, figure, rateUnitOf } from './words-of-figures.ts';

/** A heat-up or cool-down in sentences: its rate and where it ends. */
export function rateStageSentences(cycle: Cycle, stage: HeatStage | CoolStage): string[] {
  const isHeat = stage.kind === 'heat';
  const sentences: string[] = [];
  if (stage.rate === undefined) sentences.push(`No ${isHeat ? 'heating' : 'cooling'} rate is asked.`);
  else sentences.push(...rateSentences(cycle, stage.rate, isHeat ? 'heats' : 'cools'));
  if (stage.kind === 'cool' && stage.until !== undefined) {
    sentences.push(
      `The stage ends when all judged sensors have cooled to ${figure(stage.until)} ${cycle.units.temperature}.`,
    );
  }
  return sentences;
}

function rateSentences(cycle: Cycle, rate: RateLimit, verb: string): string[] {
  const unit = cycle.units.temperature;
  const [from, to] = rate.over;
  const how =
    rate.average === 'chord'
      ? 'The rate is that from the first temperature to the second, taken as a whole.'
      : `The rate is the least-squares slope over every window of ${figure(rate.window ?? Number.NaN)} min that lies inside.`;
  return [
    `From ${figure(from)} to ${figure(to)} ${unit} ${SUBJECT[rate.of]} ${verb} at a rate of ${bandWords(rate, rateUnitOf(cycle))}.`,
    how,
  ];
}

const SUBJECT = {
  every: 'every judged sensor',
  leading: 'the leading judged sensor',
  lagging: 'the lagging judged sensor',
  mean: 'the mean of the judged sensors',
  air: 'the air',
} as const;
