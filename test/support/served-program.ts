import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const PROGRAM = fileURLToPath(new URL('../../dist/server/main.js', import.meta.url));

/** The built program, serving a workshop of its own on a free port of this machine. */
export interface ServedProgram {
  readonly address: string;
  readonly stop: () => Promise<void>;
}

export async function serveProgram(): Promise<ServedProgram> {
  if (!existsSync(PROGRAM)) throw new Error('The program is not built: run "npm run build" first');
  const folder = mkdtempSync(join(tmpdir(), 'dwellbook-browser-'));
  const child = spawn(process.execPath, [PROGRAM, 'serve', '--port', '0', '--data', folder], {
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const ended = new Promise<void>((resolve) => child.once('exit', () => resolve()));
  return {
    address: await addressOf(child),
    async stop() {
      child.kill('SIGTERM');
      await ended;
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

function addressOf(child: ChildProcess): Promise<string> {
  return new Promise((resolve, reject) => {
    let said = '';
    const hear = (chunk: Buffer) => {
      said += chunk.toString();
      const address = /Dwellbook is at (\S+)/.exec(said)?.[1];
      if (address !== undefined) resolve(address);
    };
    child.stdout?.on('data', hear);
    child.stderr?.on('data', hear);
    child.once('exit', (status) => reject(new Error(`the program ended with ${status}: ${said}`)));
  });
}
