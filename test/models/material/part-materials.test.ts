import { describe, expect, it } from 'vitest';
import { isCured } from '../../../models/material/part-materials.ts';

const ms = Date.parse;
const cures = [
  { fromMs: ms('2026-03-03T08:00:00Z'), untilMs: ms('2026-03-03T15:00:00Z') },
  { fromMs: ms('2026-03-20T08:00:00Z'), untilMs: ms('2026-03-20T15:00:00Z') },
];

describe('isCured', () => {
  it.each([
    ['laid before a cure that had ended', '2026-03-02T10:00:00Z', '2026-03-20T08:00:00Z', true],
    ['laid before a cure that goes on', '2026-03-02T10:00:00Z', '2026-03-03T12:00:00Z', false],
    ['laid anew after it, for a repair', '2026-03-19T10:00:00Z', '2026-03-20T08:00:00Z', false],
    ['laid anew, and cured by the second', '2026-03-19T10:00:00Z', '2026-04-01T08:00:00Z', true],
    ['never dated: there from the first', undefined, '2026-03-20T08:00:00Z', true],
    ['never dated, before the first cure', undefined, '2026-03-03T08:00:00Z', false],
  ])('%s', (_what, laidUpFrom, by, expected) => {
    const use = { item: 'K-1', ...(laidUpFrom === undefined ? {} : { laidUpFrom }) };
    expect(isCured(use, cures, ms(by))).toBe(expected);
  });
});
