import { uniformNumbers } from '../../models/trace/uniform-numbers.ts';
import type { AskPartsQuery } from '../../server/contract/ask.ts';
import { partsAsked } from '../../server/http/ask-handlers.ts';
import { PARTS, RUNS, writeFiftyThousand } from './fifty-thousand-parts.ts';
import type { BenchResult } from './result.ts';
import { inTemporaryFolder } from './temporary-workshop.ts';

const MOST_MS = 50;
const TIMES = 100;
const DAY_MS = 86_400_000;
const FIRST_MS = Date.parse('2017-01-01T00:00:00Z');

/** Which parts saw a roll, a tool, a thermocouple or a vessel within a year, and the latest 200 of them told. */
export async function benchReverseParts(): Promise<BenchResult[]> {
  return inTemporaryFolder(async (folder) => {
    const db = writeFiftyThousand(folder);
    const asked = questions();
    let most = 0;
    const value = p95Ms(asked, (query) => {
      most = Math.max(most, partsAsked(db, query).total);
    });
    const read = db.prepare(
      `SELECT serial, title FROM parts JOIN part_particulars ON part_id = parts.id WHERE parts.id BETWEEN 20000 AND ?`,
    );
    const floor = p95Ms(asked, () => {
      if (read.all(20_000 + most - 1).length !== most) throw new Error('the floor was not measured');
    });
    db.close();
    return [
      {
        name: 'reverse-50k',
        value,
        unit: 'ms',
        floor,
        ratio: value / floor,
        goal: `≤ ${MOST_MS} ms at p95`,
        holds: value <= MOST_MS && most > 0,
        note: `${PARTS} parts in ${RUNS} runs; up to ${most} parts found; floor: an indexed SELECT of as many rows`,
      },
    ];
  });
}

function questions(): AskPartsQuery[] {
  const random = uniformNumbers(4);
  const pick = (from: number) => Math.floor(random() * from);
  return Array.from({ length: TIMES }, (_, n) => {
    const fromMs = FIRST_MS + pick(2500) * DAY_MS;
    const vessel = `Autoclave ${1 + pick(8)}`;
    const within = {
      from: new Date(fromMs).toISOString(),
      until: new Date(fromMs + 365 * DAY_MS).toISOString(),
      limit: 200,
    };
    switch (n % 4) {
      case 0:
        return { kind: 'roll', code: `K-${pick(2000)}`, limit: 200 };
      case 1:
        return { kind: 'tool', code: `T-${pick(250)}`, ...within };
      case 2:
        return { kind: 'thermocouple', code: `TC${1 + pick(12)}`, vessel, ...within };
      default:
        return { kind: 'vessel', code: vessel, ...within };
    }
  });
}

function p95Ms<T>(asked: readonly T[], work: (one: T) => void): number {
  for (const one of asked.slice(0, 8)) work(one);
  const taken = asked.map((one) => {
    const startMs = performance.now();
    work(one);
    return performance.now() - startMs;
  });
  return taken.sort((a, b) => a - b)[Math.floor(0.95 * taken.length)] ?? Number.NaN;
}
