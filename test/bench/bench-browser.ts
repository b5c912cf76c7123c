import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import { chromium, type Page } from 'playwright-core';
import { inTemporaryFolder } from './temporary-workshop.ts';

const PROGRAM = fileURLToPath(new URL('../../server/main.js', import.meta.url));
/** A plain script, which is not built: it stands where it was written. */
const FINDER = new URL('../../../test/support/find-chromium.mjs', import.meta.url);

/** The built program with an empty workshop, and a page of Chromium that looks at it. */
export async function inBrowser<T>(work: (origin: string, page: Page) => Promise<T>): Promise<T> {
  return inTemporaryFolder(async (folder) => {
    const child = spawn(process.execPath, [PROGRAM, 'serve', '--port', '0', '--data', folder], {
      stdio: ['ignore', 'pipe', 'inherit'],
    });
    const [said] = (await once(child.stdout, 'data')) as [Buffer];
    const origin = String(said).trim().split(' ').at(-1) ?? '';
    const { findChromium } = (await import(FINDER.href)) as { findChromium: () => string | null };
    const executablePath = findChromium();
    if (executablePath === null) throw new Error('No Chromium: node test/support/find-chromium.mjs says what to do');
    const browser = await chromium.launch({ executablePath, args: ['--no-sandbox', '--disable-gpu'] });
    try {
      const page = await browser.newPage({ baseURL: origin, viewport: { width: 1440, height: 900 } });
      return await work(origin, page);
    } finally {
      await browser.close();
      child.kill('SIGTERM');
      await once(child, 'exit');
    }
  });
}
