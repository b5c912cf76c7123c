import { describe, expect, it } from 'vitest';
import { liveApp } from './live-app.ts';
import { liveVessel, push } from './live-steps.ts';

describe('POST /api/push', () => {
  it('takes scans of the vessel whose key is shown, and of no other', async () => {
    const app = await liveApp();
    const key = await liveVessel(app);
    await liveVessel(app, 'Oven 2');
    const scans = [{ at: '2026-03-10T07:30:00Z', sequence: 4, values: { TC1: 20, TC2: null, other: 3 } }];
    expect((await push(app, key, scans)).body).toEqual({ kept: 1, known: 0, refused: [] });
    expect((await push(app, key, scans)).body).toEqual({ kept: 0, known: 1, refused: [] });
    const named = await app.send('/api/push', {
      method: 'POST',
      headers: { 'content-type': 'application/json', authorization: `Bearer ${key}` },
      body: JSON.stringify({ source: 'plc of Oven 2', scans }),
    });
    expect([named.status, named.body.detail]).toEqual([
      404,
      'No source of this vessel that is pushed is called "plc of Oven 2"',
    ]);
    const nothing = await push(app, key, [{ at: '2026-03-10T07:30:01Z', values: { tc1: 20 } }]);
    expect(nothing.body.refused).toEqual([
      { at: '2026-03-10T07:30:01.000Z', because: expect.stringContaining('none of its keys is a channel') },
    ]);
  });

  it('asks for a key that is known and not revoked', async () => {
    const app = await liveApp();
    const key = await liveVessel(app);
    const scans = [{ at: '2026-03-10T07:30:00Z', values: { TC1: 20 } }];
    const without = await app.post('/api/push', { scans });
    expect([without.status, without.headers.get('www-authenticate')]).toEqual([401, 'Bearer']);
    expect((await push(app, `${key}x`, scans)).status).toBe(401);
    expect((await push(app, key, scans)).status).toBe(200);
    const keys = (await app.get('/api/vessels/Autoclave 7/keys')).body.keys;
    expect(keys).toEqual([
      { id: 1, name: 'cell controller', made: expect.any(Object), revoked: null, lastUsed: '2026-03-10T08:00:00.000Z' },
    ]);
    expect(app.parts.db.prepare('SELECT count(*) FROM sender_keys WHERE sha256 = ?').pluck().get(key)).toBe(0);
    const revoked = await app.post('/api/vessels/Autoclave 7/keys/1/revoke', { reason: 'laptop lost' });
    expect(revoked.body.keys[0].revoked).toEqual({ at: '2026-03-10T08:00:00.000Z', by: 'inspector 2' });
    const after = await push(app, key, scans);
    expect([after.status, after.body.detail]).toEqual([403, 'The key "cell controller" was revoked']);
    expect((await app.post('/api/vessels/Autoclave 7/keys/1/revoke', { reason: 'again' })).status).toBe(409);
  });

  it('answers 507 where the disk is full, and takes the same scans when it is not', async () => {
    const app = await liveApp();
    const key = await liveVessel(app);
    const { db } = app.parts;
    const scans = Array.from({ length: 4000 }, (_, n) => ({
      at: new Date(Date.parse('2026-03-10T06:00:00Z') + 1000 * n).toISOString(),
      values: { TC1: n / 10 },
    }));
    db.pragma(`max_page_count = ${Number(db.pragma('page_count', { simple: true })) + 30}`);
    const full = await push(app, key, scans);
    expect([full.status, full.body.type]).toEqual([507, '/problems/disk-full']);
    db.pragma('max_page_count = 1073741823');
    const after = await push(app, key, scans);
    expect(after.body.kept + after.body.known).toBe(4000);
    expect(db.prepare('SELECT count(*) FROM live_scans').pluck().get()).toBe(4000);
  });
});
