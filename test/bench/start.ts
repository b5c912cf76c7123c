import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import type { BenchResult } from './result.ts';
import { inTemporaryFolder } from './temporary-workshop.ts';

const PROGRAM = fileURLToPath(new URL('../../server/main.js', import.meta.url));
const GOAL_MS = 500;

/** The least a server is: one that listens and says so. */
const BARE = "require('node:http').createServer().listen(0,'127.0.0.1',()=>console.log('Dwellbook is at'))";

/** From `node` to listening, on a workshop that is there; floor: node with a bare server. */
export async function benchStart(): Promise<BenchResult[]> {
  return inTemporaryFolder(async (folder) => {
    const serve = [PROGRAM, 'serve', '--port', '0', '--data', folder];
    const first = await startMs(serve);
    const value = await medianOf(7, () => startMs(serve));
    const floor = await medianOf(7, () => startMs(['-e', BARE]));
    return [
      {
        name: 'start',
        value,
        unit: 'ms',
        floor,
        ratio: value / floor,
        goal: `≤ ${GOAL_MS} ms`,
        holds: value <= GOAL_MS,
        note: `the first start, which makes the database, took ${first.toFixed(0)} ms`,
      },
    ];
  });
}

async function startMs(words: readonly string[]): Promise<number> {
  const startMs = performance.now();
  const child = spawn(process.execPath, words, { stdio: ['ignore', 'pipe', 'inherit'] });
  await once(child.stdout, 'data');
  const taken = performance.now() - startMs;
  child.kill('SIGTERM');
  await once(child, 'exit');
  return taken;
}

async function medianOf(times: number, measure: () => Promise<number>): Promise<number> {
  const taken: number[] = [];
  for (let n = 0; n < times; n += 1) taken.push(await measure());
  return taken.sort((a, b) => a - b)[times >> 1] ?? Number.NaN;
}
