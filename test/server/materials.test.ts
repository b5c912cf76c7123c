import { describe, expect, it } from 'vitest';
import type { Finding } from '../../models/evaluation/evaluation.ts';
import { type LiveApp, liveApp, NOW } from './live-app.ts';
import { receiveTape, room21, runAskingOutLife, TAPE } from './material-steps.ts';

const LAID = { laidUpFrom: '2026-03-02T09:00:00Z', laidUpUntil: '2026-03-02T11:00:00Z' };

async function outLifeOf(
  app: LiveApp,
  run: number,
): Promise<{ finding: Finding; inputs: Record<string, string>; evaluations: number }> {
  const { evaluation, evaluations } = (await app.get(`/api/runs/${run}`)).body;
  const findings: Finding[] = evaluation.document.parts[0].findings;
  return {
    finding: findings.find(({ limit }) => limit === 'material/out-life') as Finding,
    inputs: evaluation.inputs,
    evaluations: evaluations.length,
  };
}

describe('a roll over HTTP', () => {
  it('is received, taken out, cut, put back; its kit inherits, and its length is kept count of', async () => {
    const app = await liveApp();
    await receiveTape(app);
    await app.post('/api/items/K-1/events', { kind: 'out', at: '2026-03-02T08:00:00Z', room: room21 });
    const kit = await app.post('/api/items/K-1/kits', { kit: 'K-1A', at: '2026-03-02T10:00:00Z', lengthM: 6.5 });
    expect(kit.body).toMatchObject({
      item: 'K-1A',
      kind: 'kit',
      cutFrom: 'K-1',
      batch: 'B-1',
      material: { code: 'tape' },
    });
    await app.post('/api/items/K-1/events', { kind: 'in', at: '2026-03-02T12:00:00Z' });
    const { body: roll } = await app.get('/api/items/K-1');
    expect(roll).toMatchObject({
      now: NOW,
      lengthM: 40,
      lengthLeftM: 33.5,
      state: { place: 'freezer', outcome: 'met' },
    });
    expect(roll.state.lives[0]).toMatchObject({ name: 'out-life', used: 240, leftMinutes: 10 * 1440 - 240 });
    expect(roll.children).toHaveLength(1);
    // Two hours as part of its roll, then eight days of its own less those two hours: out since 2 March, 08:00.
    expect(roll.children[0].state.lives[0].used).toBe(8 * 1440);
    expect(roll.audit.map(({ verb }: { verb: string }) => verb)).toEqual([
      'add-item-event',
      'add-item-event',
      'receive-roll',
    ]);
  });

  it('is listed with what is due, the soonest first', async () => {
    const app = await liveApp();
    await receiveTape(app);
    await app.post('/api/rolls', { roll: 'K-2', batch: 'B-1', at: '2026-02-01T08:00:00Z' });
    await app.post('/api/items/K-2/events', { kind: 'out', at: '2026-03-08T08:00:00Z', room: room21 });
    const { body } = await app.get('/api/materials');
    expect(
      body.items.map(({ item, state }: { item: string; state: { dueAt: string } }) => [item, state.dueAt]),
    ).toEqual([
      ['K-2', '2026-03-18T08:00:00.000Z'],
      ['K-1', '2027-01-15T00:00:00.000Z'],
    ]);
    await app.post('/api/items/K-2/events', { kind: 'scrapped', reason: 'torn' });
    expect((await app.get('/api/materials')).body).toMatchObject({ items: [{ item: 'K-1' }], done: 1 });
    expect((await app.get('/api/materials/tape')).body).toMatchObject({
      code: 'tape',
      batches: [{ batch: 'B-1', rolls: ['K-1', 'K-2'] }],
    });
  });

  it('is found by its code, and so are its kit, its batch and its material', async () => {
    const app = await liveApp();
    await receiveTape(app);
    await app.post('/api/items/K-1/kits', { kit: 'KIT 1/A' });
    const hit = async (code: string) => (await app.get(`/api/find?code=${encodeURIComponent(code)}`)).body.hits[0];
    expect(await hit('k-1')).toMatchObject({ kind: 'roll', page: '/rolls/K-1', exact: true });
    expect(await hit('KIT 1/A')).toMatchObject({ kind: 'kit', page: '/kits/KIT%201%2FA', exact: true });
    expect(await hit('B-1')).toMatchObject({ kind: 'batch', page: '/materials/tape', exact: true });
    expect(await hit('tape')).toMatchObject({ kind: 'material', page: '/materials/tape', exact: true });
  });

  it('bears a freezer’s record, and an extension by whoever answers for it', async () => {
    const app = await liveApp();
    await receiveTape(app);
    const points = [
      ['2026-03-01T20:00:00Z', -18],
      ['2026-03-01T21:00:00Z', -8],
      ['2026-03-02T05:00:00Z', -8],
      ['2026-03-02T06:00:00Z', -18],
    ];
    const warm = await app.post('/api/freezer-excursions', { items: ['K-1'], points, unit: '°C' });
    expect(warm.status).toBe(201);
    expect((await app.get('/api/items/K-1')).body.state.lives[0].used).toBe(600);
    const extension = {
      life: 'out-life',
      lifeDays: 14,
      until: '2026-06-01T00:00:00Z',
      authority: 'materials engineer 1',
      tests: 'DSC',
      reason: 'slow job',
    };
    const extended = await app.post('/api/items/K-1/extensions', extension);
    expect(extended.body.state.lives[0]).toMatchObject({ atMost: 14 * 1440 });
    expect((await app.post('/api/items/K-1/extensions', { ...extension, lifeDays: undefined })).status).toBe(400);
  });
});

