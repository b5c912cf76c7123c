import { describe, expect, it } from 'vitest';
import { type LiveApp, liveApp, NOW } from './live-app.ts';

const DEED = { at: NOW, by: 'inspector 2' };
const AT = '2026-03-08T08:00:00.000Z';

async function appWithPart(): Promise<LiveApp> {
  const app = await liveApp();
  expect((await app.post('/api/parts/SR-1/layup', {})).status).toBe(201);
  return app;
}

const add = (app: LiveApp, result: object) =>
  app.post('/api/parts/SR-1/results', { at: AT, test: 'test', outcome: 'noted', ...result });

describe('a result with structure', () => {
  it.each<[string, object, number | null, string | null]>([
    // By hand: 100 · (1 − 23.3/466) = 95 %.
    ['DSC', { kind: 'dsc', residualJG: 23.3, totalJG: 466 }, 95, '%'],
    ['DMA', { kind: 'dma', tgC: 187.5, criterion: 'storage-onset', method: 'ASTM D7028, 5 °C/min, 1 Hz' }, 187.5, '°C'],
    ['ultrasonic without indication', { kind: 'ultrasonic', method: 'through transmission' }, null, null],
    ['ultrasonic', { kind: 'ultrasonic', largestMm: 6.5 }, 6.5, 'mm'],
    ['short beam', { kind: 'short-beam', strengthMpa: 82.4, specimens: 5, method: 'ISO 14130' }, 82.4, 'MPa'],
    ['load', { kind: 'load', limitKn: 6, ultimateKn: 9, reachedKn: 7.9, end: 'broke' }, 7.9, 'kN'],
    // By hand: 100 · 100/2000 = 5 %.
    [
      'strain',
      { kind: 'strain', first: { by: 'SG1', microstrain: 2050 }, second: { by: 'SG2', microstrain: 1950 } },
      5,
      '%',
    ],
  ])('of %s keeps what the trade records, and what it comes to', async (_what, measured, figure, unit) => {
    const app = await appWithPart();
    const { status, body, text } = await add(app, { measured });
    expect(status, text).toBe(201);
    expect(body.results).toEqual([
      {
        id: 1,
        at: AT,
        deed: DEED,
        test: 'test',
        outcome: 'noted',
        figure: figure === null ? null : expect.closeTo(figure, 4),
        unit,
        text: '',
        measured: expect.objectContaining(measured),
        reason: null,
      },
    ]);
  });

  it.each<[string, object, string]>([
    ['a residual above the total', { measured: { kind: 'dsc', residualJG: 500, totalJG: 466 } }, 'no degree of cure'],
    [
      'an ultimate load below the limit',
      { measured: { kind: 'load', limitKn: 9, ultimateKn: 6, reachedKn: 5, end: 'held' } },
      'does not go with',
    ],
    ['a figure beside it', { measured: { kind: 'ultrasonic' }, figure: 5, unit: 'mm' }, 'say it once'],
    ['a Tg in kelvin', { measured: { kind: 'dma', tgC: 560, criterion: 'tan-delta-peak' } }, '-100 to 500 °C'],
    ['a key it does not know', { measured: { kind: 'ultrasonic', depthMm: 3 } }, 'depthMm'],
  ])('refuses %s, and keeps nothing', async (_what, result, says) => {
    const app = await appWithPart();
    const { status, text } = await add(app, result);
    expect([400, 422]).toContain(status);
    expect(text).toContain(says);
    expect((await app.get('/api/parts/SR-1')).body.results).toEqual([]);
  });

  it('is put right by another row; a part put right has failed no test any more', async () => {
    const app = await appWithPart();
    await add(app, { outcome: 'failed', test: 'proof load', figure: 7.9, unit: 'kN' });
    expect((await app.get('/api/parts')).body.parts[0].failedTest).toBe(true);
    expect((await add(app, { replaces: 1 })).status).toBe(400);
    expect((await add(app, { replaces: 9, reason: 'typing' })).status).toBe(404);
    const { body } = await add(app, { outcome: 'passed', test: 'proof load', replaces: 1, reason: 'other strut' });
    expect(body.results).toMatchObject([{ id: 2, outcome: 'passed', reason: 'other strut' }]);
    expect((await app.get('/api/parts')).body.parts[0].failedTest).toBe(false);
    expect((await add(app, { replaces: 1, reason: 'again' })).status).toBe(409);
    const { db } = app.parts;
    expect(db.prepare('SELECT count(*) FROM part_results').pluck().get()).toBe(2);
    expect(() => db.exec("UPDATE part_results SET outcome = 'noted'")).toThrow('never updated');
  });
});

describe('a nonconformance', () => {
  const decision = {
    word: 'concession',
    authority: 'design authority 1',
    because: 'outside the loaded area',
    conditions: 'not above 6 kN',
    at: AT,
  };

  it('is recorded open, then with the decision of a named authority; both rows stay', async () => {
    const app = await appWithPart();
    const post = (body: object) => app.post('/api/parts/SR-1/nonconformances', body);
    const open = await post({ number: 'N-12', text: 'dent of 4 mm at the trailing edge' });
    expect(open.status, open.text).toBe(201);
    expect(open.body.nonconformances).toEqual([
      { number: 'N-12', text: 'dent of 4 mm at the trailing edge', decision: null, reason: null, deed: DEED },
    ]);
    const decided = { number: 'N-12', text: 'dent of 4 mm at the trailing edge', decision };
    expect((await post(decided)).status).toBe(409);
    const { body } = await post({ ...decided, reason: 'decided' });
    expect(body.nonconformances).toEqual([{ ...decided, reason: 'decided', deed: DEED }]);
    // Nothing about the part changes by it.
    expect(body.verdict).toBeNull();
    const { db } = app.parts;
    expect(db.prepare('SELECT count(*) FROM nonconformances').pluck().get()).toBe(2);
    expect(() => db.exec('DELETE FROM nonconformances')).toThrow('never deleted');
  });

  it('needs one of the five words, a name and a reason', async () => {
    const app = await appWithPart();
    for (const wrong of [{ word: 'use-as-is' }, { authority: '' }, { because: '' }]) {
      const body = { number: 'N-1', text: 'dent', decision: { ...decision, ...wrong } };
      expect((await app.post('/api/parts/SR-1/nonconformances', body)).status).toBe(400);
    }
  });
});
