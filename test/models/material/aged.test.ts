import { describe, expect, it } from 'vitest';
import { agedOf } from '../../../models/material/aged.ts';
import { courseOf } from '../../../models/material/course.ts';
import type { LedgerEvent } from '../../../models/material/ledger.ts';
import type { Material } from '../../../models/material/material.ts';
import { readReference, recalledResin, referenceSets } from '../../reference/cure/reference-sets.ts';
import { kit, recordsOf, roll, TAPE } from './made-ledger.ts';

interface Row {
  set: string;
  T_C: number;
  days: number;
  a0: number;
  alpha_out: number;
}
// Source: test/reference/cure/out-time.json (SciPy DOP853 and LSODA). The sets are widened to room temperature here: what
// is held against the reference is the sum over the ledger, not whether a set is fit for it.
const rows = readReference<{ rows: Row[] }>('out-time.json').rows.filter(
  ({ set, T_C }) => set in referenceSets && T_C > 0,
);

function ledgerOut(temperature: number, from: string, until: string): LedgerEvent[] {
  return [
    { kind: 'out', at: from, room: { temperature, unit: '°C' } },
    { kind: 'in', at: until },
  ];
}

function dayOf(days: number): string {
  return new Date(Date.parse('2026-03-03T08:00:00Z') + days * 86_400_000).toISOString();
}

const END_MS = Date.parse('2026-06-01T08:00:00Z');

describe('agedOf', () => {
  it.each(rows)('$set: $days d at $T_C °C in a ledger age it to $alpha_out', ({ set, T_C, days, a0, alpha_out }) => {
    const resin = { ...recalledResin(set), initialDegree: a0, validC: [15, 180] as const };
    // The stay is cut up: out for a third, back in the freezer for a week, out again as a kit.
    const records = recordsOf([
      roll(
        'K-1',
        ...ledgerOut(T_C, dayOf(0), dayOf(days / 3)),
        ...ledgerOut(T_C, dayOf(7 + days / 3), dayOf(7 + days / 2)),
      ),
      kit('K-1A', 'K-1', dayOf(7 + days / 2), { kind: 'in', at: dayOf(7 + days) }),
    ]);
    const material: Material = { ...TAPE, resin: resin.code, out: { lifeDays: 60, atMost: 30 } };
    const aged = agedOf(courseOf(records, 'K-1A', END_MS), material, resin);
    expect(aged.basis).toBe('resin-set');
    expect(Math.abs(aged.degree! - alpha_out)).toBeLessThan(1e-8);
    expect(aged.because).toContain(`by the kinetics of the set ${resin.code}`);
  });

  it('refuses a set that was not fitted at room temperature, and says what its diffusion line would do', () => {
    const resin = { ...recalledResin('hubert_8552'), validC: [110, 190] as const };
    const records = recordsOf([roll('K-1', ...ledgerOut(21, dayOf(0), dayOf(10)))]);
    const aged = agedOf(courseOf(records, 'K-1', END_MS), { ...TAPE, resin: resin.code }, resin);
    expect(aged).toMatchObject({ degree: null, basis: null });
    expect(aged.because).toContain(
      `was fitted from 110 to 190 °C, not at 21 °C, where its diffusion line would shut the reaction down`,
    );
  });

  it('goes by the equivalent time between two measured degrees otherwise, and is labelled so', () => {
    const measured: Material = {
      ...TAPE,
      ageing: { freshDegree: 0.01, degreeAtOutLife: 0.04, source: 'DSC' },
      equivalent: {
        rule: 'two-lives',
        approvedBy: 'process engineer 1',
        lives: [
          [24, 30],
          [32, 10],
        ],
      },
    };
    const degreeAfter = (temperature: number, days: number) =>
      agedOf(
        courseOf(recordsOf([roll('K-1', ...ledgerOut(temperature, dayOf(0), dayOf(days)))]), 'K-1', END_MS),
        measured,
        null,
      );
    expect(degreeAfter(24, 10)).toMatchObject({ degree: expect.closeTo(0.02, 10), basis: 'equivalent-time' });
    expect(degreeAfter(32, 10)).toMatchObject({ degree: expect.closeTo(0.04, 10) });
    expect(degreeAfter(32, 11)).toMatchObject({ degree: null });
    expect(degreeAfter(32, 11).because).toContain('past its out-life');
    expect(degreeAfter(24, 10).because).toContain('by the equivalent-time rule');
  });

  it('has none while something of its ledger is missing', () => {
    const records = recordsOf([roll('K-1', { kind: 'out', at: dayOf(0) })]);
    const aged = agedOf(courseOf(records, 'K-1', END_MS), TAPE, null);
    expect(aged).toMatchObject({ degree: null });
    expect(aged.because).toContain('the temperature of the room is not on record');
  });
});
