import { describe, expect, it } from 'vitest';
import { type LiveApp, liveApp } from './live-app.ts';
import { recordMade } from './made-thickness.ts';
import { receiveTape } from './material-steps.ts';

/** One part thermocouple, warm for an hour from 08:00 on 2 March; `plus` makes another file of it. */
const oneHour = (plus: number) => [
  {
    name: 'TC1',
    role: 'part' as const,
    corners: [
      [0, 20 + plus],
      [3600, 60 + plus],
    ] as const,
  },
];

const loadOf = (part: object) => ({ format: 'dwellbook-load/1', parts: [part], sensors: [] });

async function moveTo(app: LiveApp, run: number, part: object) {
  return app.post(`/api/runs/${run}/load`, { load: loadOf(part), cycle: null, reason: 'written down wrong' });
}

describe('a part in two places at once', () => {
  it('is refused by name, and the load stays as it was', async () => {
    const app = await liveApp();
    const first = await recordMade(app, oneHour(0), { part: 'SR-1', vessel: 'oven' });
    const second = await recordMade(app, oneHour(1), { part: 'SR-2', vessel: 'press' });
    const { status, body } = await moveTo(app, second, { part: 'SR-1' });
    expect([status, body.type]).toEqual([422, '/problems/event-impossible']);
    expect(body.detail).toBe(
      `Part SR-1 was in the oven from 2026-03-02T08:00:00.000Z until 2026-03-02T09:00:00.000Z (run ${first}); it cannot lie in two vessels at once`,
    );
    expect((await app.get(`/api/runs/${second}`)).body.load.parts).toEqual([{ part: 'SR-2' }]);
    expect((await app.get('/api/parts/SR-1')).body.runs).toHaveLength(1);
  });

  it('is no fault in one vessel, one after another, or as a lot of like pieces', async () => {
    const app = await liveApp();
    await recordMade(app, oneHour(0), { part: 'SR-1', vessel: 'oven' });
    // Two recorders of one vessel.
    const sameVessel = await recordMade(app, oneHour(1), { part: 'SR-2', vessel: 'oven' });
    expect((await moveTo(app, sameVessel, { part: 'SR-1' })).status).toBe(201);
    const after = await recordMade(app, oneHour(2), { part: 'SR-3', vessel: 'press' });
    // As if it had been logged the hour after.
    app.parts.db.exec(`UPDATE runs SET from_ms = until_ms, until_ms = until_ms + 3600000 WHERE id = ${after}`);
    expect((await moveTo(app, after, { part: 'SR-1' })).status).toBe(201);
    const lot = await recordMade(app, oneHour(3), { part: 'SR-4', vessel: 'autoclave' });
    expect((await moveTo(app, lot, { part: 'SR-1', quantity: 6 })).status).toBe(201);
  });

  it('is refused too where it is the vessel that is put right', async () => {
    const app = await liveApp();
    await recordMade(app, oneHour(0), { part: 'SR-1', vessel: 'oven' });
    const second = await recordMade(app, oneHour(1), { part: 'SR-2', vessel: 'oven' });
    expect((await moveTo(app, second, { part: 'SR-1' })).status).toBe(201);
    await app.post('/api/vessels', { name: 'the press', kind: 'press' });
    const moved = await app.post(`/api/runs/${second}/load`, {
      load: loadOf({ part: 'SR-1' }),
      cycle: null,
      vessel: 'the press',
      reason: 'other vessel',
    });
    expect(moved.status).toBe(422);
    expect((await app.get('/api/parts/SR-1')).body.runs.at(-1).line.vessel).toBe('the oven');
  });
});

describe('what cannot have happened', () => {
  it.each<[string, string, object, string]>([
    [
      'a roll laid up before it came',
      '/api/parts/SR-1/materials',
      { materials: [{ item: 'K-1', laidUpFrom: '2026-01-20T08:00:00Z' }] },
      'K-1',
    ],
    [
      'a kit cut from a roll before it came',
      '/api/items/K-1/kits',
      { kit: 'K-1-1', at: '2026-01-20T08:00:00Z' },
      'K-1',
    ],
    [
      'a roll that came tomorrow',
      '/api/rolls',
      { roll: 'K-2', batch: 'B-1', at: '2026-03-11T08:00:00Z' },
      'lies in the future',
    ],
    [
      'a test of tomorrow',
      '/api/parts/SR-1/results',
      { at: '2026-03-11T08:00:00Z', test: 'ultrasonic', outcome: 'passed' },
      'lies in the future',
    ],
    [
      'a decision of tomorrow',
      '/api/parts/SR-1/nonconformances',
      {
        number: 'N-1',
        text: 'dent',
        decision: { word: 'concession', authority: 'chief inspector', because: 'small', at: '2026-03-11T08:00:00Z' },
      },
      'lies in the future',
    ],
  ])('refuses %s', async (_what, path, body, says) => {
    const app = await liveApp();
    await receiveTape(app);
    await app.post('/api/parts/SR-1/layup', {});
    const lines = () => app.parts.db.prepare('SELECT count(*) FROM audit').pluck().get();
    const before = lines();
    const answer = await app.post(path, body);
    expect(answer.status, answer.text).toBeGreaterThanOrEqual(400);
    expect(answer.status).toBeLessThan(500);
    expect(answer.body.detail).toContain(says);
    expect(lines()).toBe(before);
  });

  it('refuses a kit cut from itself, at once and by a correction', async () => {
    const app = await liveApp();
    await receiveTape(app);
    expect((await app.post('/api/items/K-1/kits', { kit: 'K-1' })).body.type).toBe('/problems/already-recorded');
    const cut = await app.post('/api/items/K-1/kits', { kit: 'K-1-1', at: '2026-03-05T08:00:00Z' });
    const [{ id }] = cut.body.ledger;
    const event = { kind: 'cut', at: '2026-03-05T08:00:00Z', from: 'K-1-1' };
    const corrected = await app.post(`/api/items/K-1-1/events/${id}/correction`, { event, reason: 'wrong roll' });
    expect(corrected.status).toBeGreaterThanOrEqual(400);
    expect(corrected.status).toBeLessThan(500);
    expect(corrected.body.detail).toContain('K-1-1');
    expect((await app.get('/api/items/K-1-1')).body.cutFrom).toBe('K-1');
  });
});
