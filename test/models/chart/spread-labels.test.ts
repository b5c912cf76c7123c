import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { spreadLabels } from '../../../models/chart/spread-labels.ts';

const seed = 20260302;
const room = { apart: 10, lowest: 0, highest: 200 };
const places = fc.array(fc.integer({ min: -20, max: 220 }), { minLength: 1, maxLength: 18 });
const cost = (a: readonly number[], b: readonly number[]) => a.reduce((sum, v, i) => sum + (v - b[i]!) ** 2, 0);
const isAllowed = (spread: readonly number[], order: readonly number[]) =>
  order.every(
    (i, rank) =>
      spread[i]! >= room.lowest - 1e-9 &&
      spread[i]! <= room.highest + 1e-9 &&
      (rank === 0 || spread[i]! - spread[order[rank - 1]!]! >= room.apart - 1e-9),
  );

describe('spreadLabels', () => {
  it('keeps labels apart, in order and inside', () => {
    fc.assert(
      fc.property(places, (wanted) => {
        const order = wanted.map((_, i) => i).sort((a, b) => wanted[a]! - wanted[b]! || a - b);
        expect(isAllowed(spreadLabels(wanted, room), order)).toBe(true);
      }),
      { seed, numRuns: 500 },
    );
  });

  it('leaves labels that do not overlap where they belong', () => {
    expect(spreadLabels([150, 20, 40], room)).toEqual([150, 20, 40]);
  });

  it('moves two labels of one place equally far', () => {
    expect(spreadLabels([100, 100], room)).toEqual([95, 105]);
  });

  it('stands evenly from end to end where there is no room', () => {
    expect(spreadLabels([5, 5, 5], { apart: 10, lowest: 0, highest: 10 })).toEqual([0, 5, 10]);
    expect(spreadLabels([7], { apart: 10, lowest: 0, highest: 5 })).toEqual([5]);
    expect(spreadLabels([], room)).toEqual([]);
  });

  // The problem is convex, so no small allowed move may bring the labels nearer (first-order optimality).
  it('finds no allowed move that brings the labels nearer', () => {
    fc.assert(
      fc.property(
        places,
        fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 18, maxLength: 18 }),
        (wanted, moves) => {
          const order = wanted.map((_, i) => i).sort((a, b) => wanted[a]! - wanted[b]! || a - b);
          const spread = spreadLabels(wanted, room);
          for (const scale of [1, 0.1, 0.01]) {
            const moved = spread.map((v, i) => v + scale * moves[i]!);
            if (isAllowed(moved, order))
              expect(cost(moved, wanted)).toBeGreaterThanOrEqual(cost(spread, wanted) - 1e-6);
          }
          for (const shift of [-0.5, 0.5]) {
            for (let from = 0; from < order.length; from++) {
              for (let until = from + 1; until <= order.length; until++) {
                const block = new Set(order.slice(from, until));
                const moved = spread.map((v, i) => (block.has(i) ? v + shift : v));
                if (isAllowed(moved, order))
                  expect(cost(moved, wanted)).toBeGreaterThanOrEqual(cost(spread, wanted) - 1e-6);
              }
            }
          }
        },
      ),
      { seed, numRuns: 300 },
    );
  });
});
