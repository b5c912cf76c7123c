import { describe, expect, it } from 'vitest';
import { liveApp, NOW } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';
import { loadCase, recordCase } from './workshop-steps.ts';

const DEED = { at: NOW, by: 'inspector 2' };

const RESIN = {
  format: 'dwellbook-resin/1',
  code: 'skerry-180',
  name: 'Practice 180 °C epoxy',
  source: { citation: 'invented for practice', status: 'recalled' },
  initialDegree: 0.01,
  gasConstant: 8.314462618,
  kinetics: { law: 'nth-order', A: 2600, E: 61300, n: 1 },
};

describe('cycles', () => {
  it('come in as drafts, can be replaced until released, and are frozen then', async () => {
    const app = await liveApp();
    const { cycle } = recordedCase('must-work');
    const draft = await app.post('/api/cycles', { document: cycle });
    expect([draft.status, draft.body.status, draft.body.history]).toEqual([
      201,
      'draft',
      [{ status: 'draft', reason: null, deed: DEED }],
    ]);
    expect(draft.body.document).toEqual(cycle);
    expect((await app.post('/api/cycles', { document: cycle })).body.type).toBe('/problems/already-recorded');
    const mended = await app.post('/api/cycles', { document: { ...cycle, ceiling: 191 } });
    expect(mended.body.sha256).not.toBe(draft.body.sha256);

    const released = await app.post('/api/cycles/SR-180/B/release', { reason: 'As the specification has it' });
    expect([released.status, released.body.status, released.body.sha256]).toEqual([
      201,
      'released',
      mended.body.sha256,
    ]);
    const late = await app.post('/api/cycles', { document: { ...cycle, ceiling: 192 } });
    expect([late.status, late.body.type]).toEqual([409, '/problems/state-conflict']);
    expect((await app.post('/api/cycles/SR-180/B/release', { reason: 'again' })).status).toBe(409);
    expect(() => app.parts.db.exec("UPDATE cycles SET title = 'other'")).toThrow(/frozen/);

    await app.post('/api/cycles', { document: { ...cycle, issue: 'C' } });
    const seen = (await app.get('/api/cycles/SR-180/B')).body;
    expect(seen.issues.map(({ issue, status }: never) => [issue, status])).toEqual([['C', 'draft']]);
    expect((await app.get('/api/cycles')).body.cycles.map(({ issue }: never) => issue)).toEqual(['C', 'B']);
  });

  it('are no longer taken for a load once withdrawn, and what they judged stays', async () => {
    const app = await liveApp();
    const run = await recordCase(app, 'must-work');
    await app.post('/api/cycles/SR-180/B/release', { reason: 'ready' });
    await loadCase(app, run, 'must-work');
    await app.post('/api/cycles/SR-180/B/withdraw', { reason: 'issue C holds' });
    const again = await loadCase(app, run, 'must-work', { reason: 'try' });
    expect(again.body.type).toBe('/problems/state-conflict');
    const cycle = (await app.get('/api/cycles/SR-180/B')).body;
    expect([cycle.status, cycle.runs, cycle.latestRuns.length]).toEqual(['withdrawn', 1, 1]);
    expect((await app.post(`/api/runs/${run}/evaluations`, {})).status).toBe(201);
  });
});

describe('resins', () => {
  it('come in once, are never changed, and say which cycles estimate with them', async () => {
    const app = await liveApp();
    const { cycle } = recordedCase('must-work');
    const resin = await app.post('/api/resins', { document: RESIN });
    expect([resin.status, resin.body.document, resin.body.cycles]).toEqual([201, RESIN, []]);
    const other = { ...RESIN, initialDegree: 0.02 };
    expect((await app.post('/api/resins', { document: other })).body.type).toBe('/problems/already-recorded');
    await app.post('/api/cycles', { document: { ...cycle, cure: { resin: 'skerry-180', degreeAtLeast: 0.9 } } });
    const listed = (await app.get('/api/resins')).body.resins;
    expect(listed.map(({ code, cycles }: never) => [code, cycles])).toEqual([
      ['skerry-180', [{ code: 'SR-180', issue: 'B' }]],
    ]);
  });

  it('recalled from memory never stand behind a released limit of a real workshop', async () => {
    const app = await liveApp();
    const { cycle } = recordedCase('must-work');
    await app.post('/api/cycles', { document: { ...cycle, cure: { resin: 'skerry-180', degreeAtLeast: 0.9 } } });
    expect((await app.post('/api/cycles/SR-180/B/release', { reason: 'ready' })).status).toBe(404);
    await app.post('/api/resins', { document: RESIN });
    expect((await app.post('/api/cycles/SR-180/B/release', { reason: 'ready' })).body.type).toBe(
      '/problems/state-conflict',
    );
    const published = { ...RESIN, code: 'other', source: { citation: 'a paper', status: 'published' } };
    await app.post('/api/resins', { document: published });
    await app.post('/api/cycles', { document: { ...cycle, cure: { resin: 'other', degreeAtLeast: 0.9 } } });
    expect((await app.post('/api/cycles/SR-180/B/release', { reason: 'ready' })).status).toBe(201);
  });
});

describe('recorders', () => {
  it('keep the layout their files are read by, and those before it', async () => {
    const app = await liveApp();
    const { layout } = recordedCase('must-work');
    await app.post('/api/vessels', { name: 'Oven 2', kind: 'oven' });
    const added = await app.post('/api/recorders', { name: 'Oven 2 recorder', vessel: 'Oven 2', layout });
    expect([added.status, added.body.layout.document, added.body.vessel]).toEqual([201, layout, 'Oven 2']);
    const withParts = {
      ...layout,
      missing: ['OPEN'],
      channels: layout.channels.map((channel) => ({ ...channel, parts: ['SR-1'] })),
    };
    const kept = await app.post('/api/recorders/Oven%202%20recorder/layouts', { layout: withParts });
    expect(kept.body.layout.document).toEqual({ ...layout, missing: ['OPEN'] });
    expect(kept.body.earlierLayouts.map(({ document }: never) => document)).toEqual([layout]);
    const again = await app.post('/api/recorders/Oven%202%20recorder/layouts', {
      layout: { ...layout, missing: ['OPEN'] },
    });
    expect(again.body.earlierLayouts.length).toBe(1);
    expect((await app.post('/api/recorders', { name: 'Oven 2 recorder' })).status).toBe(409);
    expect((await app.post('/api/recorders/none/layouts', { layout })).status).toBe(404);
  });
});

describe('the workshop', () => {
  it('is named by an administrator, with its zone and units', async () => {
    const app = await liveApp();
    const units = { temperature: '°F', pressure: 'psi', vacuum: 'inHg' };
    expect((await app.get('/api/workshop')).body.name).toBe('Workshop without a name yet');
    const set = await app.post('/api/workshop', { name: 'Boat shed', zone: 'America/New_York', units });
    expect(set.body).toMatchObject({
      name: 'Boat shed',
      zone: 'America/New_York',
      units,
      practice: false,
      sentence: null,
    });
    const wrong = await app.post('/api/workshop', { name: 'Boat shed', zone: 'Mars/Olympus', units });
    expect(wrong.body.type).toBe('/problems/zone-unknown');
  });
});
