import type { DwellStage } from '../cycle/cycle.ts';
import { bandWords } from '../cycle/words-of-figures.ts';
import { bandInWords } from './clock.ts';
import { type DwellTime, showsCooling } from './dwell-time.ts';
import type { Dwells, WorkedDwell } from './dwells.ts';
import type { Outcome } from './evaluation.ts';
import { say, sayBeside } from './finding.ts';
import type { Judgement } from './judgement.ts';
import { neverOpened } from './never-opened.ts';

/** What the time of a dwell came to, and the least and the most that the readings leave open. */
export interface TimeFound {
  readonly outcome: Outcome;
  readonly low: number;
  readonly high: number | null;
}

/** Why the time of a dwell is as it is: what was counted between whom, or what keeps it open. */
export function dwellTimeInWords(j: Judgement, dwells: Dwells, index: number, found: TimeFound): string {
  const stage = dwells.stages[index]!;
  const { time: seen, clock, course } = dwells.at(index, 'least');
  const most = dwells.at(index, 'most').time;
  const asked = `${bandWords(stage.time!, 'min')} asked`;
  if (seen.opensMs === null && most.opensMs === null) {
    const end = j.isOpen || showsCooling(j) ? '' : '; the record does not show the cooling';
    return `${neverOpened(j, course).because}${end}; ${asked}.`;
  }
  if (seen.opensMs !== null && seen.closesMs !== null && seen.closesMs < seen.opensMs) {
    return `${clock.closing?.by ?? 'A sensor'} left ${stage.name} before ${clock.openedBy ?? 'the last'} came in, so no time counts; ${asked}.`;
  }
  const { outcome } = found;
  if (!seen.hasEnded && outcome !== 'not-met' && outcome !== 'met') {
    const stopped = j.isOpen ? 'the dwell goes on' : 'the log stops inside the dwell';
    return `At least ${say(seen.minutes)} min seen; ${stopped}; ${asked}.`;
  }
  if (outcome === 'cannot-tell') {
    const band = bandInWords(stage, j.cycle.units.temperature);
    return `${say(seen.minutes)} min seen in ${band}${whatIsOpen(seen, most, found)}; ${asked}.`;
  }
  return `${counted(seen, stage)}${betweenWhom(stage, clock)}; ${asked}.`;
}

function whatIsOpen(seen: DwellTime, most: DwellTime, { low, high }: TimeFound): string {
  if (most.minutes > seen.minutes) return `, and up to ${say(most.minutes)} min if what gaps hide was in band`;
  if (high === null || high <= low) return '';
  return `, and ${say(low)} to ${say(high)} min by the uncertainty of the readings`;
}

function counted({ minutes, dips }: DwellTime, stage: DwellStage): string {
  const length = `${sayBeside(minutes, stage.time!)} min`;
  if (stage.counting === 'each') return `${length} on the sensor that gathered least`;
  const stops = dips.filter(({ isForgiven }) => !isForgiven).length;
  const forgiven = dips.length - stops;
  const many = (count: number) => (count === 1 ? 'one dip' : `${count} dips`);
  const notes = [
    ...(stops > 0 ? [`${many(stops)} stopped the clock`] : []),
    ...(forgiven > 0 ? [`${many(forgiven)} forgiven`] : []),
  ];
  const how = stage.counting === 'accumulated' ? 'altogether' : 'unbroken';
  return `${length} ${how}${notes.length === 0 ? '' : ` (${notes.join(', ')})`}`;
}

function betweenWhom({ counting }: DwellStage, { openedBy, closing }: WorkedDwell['clock']): string {
  if (counting === 'each' || openedBy === null) return '';
  if (closing === null) return `, since ${whoInWords(openedBy)} came in`;
  if (closing.by === openedBy) return `, while ${whoInWords(openedBy)} was in`;
  return `, between ${whoInWords(openedBy)} coming in and ${whoInWords(closing.by ?? 'the last')} leaving`;
}

function whoInWords(name: string): string {
  return name === 'mean' || name === 'coldest air' ? `the ${name}` : name;
}
