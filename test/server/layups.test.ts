import Database from 'better-sqlite3';
import { describe, expect, it } from 'vitest';
import { applyMigrations, readMigrations } from '../../server/store/migrations.ts';
import { type LiveApp, liveApp, NOW } from './live-app.ts';
import { recordMade } from './made-thickness.ts';

const DEED = { at: NOW, by: 'inspector 2' };
const LAMINATE = {
  name: 'carbon/epoxy',
  densityKgM3: 1570,
  specificHeatJKgK: 1000,
  conductivityWMK: 0.62,
  resinDensityKgM3: 1270,
  source: 'data sheet, issue 3',
};
const LAYUP = {
  tool: 'T-7',
  workOrder: 'W-9',
  customer: 'the pier',
  thicknessMm: 28,
  plies: 140,
  fibreFraction: 0.58,
  laminate: LAMINATE,
  beganAt: '2026-03-01T08:00:00.000Z',
  endedAt: '2026-03-01T15:30:00.000Z',
  roomC: 21.5,
  humidityPercent: 48,
  debulks: [
    { at: '2026-03-01T10:00:00.000Z', minutes: 15, vacuum: 0.9, vacuumUnit: 'bar' },
    { at: null, minutes: 20, vacuum: null, vacuumUnit: null },
  ],
};

const lay = (app: LiveApp, serial: string, body: object) => app.post(`/api/parts/${serial}/layup`, body);

describe('a lay-up', () => {
  it('is kept whole, before any run names the part, and stands on its page', async () => {
    const app = await liveApp();
    const kept = await lay(app, 'RS-1', { ...LAYUP, title: 'Stock', drawing: 'D-1', drawingIssue: 'A' });
    expect(kept.status, kept.text).toBe(201);
    const layup = { ...LAYUP, reason: null, deed: DEED };
    expect(kept.body).toEqual({
      serial: 'RS-1',
      known: true,
      title: 'Stock',
      drawing: 'D-1',
      drawingIssue: 'A',
      tool: 'T-7',
      layup,
      earlier: [],
      similar: null,
    });
    const part = (await app.get('/api/parts/RS-1')).body;
    expect(part).toMatchObject({ title: 'Stock', tool: 'T-7', toolRecord: null, layup, runs: [] });
    expect(part.audit.map(({ verb }: never) => verb)).toEqual(['set-layup']);
  });

  it('asks nothing, and takes what was left empty as not on record', async () => {
    const app = await liveApp();
    const { status, body } = await lay(app, 'RS-1', {});
    expect(status).toBe(201);
    expect(body.layup).toMatchObject({ tool: null, thicknessMm: null, laminate: null, debulks: [], roomC: null });
  });

  it('is put right by another that says why; the one before stays', async () => {
    const app = await liveApp();
    await lay(app, 'RS-1', LAYUP);
    const silent = await lay(app, 'RS-1', { ...LAYUP, thicknessMm: 30 });
    expect([silent.status, silent.body.type]).toEqual([409, '/problems/state-conflict']);
    const { body } = await lay(app, 'RS-1', { ...LAYUP, thicknessMm: 30, reason: 'measured after trimming' });
    expect(body.layup).toMatchObject({ thicknessMm: 30, reason: 'measured after trimming' });
    expect(body.earlier).toEqual([{ ...LAYUP, reason: null, deed: DEED }]);
    const db = app.parts.db;
    expect(() => db.exec('UPDATE part_layups SET thickness_mm = 1')).toThrow('a lay-up is never updated');
    expect(() => db.exec('DELETE FROM layup_debulks')).toThrow('a lay-up is never deleted');
  });

  it('is offered to the next part of the same drawing or tool, both before one', async () => {
    const app = await liveApp();
    await lay(app, 'RS-1', { ...LAYUP, drawing: 'D-1' });
    await lay(app, 'RS-2', { ...LAYUP, drawing: 'D-1', tool: 'T-8', thicknessMm: 29 });
    const similar = async (query: string) =>
      (await app.get(`/api/parts/RS-3/layup?${query}`)).body as { known: boolean; similar: { serial: string } };
    expect(await similar('')).toMatchObject({ known: false, layup: null, similar: null });
    expect((await similar('drawing=D-1')).similar).toMatchObject({ serial: 'RS-2', shares: ['drawing'] });
    expect((await similar('tool=T-7')).similar).toMatchObject({ serial: 'RS-1', shares: ['tool'] });
    expect((await similar('drawing=D-1&tool=T-7')).similar).toMatchObject({
      serial: 'RS-1',
      shares: ['drawing', 'tool'],
      layup: { thicknessMm: 28 },
    });
    expect((await similar('drawing=D-2')).similar).toBeNull();
  });

  it.each([
    ['the future', { endedAt: '2026-03-11T08:00:00Z' }, 'lies in the future'],
    ['a debulk of tomorrow', { debulks: [{ at: '2026-03-11T08:00:00Z' }] }, 'debulk 1 lies in the future'],
    ['an end before the beginning', { endedAt: '2026-03-01T07:00:00Z' }, 'ended before it began'],
    ['a vacuum without its unit', { debulks: [{ vacuum: 0.9 }] }, 'figure and its unit'],
  ])('refuses %s', async (_what, change, says) => {
    const app = await liveApp();
    const { status, body } = await lay(app, 'RS-1', { ...LAYUP, ...change });
    expect(status).toBe(400);
    expect(body.detail).toContain(says);
    expect((await app.get('/api/parts/RS-1')).status).toBe(404);
  });

  it.each([
    ['g/cm³ for kg/m³', { laminate: { ...LAMINATE, densityKgM3: 1.57 } }, '#/laminate/densityKgM3', 'kg/m³'],
    ['kJ for J', { laminate: { ...LAMINATE, specificHeatJKgK: 1 } }, '#/laminate/specificHeatJKgK', 'J/(kg K)'],
    ['per cent for a share', { fibreFraction: 58 }, '#/fibreFraction', '0.01 to 0.9'],
    ['°F for °C', { roomC: 72 }, '#/roomC', '-30 to 60 °C'],
    ['a laminate without its source', { laminate: { ...LAMINATE, source: ' ' } }, '#/laminate/source', ''],
    ['half a ply', { plies: 1.5 }, '#/plies', ''],
  ])('catches %s and names the place', async (_what, change, pointer, says) => {
    const app = await liveApp();
    const { status, body } = await lay(app, 'RS-1', { ...LAYUP, ...change });
    expect(status).toBe(400);
    expect(body.errors).toEqual([{ pointer, detail: expect.stringContaining(says) }]);
  });
});

