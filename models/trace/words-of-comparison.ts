import type {
  ComparedNumbers,
  Comparison,
  CorrectedP,
  Counts,
  LevelRow,
  Standing,
  UntestedFactor,
} from './comparison.ts';
import type { LevelFactor, NumberFactor } from './factor.ts';

/** "6 of 7 failed parts were cured on bag line V3, against 4 of 41 sound ones." */
export function sayLevel(factor: LevelFactor, level: string, table: LevelRow['table']): string {
  const failed = `${table.failedWith} of ${table.failedWith + table.failedWithout} failed parts`;
  const sound = `${table.soundWith} of ${table.soundWith + table.soundWithout} sound ones`;
  return `${failed} ${factor.says ?? `have ${factor.name}`} ${level}, against ${sound}.`;
}

/** "Failed parts heated slower: median 1.2 K/min against 1.9 K/min of sound ones; …" */
export function sayNumber(
  factor: NumberFactor,
  found: Pick<ComparedNumbers, 'medianFailed' | 'medianSound' | 'shift' | 'superiority'>,
): string {
  const amount = (value: number) => `${sayFigure(value)}${factor.unit === '' ? '' : ` ${factor.unit}`}`;
  const medians = `median ${amount(found.medianFailed)} against ${amount(found.medianSound)} of sound ones`;
  if (found.superiority === 0.5) return `Failed parts are neither lower nor higher in ${factor.name}: ${medians}.`;
  const isLower = found.superiority < 0.5;
  const says = factor.says ?? { lower: `have the lower ${factor.name}`, higher: `have the higher ${factor.name}` };
  const { low, high, confidence } = found.shift.interval;
  const interval =
    low === null || high === null
      ? `too few for a ${sayFigure(confidence * 100)} % interval`
      : `${sayFigure(confidence * 100)} % interval ${sayFigure(low)} to ${amount(high)}`;
  return `Failed parts ${isLower ? says.lower : says.higher}: ${medians}; shift ${amount(found.shift.estimate)} (${interval}).`;
}

/** How far a factor's p can be trusted. */
export function sayEvidence(p: CorrectedP, standing: Standing, tests: number, missing: Counts, parts: Counts): string {
  const drawn = p.standardError === null ? '' : ` (from random draws, standard error ${sayFigure(p.standardError)})`;
  const figures = `${sayP('p', p.p)}${drawn}; corrected for ${count(tests, 'test')}: ${sayP('Holm', p.holm)}, ${sayP('Benjamini–Hochberg', p.benjaminiHochberg)}`;
  const words: Record<Standing, string> = {
    'stands-out': `Goes with failure, also after correction. ${figures}.`,
    'may-be-chance': `Goes with failure taken by itself, but may be chance among so many tests. ${figures}.`,
    'nothing-shown': `Not shown to go with failure. ${figures}.`,
    'too-few': `Too few to tell; listed by rarity. ${figures}.`,
  };
  return [words[standing], ...sayMissing(missing, parts)].join(' ');
}

export function sayUntested(
  { why, name }: Pick<UntestedFactor, 'why' | 'name'>,
  missing: Counts,
  parts: Counts,
): string {
  const words: Record<UntestedFactor['why'], string> = {
    'same-in-all': `${name} is the same in all parts on record.`,
    'none-shared': `No ${name} is shared by some parts and not by others.`,
    'no-failed-on-record': `${name} is on record for no failed part.`,
    'no-sound-on-record': `${name} is on record for no sound part.`,
  };
  return [startingLarge(words[why]), ...sayMissing(missing, parts)].join(' ');
}

/** What the whole comparison can and cannot show. */
export function sayComparison({
  parts,
  tests,
  leastP,
  factors,
  untested,
}: Pick<Comparison, 'parts' | 'tests' | 'leastP' | 'factors' | 'untested'>): string[] {
  const words = [
    `${count(parts.failed, 'failed part')} against ${count(parts.sound, 'sound one')}: ${count(factors.length, 'factor')} compared in ${count(tests, 'test')}, ${untested.length} not tested.`,
  ];
  const few = Math.min(parts.failed, parts.sound);
  if (few === 1) {
    const which = parts.failed === 1 ? 'failed part' : 'sound part';
    words.push(
      `With 1 ${which} nothing can be told apart: the least possible p is ${figureOfP(leastP)}, before correction. Listed by rarity.`,
    );
  } else if (leastP * tests > 0.05) {
    words.push(
      `With ${count(parts.failed, 'failed part')} nothing could stand out: the least possible p is ${figureOfP(leastP)}, ${figureOfP(Math.min(1, leastP * tests))} corrected for ${count(tests, 'test')}.`,
    );
  } else {
    words.push(`The least possible p is ${figureOfP(leastP)}, before correction.`);
  }
  words.push('What goes with failure need not be the reason for it.');
  return words;
}

/** "p = 0.0021", "Holm < 0.0001". */
export function sayP(name: string, p: number): string {
  return p < 1e-4 ? `${name} < 0.0001` : `${name} = ${figureOfP(p)}`;
}

/** A sentence begins with a capital, whatever the name it begins with. */
export function startingLarge(sentence: string): string {
  return sentence.charAt(0).toUpperCase() + sentence.slice(1);
}

export function count(n: number, what: string): string {
  return `${n} ${what}${n === 1 ? '' : 's'}`;
}

function figureOfP(p: number): string {
  return p < 1e-4 ? p.toExponential(0).replace('-', '−') : String(Number(p.toPrecision(2)));
}

/** Four figures, a true minus sign. */
function sayFigure(value: number): string {
  return String(Number(value.toPrecision(4))).replace('-', '−');
}

function sayMissing(missing: Counts, parts: Counts): string[] {
  if (missing.failed + missing.sound === 0) return [];
  return [
    `Not on record for ${missing.failed} of ${parts.failed} failed and ${missing.sound} of ${parts.sound} sound parts.`,
  ];
}
