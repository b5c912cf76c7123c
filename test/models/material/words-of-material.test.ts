import { describe, expect, it } from 'vitest';
import { wordsOfMaterial } from '../../../models/material/words-of-material.ts';
import { TAPE } from './made-ledger.ts';

describe('wordsOfMaterial', () => {
  it('says the rules, and every default apart', () => {
    const { outAbove: _written, ...storage } = TAPE.storage;
    expect(wordsOfMaterial({ ...TAPE, storage })).toEqual({
      rules: [
        "Shelf life: 365 d from manufacture, kept at −18 °C or colder; never beyond the maker's own last day.",
        'Out-life: 30 d in a room of at most 24 °C.',
      ],
      defaults: [
        'A freezer warmer than −18 °C counts as out.',
        'Out-time begins as it leaves the freezer: thawing counts.',
        'How often it may be re-frozen is not limited.',
        'No rule for warmer rooms is approved: a minute is a minute up to 24 °C, and above it nothing can be told.',
        'It provides for no extension by re-test.',
      ],
    });
  });

  it('says what each key means once it is written', () => {
    const { rules, defaults } = wordsOfMaterial({
      ...TAPE,
      thaw: { from: 'temperature', above: 10 },
      tack: { lifeDays: 20 },
      refreezing: { atMost: 0 },
      equivalent: {
        rule: 'two-lives',
        approvedBy: 'process engineer 1',
        colderCountsLess: false,
        lives: [
          [24, 30],
          [32, 10],
        ],
      },
      extension: { times: 1, tests: ['DSC', 'tack'] },
    });
    expect(defaults).toEqual([]);
    expect(rules).toContain('It may not be re-frozen.');
    expect(rules).toContain(
      'Equivalent time, approved by process engineer 1: 30 d at 24 °C are worth 10 d at 32 °C; nothing is told above 32 °C.',
    );
    expect(rules).toContain('May be extended once by a named authority, on DSC, tack.');
  });
});
