import type { Cycle, CycleEvent, WindowLimit } from './cycle.ts';
import { eventWords, vacuumWords } from './words-of-event.ts';
import { bandWords, differenceWords } from './words-of-figures.ts';
import { forgivenessSentence } from './words-of-forgiveness.ts';

/** A pressure or vacuum window in sentences. */
export function windowSentences(cycle: Cycle, window: WindowLimit): string[] {
  const isVacuum = window.quantity === 'vacuum';
  const unit = (isVacuum ? cycle.units.vacuum : cycle.units.pressure) ?? '';
  const what = isVacuum ? 'The vacuum at the bag' : 'The vessel pressure';
  const sentences = [
    `${what} is ${bandWords(window, isVacuum ? vacuumWords(cycle) : unit)}, ends included.`,
    `From: ${definedWords(cycle, window.from)}. Until: ${definedWords(cycle, window.until)}.`,
  ];
  if (isVacuum && unit.endsWith(' abs') && window.atMost === undefined) {
    sentences.push('It only keeps the vacuum from being too deep: a bag at ambient would meet it.');
  }
  if (window.forgive !== undefined) {
    sentences.push(forgivenessSentence('excursions', window.forgive, unit));
  }
  return sentences;
}

/** An event with what its name leaves unsaid. */
function definedWords(cycle: Cycle, event: CycleEvent): string {
  const words = eventWords(cycle, event);
  if (event.at !== 'heat-on') return words;
  return `${words} (the leading judged sensor ${differenceWords(cycle, 5, 9)} above its first reading)`;
}
