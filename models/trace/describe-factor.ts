import { shareDifference, type TestedLevels } from './compare-levels.ts';
import type { TestedNumbers } from './compare-numbers.ts';
import type { ComparedFactor, CorrectedP, Counts, LevelTest, Standing } from './comparison.ts';
import { countOfFailedWith, type TwoByTwo } from './fisher-exact.ts';
import { oddsRatio } from './odds-ratio.ts';
import { type PValue, TELLING_P } from './p-value.ts';
import { riskDifference } from './risk-difference.ts';
import { sayEvidence, sayLevel, sayNumber } from './words-of-comparison.ts';

/** A factor's tests, as found. */
export type Tested = TestedLevels | TestedNumbers;

/** All probabilities of a factor that count as tests. */
export function testsOf(found: Tested): PValue[] {
  if (found.kind === 'number') return [found.rankSum.value];
  return [...found.levels.map(({ value }) => value), found.overall].filter((value) => value !== null);
}

/** A tested factor with corrected probabilities, effects and words. */
export function describeFactor(
  found: Tested,
  corrected: ReadonlyMap<PValue, CorrectedP>,
  { onRecord, missing }: { readonly onRecord: Counts; readonly missing: Counts },
  all: Counts,
  confidence: number,
): ComparedFactor {
  const p = testsOf(found)
    .map((value) => corrected.get(value)!)
    .reduce((least, each) => (each.p < least.p ? each : least));
  const standing = standingOf(p, onRecord);
  const evidence = sayEvidence(p, standing, corrected.size, missing, all);
  const common = { name: found.factor.name, onRecord, missing, p, standing, evidence };
  if (found.kind === 'number') {
    const { factor, medianFailed, medianSound, shift, rankSum } = found;
    const { superiority, rankSteps } = rankSum;
    const measured = { medianFailed, medianSound, shift, superiority };
    const strength = Math.abs(2 * superiority - 1);
    const sentence = sayNumber(factor, measured);
    return { ...common, kind: 'number', unit: factor.unit, ...measured, rankSteps, strength, sentence };
  }
  const levels = found.levels.map(({ level, table, value }) => ({
    level,
    table,
    test: value === null ? null : { p: corrected.get(value)!, ...effectsOf(table, confidence) },
    sentence: sayLevel(found.factor, level, table),
  }));
  const [first] = levels;
  return {
    ...common,
    kind: 'level',
    levels,
    overall: found.overall === null ? null : corrected.get(found.overall)!,
    strength: Math.abs(shareDifference(first!.table)),
    sentence: first!.sentence,
  };
}

function effectsOf(table: TwoByTwo, confidence: number): Omit<LevelTest, 'p'> {
  const { failedWith, failedWithout, soundWith, soundWithout } = table;
  return {
    oddsRatio: oddsRatio(countOfFailedWith(table), failedWith, confidence),
    riskDifference: riskDifference(
      { having: failedWith, of: failedWith + soundWith },
      { having: failedWithout, of: failedWithout + soundWithout },
      confidence,
    ),
  };
}

function standingOf(p: CorrectedP, { failed, sound }: Counts): Standing {
  if (failed === 1 || sound === 1) return 'too-few';
  return p.holm <= TELLING_P ? 'stands-out' : p.p <= TELLING_P ? 'may-be-chance' : 'nothing-shown';
}