describe('what cannot have happened is refused, and nothing is written', () => {
  it.each<[string, string, object, string]>([
    ['out in the future', '/api/items/K-1/events', { kind: 'out', at: '2026-03-10T08:01:00Z' }, 'lies in the future'],
    ['back before out', '/api/items/K-1/events', { kind: 'in' }, 'it has been in the freezer since 2026-02-01'],
    [
      'out before received',
      '/api/items/K-1/events',
      { kind: 'out', at: '2026-01-31T08:00:00Z' },
      'before it was received or cut',
    ],
    [
      'cut before its roll came',
      '/api/items/K-1/kits',
      { kit: 'K-9', at: '2026-01-31T08:00:00Z' },
      'K-1 was used before it was there: K-9 was cut from it on 2026-01-31',
    ],
    ['cut from itself', '/api/items/K-1/kits', { kit: 'K-1' }, 'There is a roll or kit "K-1" already'],
    [
      'laid up before received',
      '/api/parts/SR-0417/materials',
      { materials: [{ item: 'K-1', laidUpFrom: '2026-01-31T08:00:00Z' }] },
      'K-1 was used before it was there',
    ],
    [
      'laid up in the future',
      '/api/parts/SR-0417/materials',
      { materials: [{ item: 'K-1', laidUpFrom: '2026-03-11T08:00:00Z' }] },
      'lies in the future',
    ],
    [
      'a batch made tomorrow',
      '/api/batches',
      { batch: 'B-2', material: { code: 'tape', issue: 'A' }, made: '2026-03-11' },
      'in the future',
    ],
  ])('%s', async (_what, path, body, detail) => {
    const app = await liveApp();
    await receiveTape(app);
    const lines = app.parts.db.prepare('SELECT count(*) FROM audit').pluck().get();
    const refused = await app.post(path, body);
    expect(refused.body.detail).toContain(detail);
    expect([409, 422]).toContain(refused.status);
    expect(app.parts.db.prepare('SELECT count(*) FROM audit').pluck().get()).toBe(lines);
  });
});

