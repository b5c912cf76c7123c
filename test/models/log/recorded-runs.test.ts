import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { parseLayout } from '../../../models/log/parse-layout.ts';
import { readLog } from '../../../models/log/read-log.ts';
import { refusalOf } from './logs.ts';

// Recorded runs with outcomes known by construction; where each comes from stands in its expected.json.
const FOLDER = join(import.meta.dirname, '../../golden/recorded');
const names = readdirSync(FOLDER);

function read(name: string) {
  const layout = parseLayout(JSON.parse(readFileSync(join(FOLDER, name, 'layout.json'), 'utf8')));
  return readLog([{ name: 'run.csv', chunks: [readFileSync(join(FOLDER, name, 'run.csv'))] }], layout);
}

describe('recorded runs', () => {
  it('are there', () => expect(names.length).toBeGreaterThan(50));

  it.each(names.filter((name) => name !== 'bad-cell'))(
    '%s: times rise, and are half a minute apart but for pauses',
    (name) => {
      const { timeMs } = read(name).readings;
      const steps = Array.from(timeMs.subarray(1), (time, i) => time - timeMs[i]!);
      expect(Math.min(...steps)).toBeGreaterThan(0);
      expect(steps.toSorted((a, b) => a - b)[steps.length >> 1]).toBe(
        name === 'exactly-on-the-limit' ? 60_000 : 30_000,
      );
    },
  );

  it('bad-cell is refused with its line', () => {
    expect(refusalOf(() => read('bad-cell'))).toMatchObject({ code: 'log-cell-unreadable', facts: { line: 302 } });
  });

  it('clock-set-back runs on without a step', () => {
    const log = read('clock-set-back');
    expect(log.repairs.map(({ kind }) => kind)).toEqual(['clock-set-back']);
    const { timeMs } = log.readings;
    expect(timeMs.at(-1)! - timeMs[0]!).toBe((timeMs.length - 1) * 30_000);
  });

  it('clocks-go-back runs on without a step', () => {
    const log = read('clocks-go-back');
    expect(log.repairs.map(({ kind }) => kind)).toEqual(['repeated-hour']);
    const { timeMs } = log.readings;
    expect(timeMs.at(-1)! - timeMs[0]!).toBe((timeMs.length - 1) * 30_000);
  });

  it('untidy lists what it passed over', () => {
    expect(
      read('untidy')
        .passedOver.map(({ kind }) => kind)
        .sort(),
    ).toEqual(['after-last-reading', 'blank', 'blank']);
  });
});
