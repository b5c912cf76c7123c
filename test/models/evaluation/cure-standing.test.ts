import { describe, expect, it } from 'vitest';
import type { Resin } from '../../../models/cure/resin.ts';
import { recalledResin } from '../../reference/cure/reference-sets.ts';
import { cycleOf, dwell, findingOf, judged, type MadeRun, type Vertex } from '../../support/made-run.ts';

// The rules are those of the cycle and verdict document: a recalled set is never a limit in a real workshop (§5), and a
// set that cannot be integrated is refused, not clamped.

const WARM: Vertex[] = [
  [0, 20],
  [60, 180],
  [180, 180],
  [240, 20],
];
const cycle = cycleOf([dwell()], {
  cure: { resin: 'lls_3501_6', degreeAtLeast: 0.9, pressureBeforeGel: 5 },
});
const set = recalledResin('lls_3501_6');
const runWith = (resin: Resin, more: Partial<MadeRun> = {}): MadeRun => ({
  channels: { TC1: WARM, TC2: WARM },
  cycle,
  resin,
  ...more,
});

describe('a set for trials only', () => {
  const forTrials: Resin = { ...set, forTrialsOnly: true };

  it('is no limit and bounds no window where the workshop is a real one', () => {
    for (const limit of ['cure/degree', 'cure/pressure-before-gel']) {
      const finding = findingOf(runWith(forTrials), limit)!;
      expect(finding.outcome).toBe('cannot-tell');
      expect(finding.because).toContain('recalled from memory: for tests and trials, never a limit in a real workshop');
    }
  });

  it('still gives its estimates, and is a limit where nothing says that the workshop is real', () => {
    const { parts } = judged(runWith(forTrials));
    expect(parts[0]!.cure.map(({ channel }) => channel)).toEqual(['TC1', 'TC2']);
    expect(findingOf(runWith(set), 'cure/degree')!.outcome).toBe('met');
  });
});

describe('a set that stalls', () => {
  // Half-cured 3501-6 in a freezer: the rate of its first branch is negative below 1.0432 exp(−348.8/T).
  const frozen: Vertex[] = [
    [0, -18],
    [60, -18],
  ];
  const run = runWith({ ...set, initialDegree: 0.29 }, { channels: { TC1: frozen, TC2: WARM } });

  it('is reported along the sensor it stalls at, and the others are estimated', () => {
    const part = judged(run).parts[0]!;
    expect(part.cure.map(({ channel }) => channel)).toEqual(['TC2']);
    expect(part.notEstimated).toEqual([
      { channel: 'TC1', because: expect.stringMatching(/rate of -.* at degree 0\.29/) },
    ]);
    expect(judged(runWith(set)).parts[0]).not.toHaveProperty('notEstimated');
  });

  it('tells nothing of its limits', () => {
    const finding = findingOf(run, 'cure/degree')!;
    expect([finding.outcome, finding.observed]).toEqual(['cannot-tell', null]);
    expect(finding.because).toMatch(/gives no estimate: .*-18\.00 °C/);
    const gel = findingOf(run, 'cure/pressure-before-gel')!;
    expect([gel.outcome, gel.because]).toEqual(['cannot-tell', expect.stringContaining('gives no estimate')]);
  });
});
