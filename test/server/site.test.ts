import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { freshFolder } from './fresh-database.ts';
import { liveApp } from './live-app.ts';

function site(): string {
  const folder = join(freshFolder(), 'web');
  mkdirSync(join(folder, 'assets'), { recursive: true });
  writeFileSync(join(folder, 'index.html'), '<!doctype html><title>Dwellbook</title>');
  writeFileSync(join(folder, 'assets', 'main-1a2b.js'), 'export {};');
  writeFileSync(join(folder, '..', 'secret.txt'), 'not for browsers');
  return folder;
}

describe('the site', () => {
  it('serves the one page at every address that is none of the server’s own', async () => {
    const app = await liveApp({ siteFolder: site() });
    for (const path of ['/', '/runs/7', '/parts/SR-0417', '/cycles/SR-180/B']) {
      const { status, text, headers } = await app.get(path);
      expect([path, status, text]).toEqual([path, 200, '<!doctype html><title>Dwellbook</title>']);
      expect(headers.get('cache-control')).toBe('no-cache');
    }
    expect((await app.get('/api/nothing')).status).toBe(404);
  });

  it('keeps what carries a hash in its name for good, and says where there is none', async () => {
    const app = await liveApp({ siteFolder: site() });
    const script = await app.get('/assets/main-1a2b.js');
    expect([script.status, script.headers.get('cache-control')]).toEqual([200, 'public, max-age=31536000, immutable']);
    const missing = await app.get('/assets/main-0000.js');
    expect([missing.status, missing.body.type]).toEqual([404, '/problems/not-found']);
  });

  it('gives nothing beside its folder', async () => {
    const app = await liveApp({ siteFolder: site() });
    for (const path of ['/..%2fsecret.txt', '/assets/..%2f..%2fsecret.txt', '/%2e%2e/secret.txt']) {
      expect((await app.get(path)).text).not.toContain('not for browsers');
    }
  });
});
