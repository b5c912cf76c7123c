import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { PRACTICE_CASES } from '../support/practice-cases/all-cases.ts';
import { filesOfCase } from '../support/practice-cases/files-of-case.ts';

// Whole runs from the simulator of the practice workshop, in dialects, zones and units of their own. What must come of
// each is worked out in `test/support/practice-cases` from the noise-free history, never by the engine that is tested;
// `recorded-runs.test.ts` judges them.
const FOLDER = join(import.meta.dirname, 'practice');
const { GOLDEN_ACCEPT, CI } = process.env;
const isAccepting = GOLDEN_ACCEPT === '1';

if (isAccepting && CI) throw new Error('golden files are not accepted in CI');

describe('the simulated cases', () => {
  for (const one of PRACTICE_CASES) {
    it(`${one.name} is what the simulator makes of it`, () => {
      const folder = join(FOLDER, one.name);
      const files = filesOfCase(one);
      if (isAccepting) {
        mkdirSync(folder, { recursive: true });
        for (const [name, bytes] of files) writeFileSync(join(folder, name), bytes);
      }
      expect(readdirSync(folder).sort()).toEqual([...files.keys()].sort());
      for (const [name, bytes] of files) {
        expect(Buffer.compare(readFileSync(join(folder, name)), bytes), name).toBe(0);
        expect(bytes.length).toBeLessThan(60_000);
      }
    });
  }

  it('are all there is in the folder', () => {
    expect(readdirSync(FOLDER).sort()).toEqual(PRACTICE_CASES.map(({ name }) => name).sort());
  });
});
