import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach } from 'vitest';
// @ts-expect-error: a plain script, because it runs before anything is built
import { findSocat } from '../../support/find-socat.mjs';

const ended: (() => Promise<void>)[] = [];

afterEach(async () => {
  for (const end of ended.splice(0)) await end();
});

export interface SerialLine {
  readonly here: string;
  readonly there: string;
  /** Pulls the plug. */
  cut(): Promise<void>;
}

/** Two serial ports joined by a wire, made by socat. */
export async function serialLine(): Promise<SerialLine> {
  const socat: string | null = findSocat();
  if (socat === null) throw new Error('No socat: node test/support/find-socat.mjs says what to do');
  const folder = mkdtempSync(join(tmpdir(), 'dwellbook-line-'));
  const [here, there] = [join(folder, 'here'), join(folder, 'there')];
  const wire = spawn(socat, [`pty,raw,echo=0,link=${here}`, `pty,raw,echo=0,link=${there}`], { stdio: 'ignore' });
  const over = new Promise<void>((resolve) => wire.once('exit', () => resolve()));
  const cut = async () => {
    wire.kill();
    await over;
  };
  ended.push(async () => {
    await cut();
    rmSync(folder, { recursive: true, force: true });
  });
  while (!existsSync(here) || !existsSync(there)) await new Promise((resolve) => setTimeout(resolve, 10));
  return { here, there, cut };
}
