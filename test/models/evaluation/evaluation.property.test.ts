import { join } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Evaluation, Outcome } from '../../../models/evaluation/evaluation.ts';
import { evaluateLog, judge } from '../../../models/evaluation/judge.ts';
import type { Readings, ReadLog } from '../../../models/log/readings.ts';
import { beginRun } from '../../../models/run/digest.ts';
import { openRecordedRun } from '../../support/recorded-run.ts';

const recorded = (name: string) => openRecordedRun(join(import.meta.dirname, '../../golden/recorded', name));
const CASES = [
  'sound',
  'short-for-the-lagging',
  'dip-forgiven',
  'exotherm',
  'vacuum-lost',
  'cure-estimates',
  'mixed-load',
  'step-down',
  'mean-clock',
  'spread-while-heating',
];

function withReadings(log: ReadLog, readings: Readings): ReadLog {
  return { ...log, readings };
}

function outcomes(evaluation: Evaluation): Record<string, Outcome> {
  return Object.fromEntries(
    evaluation.parts.flatMap(({ part, findings }) =>
      findings.map(({ limit, outcome }) => [`${part} ${limit}`, outcome]),
    ),
  );
}

describe('judging', () => {
  it.each(CASES)('gives the same bytes scan by scan, asked at any scan, as in one go: %s', (name) => {
    const run = recorded(name);
    const log = run.read();
    const whole = evaluateLog(log, run.inputs);
    const { timeMs, channels } = log.readings;
    const digest = beginRun(
      channels.map(({ channel }) => channel),
      run.inputs.load,
    );
    for (let scan = 0; scan < timeMs.length; scan++) {
      digest.accept(
        timeMs[scan]!,
        channels.map(({ value }) => value[scan]!),
      );
      if (scan % 37 === 5) judge(digest, { ...run.inputs, open: true });
    }
    const folded = judge(digest, run.inputs);
    expect(
      JSON.stringify({ ...folded, log: { ...folded.log, repairs: log.repairs, passedOver: log.passedOver } }),
    ).toBe(JSON.stringify(whole));
  });

  it.each(CASES)('does not depend on the order of channels: %s', (name) => {
    const run = recorded(name);
    const log = run.read();
    const whole = outcomes(evaluateLog(log, run.inputs));
    fc.assert(
      fc.property(
        fc.shuffledSubarray([...log.readings.channels], { minLength: log.readings.channels.length }),
        (channels) => {
          expect(outcomes(evaluateLog(withReadings(log, { ...log.readings, channels }), run.inputs))).toEqual(whole);
        },
      ),
      { numRuns: 4 },
    );
  });

  it.each(CASES)('never comes to met through readings that are taken away: %s', (name) => {
    const run = recorded(name);
    const log = run.read();
    const whole = outcomes(evaluateLog(log, run.inputs));
    const scans = log.readings.timeMs.length;
    fc.assert(
      fc.property(
        fc.nat(scans - 1),
        fc.integer({ min: 1, max: 90 }),
        fc.subarray(
          log.readings.channels.map((_, i) => i),
          { minLength: 1 },
        ),
        (from, lasts, taken) => {
          const channels = log.readings.channels.map((one, i) => {
            if (!taken.includes(i)) return one;
            const value = one.value.slice();
            value.fill(Number.NaN, from, Math.min(scans, from + lasts));
            return { ...one, value };
          });
          const after = outcomes(evaluateLog(withReadings(log, { ...log.readings, channels }), run.inputs));
          for (const [limit, outcome] of Object.entries(whole)) {
            // Bridging a stretch no longer than a gap may hide a breach between readings; that is what bridging means.
            if (lasts * 0.5 <= 3) continue;
            if (outcome !== 'met' && after[limit] === 'met')
              expect.fail(
                `${limit} was ${outcome} and is met without scans ${from} to ${from + lasts} of channels ${taken}`,
              );
          }
        },
      ),
      { numRuns: 40 },
    );
  });

  it.each(CASES)(
    'moves no figure of time by more than interpolation allows when the log is resampled finer: %s',
    (name) => {
      const run = recorded(name);
      const log = run.read();
      const { timeMs, channels } = log.readings;
      const scans = 2 * timeMs.length - 1;
      const between = (values: Float64Array) =>
        Float64Array.from({ length: scans }, (_, i) =>
          i % 2 === 0 ? values[i / 2]! : (values[(i - 1) / 2]! + values[(i + 1) / 2]!) / 2,
        );
      const finer = {
        timeMs: between(timeMs),
        channels: channels.map(({ channel, value }) => ({ channel, value: between(value) })),
      };
      const [coarse, fine] = [evaluateLog(log, run.inputs), evaluateLog(withReadings(log, finer), run.inputs)];
      expect(outcomes(fine)).toEqual(outcomes(coarse));
      coarse.parts.forEach((part, p) => {
        part.stages.forEach((stage, s) => {
          const other = fine.parts[p]!.stages[s]!;
          if (stage.opens !== null)
            expect(Math.abs(Date.parse(other.opens!) - Date.parse(stage.opens))).toBeLessThanOrEqual(1);
          if (stage.minutes !== null) expect(other.minutes!).toBeCloseTo(stage.minutes, 4);
        });
      });
    },
  );
});
