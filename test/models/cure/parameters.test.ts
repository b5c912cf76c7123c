import { describe, expect, it } from 'vitest';
import { withParameters } from '../../../models/cure/parameters.ts';
import type { KamalSourour } from '../../../models/cure/resin.ts';
import { recalledResin } from '../../reference/cure/reference-sets.ts';

const resin = recalledResin('dusi_976');

describe('withParameters', () => {
  it('adds to a constant, or to its natural logarithm', () => {
    const moves = new Map([
      ['lnA1', Math.log(2)],
      ['E2', -100],
    ]);
    const { kinetics } = withParameters(resin, moves)!;
    expect((kinetics as KamalSourour).A1).toBeCloseTo(8800, 9);
    expect(kinetics).toMatchObject({ law: 'kamal-sourour', A2: 7050, E1: 62500, E2: 56700, m: 1.03, n: 1.22 });
    expect((resin.kinetics as KamalSourour).A1).toBe(4400);
  });

  it('knows the logarithms of an isoconversional table for no constant', () => {
    const kinetics = { law: 'isoconversional', degree: [0, 1], E: [6e4, 6e4], lnAf: [9, 9] } as const;
    expect(withParameters({ ...resin, kinetics }, new Map([['lnAf', 1]]))).toBeNull();
  });

  it('is null for what the kinetics have not, and for the logarithm of what is not above 0', () => {
    expect(withParameters(resin, new Map([['A3', 1]]))).toBeNull();
    expect(withParameters(recalledResin('lls_3501_6'), new Map([['lnA2', 1]]))).toBeNull();
  });
});
