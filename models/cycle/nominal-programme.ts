import { celsiusDifferenceFrom, round9, temperatureDifferenceFromCelsius, temperatureFromCelsius } from '../units.ts';
import type { Cycle, DwellStage, Stage } from './cycle.ts';
import type { Programme, ProgrammeStep } from './programme.ts';
import { figure, rateUnitOf, sentenceCase } from './words-of-figures.ts';

/** What is taken where a document leaves it open, each spoken when it is used. */
const START_C = 20;
const END_C = 60;
const RATE_C_PER_MIN = 2;
const HOLD_MIN = 60;

export interface NominalProgramme {
  readonly programme: Programme;
  /** How it was made of the document, a sentence a stage. */
  readonly words: readonly string[];
}

/**
 * One programme that a cycle would be run by: each rate at the middle of its band, each dwell at its target for its least
 * time. A cycle is a set of limits, not a curve; what this one leaves open is taken and said.
 */
export function nominalProgramme(cycle: Cycle): NominalProgramme {
  const { unit, start, steps, words } = begun(cycle);
  let temperature = start;
  for (const [n, stage] of cycle.stages.entries()) {
    const name = sentenceCase(stage.name);
    if (stage.kind === 'dwell') {
      if (stage.target !== temperature) temperature = arrive(cycle, stage, steps, words);
      const held = minutesOf(stage);
      steps.push({ kind: 'hold', minutes: held.minutes });
      words.push(`${name}: ${figure(stage.target)} ${unit} for ${figure(held.minutes)} min, ${held.because}.`);
      continue;
    }
    const goal = endOf(cycle, stage, n, temperature);
    if (goal.to === temperature) {
      words.push(`${name}: left out, it has no temperature to go to.`);
      continue;
    }
    const { rate, because } = rateOf(cycle, stage);
    steps.push({ kind: 'ramp', rate, to: goal.to });
    words.push(`${name}: to ${figure(goal.to)} ${unit}${goal.because} at ${figure(rate)} ${unit}/min, ${because}.`);
    temperature = goal.to;
  }
  return { programme: { unit, start, steps }, words };
}

function begun(cycle: Cycle) {
  const unit = cycle.units.temperature;
  const start = temperatureFromCelsius(START_C, unit);
  const steps: ProgrammeStep[] = [];
  const words = [`It starts at ${figure(start)} ${unit}; the document names no start.`];
  return { unit, start, steps, words };
}

/** To a dwell that no heat or cool stage leads to. */
function arrive(cycle: Cycle, dwell: DwellStage, steps: ProgrammeStep[], words: string[]): number {
  const unit = cycle.units.temperature;
  const rate = round9(temperatureDifferenceFromCelsius(RATE_C_PER_MIN, unit));
  steps.push({ kind: 'ramp', rate, to: dwell.target });
  words.push(`To ${dwell.name} at ${figure(rate)} ${unit}/min; the document names no stage before it.`);
  return dwell.target;
}

function minutesOf({ time, longest }: DwellStage): { minutes: number; because: string } {
  if (time?.atLeast !== undefined) return { minutes: time.atLeast, because: 'its least time' };
  if (time?.atMost !== undefined) return { minutes: time.atMost, because: 'its longest time, as no least is written' };
  if (longest !== undefined) return { minutes: longest.atMost, because: 'its longest time, as no least is written' };
  return { minutes: HOLD_MIN, because: 'taken here, as no time is written' };
}

function endOf(cycle: Cycle, stage: Stage, n: number, temperature: number): { to: number; because: string } {
  const next = cycle.stages.slice(n + 1).find((later): later is DwellStage => later.kind === 'dwell');
  // Of several stages between two dwells, those that lead the other way stand aside.
  const leads = next !== undefined && Math.sign(next.target - temperature) === (stage.kind === 'heat' ? 1 : -1);
  if (leads) return { to: next.target, because: '' };
  if (next !== undefined) return { to: temperature, because: '' };
  if (stage.kind === 'cool') {
    if (stage.until !== undefined) return { to: stage.until, because: '' };
    const to = Math.min(temperature, temperatureFromCelsius(END_C, cycle.units.temperature));
    return { to, because: ', taken here as no end is written,' };
  }
  const reached = stage.kind === 'heat' && stage.rate ? Math.max(...stage.rate.over) : temperature;
  return { to: Math.max(reached, temperature), because: ', where its rate ends,' };
}

/** Rate in the cycle's temperature unit per minute. */
function rateOf(cycle: Cycle, stage: Stage): { rate: number; because: string } {
  const limit = stage.kind === 'dwell' ? undefined : stage.rate;
  const { atLeast, atMost } = limit ?? {};
  const inMinutes = (written: number) => perMinute(written, cycle);
  if (atLeast !== undefined && atMost !== undefined) {
    return { rate: inMinutes((atLeast + atMost) / 2), because: 'the middle of its band' };
  }
  if (atLeast !== undefined) return { rate: inMinutes(atLeast), because: 'its least rate, as no other is written' };
  if (atMost !== undefined) return { rate: inMinutes(atMost), because: 'its greatest rate, as no other is written' };
  const rate = temperatureDifferenceFromCelsius(RATE_C_PER_MIN, cycle.units.temperature);
  return { rate: round9(rate), because: 'taken here, as no rate is written' };
}

function perMinute(written: number, cycle: Cycle): number {
  const unit = rateUnitOf(cycle);
  const rateC = celsiusDifferenceFrom(written, unit.startsWith('°C') ? '°C' : '°F');
  return round9(temperatureDifferenceFromCelsius(rateC, cycle.units.temperature) / (unit.endsWith('/h') ? 60 : 1));
}
