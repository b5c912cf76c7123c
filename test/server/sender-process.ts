import { type ChildProcess, spawn } from 'node:child_process';
import { setTimeout as wait } from 'node:timers/promises';
import { afterEach } from 'vitest';

/** What the sender says on its standard output, a JSON line each. */
export type Said = { readonly kept: readonly number[] } | { readonly refused: readonly unknown[] };

/**
 * A sender as a program of its own: it pushes scans one after another, sends again what was not answered, and writes
 * down what was. The port may change while it runs: it is asked for with every push.
 */
const SENDER = `
import { readFileSync, writeSync } from 'node:fs';
const [portFile, key, source, begunMs, channels] = process.argv.slice(1);
const say = (line) => writeSync(1, JSON.stringify(line) + '\\n');
let n = 0;
let pushes = 0;
let scans = [];
let late = [];
for (;;) {
  while (scans.length < 1 + (pushes % 4)) {
    const values = Object.fromEntries(
      Array.from({ length: Number(channels) }, (_, c) => ['t' + (c + 1), Math.round(10 * (20 + c + n / 7)) / 10]));
    // Every eleventh scan comes late, behind those after it.
    (n % 11 === 5 ? late : scans).push({ at: new Date(Number(begunMs) + 250 * n).toISOString(), sequence: n, values });
    n += 1;
  }
  if (pushes % 5 === 4) scans.push(...late.splice(0));
  try {
    const port = readFileSync(portFile, 'utf8');
    const response = await fetch('http://127.0.0.1:' + port + '/api/push', {
      method: 'POST',
      headers: { 'content-type': 'application/json', authorization: 'Bearer ' + key },
      body: JSON.stringify({ source, scans }),
    });
    const answer = await response.json();
    if (response.status >= 400 && response.status < 500) {
      say({ refused: [answer] });
      process.exit(1);
    }
    if (response.status !== 200) throw new Error(answer.title);
    if (answer.refused.length > 0) say({ refused: answer.refused });
    say({ kept: scans.map(({ sequence }) => sequence) });
    scans = [];
    pushes += 1;
  } catch {
    await new Promise((resolve) => setTimeout(resolve, 5));
  }
}
`;

export interface SenderOptions {
  /** File that holds the port the program listens at. */
  readonly portFile: string;
  readonly key: string;
  readonly source: string;
  readonly begunMs: number;
  readonly channels: number;
}

export interface Sender {
  /** Resolves when more was acknowledged than before; a refusal ends the test. */
  more(): Promise<void>;
  /** Numbers of the scans that were acknowledged so far, in the order they were. */
  readonly acknowledged: readonly number[];
  readonly refused: readonly unknown[];
  end(): Promise<void>;
}

const running: ChildProcess[] = [];

afterEach(() => {
  for (const child of running.splice(0)) child.kill('SIGKILL');
});

export function startSender({ portFile, key, source, begunMs, channels }: SenderOptions): Sender {
  const words = ['--input-type=module', '-e', SENDER, portFile, key, source, String(begunMs), String(channels)];
  const child = spawn(process.execPath, words, { stdio: ['ignore', 'pipe', 'inherit'] });
  running.push(child);
  const acknowledged: number[] = [];
  const refused: unknown[] = [];
  let left = '';
  child.stdout.on('data', (chunk: Buffer) => {
    const lines = (left + chunk.toString()).split('\n');
    left = lines.pop() ?? '';
    for (const line of lines) {
      const said = JSON.parse(line) as Said;
      if ('kept' in said) acknowledged.push(...said.kept);
      else refused.push(...said.refused);
    }
  });
  const more = async () => {
    const before = acknowledged.length;
    while (acknowledged.length === before) {
      if (refused.length > 0) throw new Error(`the sender was refused: ${JSON.stringify(refused)}`);
      await wait(2);
    }
  };
  return { acknowledged, refused, more, end: () => ended(child) };
}

function ended(child: ChildProcess): Promise<void> {
  return new Promise((resolve) => {
    child.once('close', () => resolve());
    child.kill('SIGTERM');
  });
}
