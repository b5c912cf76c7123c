import { type ChildProcess, execFile, spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { afterEach } from 'vitest';

const PROGRAM = fileURLToPath(new URL('../../dist/server/main.js', import.meta.url));

export interface Ended {
  readonly status: number;
  readonly stdout: string;
  readonly stderr: string;
}

/** Runs the built program to its end. */
export function dwellbook(...words: string[]): Promise<Ended> {
  requireBuild();
  return new Promise((resolve) => {
    execFile(process.execPath, [PROGRAM, ...words], { maxBuffer: 1 << 28 }, (error, stdout, stderr) => {
      resolve({ status: error === null ? 0 : Number(error.code), stdout, stderr });
    });
  });
}

const running: ChildProcess[] = [];

afterEach(() => {
  for (const child of running.splice(0)) child.kill('SIGKILL');
});

/** Starts the built program; killed at the end of the test where it still runs. */
export function startDwellbook(...words: string[]): ChildProcess {
  requireBuild();
  const child = spawn(process.execPath, [PROGRAM, ...words], { stdio: ['ignore', 'pipe', 'pipe'] });
  running.push(child);
  return child;
}

/** The address the program says it listens at. */
export function addressOf(child: ChildProcess): Promise<string> {
  return new Promise((resolve, reject) => {
    let said = '';
    child.stdout?.on('data', (chunk: Buffer) => {
      said += chunk.toString();
      const address = /Dwellbook is at (\S+)/.exec(said)?.[1];
      if (address !== undefined) resolve(address);
    });
    child.stderr?.on('data', (chunk: Buffer) => {
      said += chunk.toString();
    });
    child.once('exit', (status) => reject(new Error(`ended with ${status}: ${said}`)));
  });
}

export function endOf(child: ChildProcess): Promise<number | null> {
  return new Promise((resolve) => child.once('exit', resolve));
}

function requireBuild(): void {
  if (!existsSync(PROGRAM)) throw new Error('The program is not built: run "npm run build" first');
}