describe('a part laid up from a roll', () => {
  it('is judged by its age at heat-on; a later correction is a new evaluation, a later line is none', async () => {
    const app = await liveApp();
    await receiveTape(app);
    const run = await runAskingOutLife(app);
    expect((await outLifeOf(app, run)).finding).toMatchObject({ outcome: 'cannot-tell', because: 'Not recorded.' });
    const out = await app.post('/api/items/K-1/events', { kind: 'out', at: '2026-03-02T08:00:00Z', room: room21 });
    const set = await app.post('/api/parts/SR-0417/materials', { materials: [{ item: 'K-1', plies: 24, ...LAID }] });
    expect(set.status, set.text).toBe(201);
    const first = await outLifeOf(app, run);
    expect(first.finding).toMatchObject({ outcome: 'met', unit: 'd', atMost: 10 });
    expect(first.inputs.materials).toMatch(/^[0-9a-f]{64}$/);

    await app.post('/api/items/K-1/events', { kind: 'in', at: '2026-03-05T08:00:00Z' });
    await app.post(`/api/runs/${run}/evaluations`, {});
    const again = await outLifeOf(app, run);
    expect(again.finding).toEqual(first.finding);
    expect(again.inputs).toEqual(first.inputs);

    const line = out.body.ledger.find(({ event }: { event: { kind: string } }) => event.kind === 'out').id;
    const corrected = await app.post(`/api/items/K-1/events/${line}/correction`, {
      event: { kind: 'out', at: '2026-02-15T08:00:00Z', room: room21 },
      reason: 'the day sheet says 15 February',
    });
    expect(corrected.status, corrected.text).toBe(201);
    const later = await outLifeOf(app, run);
    expect(later.finding).toMatchObject({ outcome: 'not-met' });
    expect(later.evaluations).toBe(again.evaluations + 1);
    const { body: roll } = await app.get('/api/items/K-1');
    const replaced = roll.ledger.find(({ id }: { id: number }) => id === line);
    expect(roll.ledger.find(({ id }: { id: number }) => id === replaced.replacedBy)).toMatchObject({
      replaces: line,
      reason: 'the day sheet says 15 February',
    });
    expect(await app.parts.verify()).toMatchObject({ holds: true });
  });

  it('needs a reason to be said again, and its roll can then not be taken back', async () => {
    const app = await liveApp();
    await receiveTape(app);
    await app.post('/api/parts/SR-0417/materials', { materials: [{ item: 'K-1' }] });
    expect((await app.post('/api/parts/SR-0417/materials', { materials: [] })).status).toBe(409);
    const { body: roll } = await app.get('/api/items/K-1');
    expect(roll.parts).toMatchObject([{ part: 'SR-0417' }]);
    const taken = await app.post(`/api/items/K-1/events/${roll.ledger[0].id}/correction`, {
      event: null,
      reason: 'another roll',
    });
    expect(taken.body.detail).toContain('SR-0417 is laid up from it');
    const again = await app.post('/api/parts/SR-0417/materials', { materials: [], reason: 'another roll' });
    expect(again.body.materials).toEqual([]);
    const gone = await app.post(`/api/items/K-1/events/${roll.ledger[0].id}/correction`, {
      event: null,
      reason: 'never came',
    });
    expect(gone.body).toMatchObject({ item: 'K-1', state: null });
    expect((await app.post('/api/rolls', { roll: 'K-1', batch: 'B-1' })).status).toBe(201);
  });

  it('offers the degree it has aged to, labelled with its rule', async () => {
    const app = await liveApp();
    const ageing = { freshDegree: 0.01, degreeAtOutLife: 0.03, source: 'DSC, invented' };
    await receiveTape(app);
    await app.post('/api/materials', { document: { ...TAPE, issue: 'B', ageing } });
    await app.post('/api/batches', {
      batch: 'B-1',
      material: { code: 'tape', issue: 'B' },
      made: '2026-01-15',
      reason: 'issue B',
    });
    await app.post('/api/items/K-1/events', { kind: 'out', at: '2026-03-02T08:00:00Z', room: room21 });
    await app.post('/api/parts/SR-0417/materials', { materials: [{ item: 'K-1', ...LAID }] });
    const { body } = await app.get('/api/parts/SR-0417/materials?at=2026-03-07T08:00:00Z');
    // Five of ten days: half-way between the two measured degrees.
    expect(body.aged).toMatchObject({ degree: expect.closeTo(0.02, 12), basis: 'equivalent-time' });
    expect(body.aged.because).toContain('minute for minute');
  });
});