describe('tools', () => {
  it('come on record by being named, and gather what is known of them', async () => {
    const app = await liveApp();
    await lay(app, 'RS-1', LAYUP);
    expect((await app.get('/api/tools')).body.tools).toEqual([{ code: 'T-7', record: null, parts: 1 }]);
    const material = { name: 'Invar 36', densityKgM3: 8100, specificHeatJKgK: 515, conductivityWMK: 10.5, source: 'x' };
    const record = { title: 'Mould', drawing: 'TD-1', thicknessMm: 12, material };
    const set = await app.post('/api/tools/T-7', record);
    expect(set.status, set.text).toBe(201);
    expect(set.body).toMatchObject({ code: 'T-7', record: { ...record, reason: null, deed: DEED }, earlier: [] });
    expect(set.body.parts.map(({ serial }: never) => serial)).toEqual(['RS-1']);
    expect((await app.post('/api/tools/T-7', record)).status).toBe(409);
    const again = await app.post('/api/tools/T-7', { ...record, thicknessMm: 10, reason: 'machined down' });
    expect(again.body).toMatchObject({ record: { thicknessMm: 10 }, earlier: [{ thicknessMm: 12 }] });
    expect((await app.get('/api/tools/T-8')).status).toBe(404);
    expect((await app.get('/api/find?code=t-7')).body.hits).toEqual([
      { kind: 'tool', title: 'Tool T-7', page: '/tools/T-7', exact: true },
    ]);
  });
});

describe('tools named by loads before there were records of them', () => {
  it('are rows of their own once the database is brought up', () => {
    const db = new Database(':memory:');
    const steps = readMigrations();
    const at = steps.findIndex(({ name }) => name.endsWith('tools-and-layups'));
    applyMigrations(db, NOW, steps.slice(0, at));
    db.exec("INSERT INTO parts VALUES (1, 'P-1'), (2, 'P-2'), (3, 'P-3')");
    const insert = db.prepare('INSERT INTO part_particulars (part_id, tool, at, by) VALUES (?, ?, ?, ?)');
    for (const [part, tool] of [
      [1, 'T-2'],
      [2, 'T-1'],
      [3, 'T-2'],
      [3, null],
    ]) {
      insert.run(part, tool, NOW, 'someone');
    }
    applyMigrations(db, NOW);
    expect(db.prepare('SELECT code FROM tools ORDER BY code').pluck().all()).toEqual(['T-1', 'T-2']);
  });
});

describe('coupons and work after cure', () => {
  it('are tied to their part and its run, and put right by another row', async () => {
    const app = await liveApp();
    const run = await recordMade(
      app,
      [
        {
          name: 'AIR',
          role: 'air',
          corners: [
            [0, 20],
            [600, 30],
          ],
        },
      ],
      { part: 'RS-1' },
    );
    const coupon = { code: 'C-1', run, position: 'beside the root' };
    const set = await app.post('/api/parts/RS-1/coupons', coupon);
    expect(set.status, set.text).toBe(201);
    expect(set.body.coupons).toEqual([{ ...coupon, reason: null, deed: DEED }]);
    expect((await app.get('/api/find?code=c-1')).body.hits[0]).toMatchObject({ kind: 'coupon', page: '/parts/RS-1' });
    expect((await app.post('/api/parts/RS-1/coupons', coupon)).status).toBe(409);
    expect((await app.post('/api/parts/RS-9/coupons', coupon)).status).toBe(404);
    await lay(app, 'RS-2', {});
    const wrong = await app.post('/api/parts/RS-2/coupons', { ...coupon, reason: 'it was beside RS-2' });
    expect([wrong.status, wrong.body.type]).toEqual([422, '/problems/part-unknown']);
    const moved = await app.post('/api/parts/RS-2/coupons', { code: 'C-1', reason: 'it was beside RS-2' });
    expect(moved.body.coupons).toMatchObject([{ code: 'C-1', run: null }]);
    expect((await app.get('/api/parts/RS-1')).body.coupons).toEqual([]);

    const work = { work: 'trimming', text: 'edges', at: '2026-03-05T09:00:00.000Z' };
    const [first] = (await app.post('/api/parts/RS-1/works', work)).body.works;
    expect(first).toEqual({ ...work, id: expect.any(Number), reason: null, deed: DEED });
    const right = { ...work, text: 'edges and holes', replaces: first.id };
    expect((await app.post('/api/parts/RS-1/works', right)).status).toBe(400);
    const put = await app.post('/api/parts/RS-1/works', { ...right, reason: 'holes forgotten' });
    expect(put.body.works).toMatchObject([{ text: 'edges and holes', reason: 'holes forgotten' }]);
    expect((await app.post('/api/parts/RS-1/works', { ...right, reason: 'twice' })).status).toBe(409);
    expect((await app.post('/api/parts/RS-1/works', { ...work, at: '2026-04-01T00:00:00Z' })).status).toBe(400);
  });
});
