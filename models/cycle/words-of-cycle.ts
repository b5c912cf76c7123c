import type { Cycle, Stage } from './cycle.ts';
import { defaultSentences } from './words-of-defaults.ts';
import { dwellSentences } from './words-of-dwell.ts';
import { vacuumWords } from './words-of-event.ts';
import { rateUnitOf } from './words-of-figures.ts';
import { type NamedSentences, otherSentences } from './words-of-others.ts';
import { rateStageSentences } from './words-of-rate.ts';
import { windowSentences } from './words-of-window.ts';

/** A cycle in plain words, laid out so that a page can place it and a record can print it. */
export interface CycleWords {
  readonly title: string;
  /** Where it comes from, its units, and who is judged. */
  readonly opening: readonly string[];
  readonly stages: readonly (NamedSentences & { readonly kind: Stage['kind'] })[];
  readonly windows: readonly NamedSentences[];
  readonly others: readonly NamedSentences[];
  /** What the document does not write, and what then holds. */
  readonly assumptions: readonly string[];
}

/** Says a cycle in plain words, every default included. */
export function wordsOfCycle(cycle: Cycle): CycleWords {
  return {
    title: `${cycle.code} issue ${cycle.issue}: ${cycle.title}`,
    opening: openingSentences(cycle),
    stages: cycle.stages.map((stage) => ({
      name: stage.name,
      kind: stage.kind,
      sentences: stage.kind === 'dwell' ? dwellSentences(cycle, stage) : rateStageSentences(cycle, stage),
    })),
    windows: (cycle.windows ?? []).map((window) => ({
      name: window.name,
      sentences: windowSentences(cycle, window),
    })),
    others: otherSentences(cycle),
    assumptions: defaultSentences(cycle),
  };
}

function openingSentences(cycle: Cycle): string[] {
  const sentences: string[] = [];
  if (cycle.origin !== undefined) {
    const { document, issue, clause } = cycle.origin;
    const where = [document, issue && `issue ${issue}`, clause && `clause ${clause}`].filter(Boolean).join(', ');
    sentences.push(`Written from ${where}.`);
  }
  const { temperature, pressure, vacuum } = cycle.units;
  const units = [`temperatures in ${temperature}`, `rates in ${rateUnitOf(cycle)}`, 'times in minutes'];
  if (pressure !== undefined) {
    units.push(`vessel pressure in ${pressure}${pressure.endsWith(' abs') ? '' : ' (gauge)'}`);
  }
  if (vacuum !== undefined) units.push(`vacuum in ${vacuumWords(cycle)}`);
  sentences.push(`Figures as written: ${units.join(', ')}.`);
  sentences.push(`Each part is judged by the ${cycle.judgedBy} thermocouples attached to it.`);
  return sentences;
}
