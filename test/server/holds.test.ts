import { describe, expect, it } from 'vitest';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { KIN_KINDS } from '../../server/contract/trace.ts';
import { type MadePart, writeItems, writePart, writeRuns } from './hold-steps.ts';
import { type LiveApp, liveApp, NOW } from './live-app.ts';
import { loadCase, recordCase } from './workshop-steps.ts';

const part = (serial: string, about: Partial<MadePart> = {}): MadePart => ({
  serial,
  item: null,
  tool: null,
  bagLine: null,
  channel: null,
  ...about,
});

/** P-1 broke. Each other part shares one thing with it and no other, or nothing. */
async function shop(): Promise<LiveApp> {
  const app = await liveApp();
  const { db } = app.parts;
  writeItems(db, [
    { roll: 'K-1', batch: 'B-1', kits: ['K-1A', 'K-1B'] },
    { roll: 'K-2', batch: 'B-1', kits: [] },
    { roll: 'K-9', batch: 'B-9', kits: [] },
  ]);
  writeRuns(db, [
    {
      vessel: 'Autoclave 1',
      day: 1,
      parts: [part('P-1', { item: 'K-1A', tool: 'T-1', bagLine: 'V1', channel: 'TC1' }), part('same-load')],
    },
    { vessel: 'Autoclave 1', day: 2, parts: [part('same-line', { bagLine: 'V1' }), part('same-vessel')] },
    { vessel: 'Autoclave 1', day: 3, parts: [part('same-wire', { channel: 'TC1' })], by: 'operator 9' },
    { vessel: 'Oven 2', day: 4, parts: [part('other', { item: 'K-9', tool: 'T-9', bagLine: 'V1', channel: 'TC1' })] },
    { vessel: null, day: 5, parts: null },
    { vessel: 'Oven 2', day: 40, parts: [part('late', { tool: 'T-1' })], by: 'operator 9' },
  ]);
  for (const [serial, item] of [
    ['same-kit', 'K-1A'],
    ['same-roll', 'K-1B'],
    ['from-the-roll', 'K-1'],
    ['same-batch', 'K-2'],
  ] as const) {
    writePart(db, part(serial, { item }));
  }
  writePart(db, part('same-tool', { tool: 'T-1' }));
  return app;
}

const NARROW = KIN_KINDS.filter((kind) => !['vessel', 'cycle', 'operator'].includes(kind));
const ask = (app: LiveApp, body: object) =>
  app.post('/api/holds', { failed: ['P-1'], kinds: NARROW, why: 'broke at 7.9 kN', ...body });
const serialsOf = (body: { document: { parts: { serial: string }[] } }) =>
  body.document.parts.map(({ serial }) => serial);

describe('a hold list', () => {
  it('has every part that shares something with the failed one, each with every reason', async () => {
    const app = await shop();
    const { status, body, text } = await ask(app, {});
    expect(status, text).toBe(201);
    const { shared, parts } = body.document;
    const reasons = Object.fromEntries(
      parts.map(({ serial, because }: { serial: string; because: { shared: number; runs: number[] }[] }) => [
        serial,
        because.map(({ shared: at, runs }) => [shared[at].what, ...runs].join(' in ')),
      ]),
    );
    expect(reasons).toEqual({
      'P-1': [
        'run 1 in 1',
        'kit K-1A',
        'roll K-1',
        'batch B-1',
        'tool T-1',
        'bag line V1 of Autoclave 1 in 1',
        'thermocouple TC1 of Autoclave 1 in 1',
      ],
      'same-load': ['run 1 in 1'],
      'same-line': ['bag line V1 of Autoclave 1 in 2'],
      'same-wire': ['thermocouple TC1 of Autoclave 1 in 3'],
      'same-kit': ['kit K-1A', 'roll K-1', 'batch B-1'],
      'same-roll': ['roll K-1', 'batch B-1'],
      'from-the-roll': ['roll K-1', 'batch B-1'],
      'same-batch': ['batch B-1'],
      'same-tool': ['tool T-1'],
      late: ['tool T-1'],
    });
    expect(serialsOf(body)[0]).toBe('P-1');
  });

  it('goes as wide as it is asked to: vessel and who set the load', async () => {
    const app = await shop();
    expect(serialsOf((await ask(app, { kinds: ['vessel'] })).body).sort()).toEqual([
      'P-1',
      'same-line',
      'same-load',
      'same-vessel',
      'same-wire',
    ]);
    expect(serialsOf((await ask(app, { kinds: ['operator'] })).body).sort()).toEqual([
      'P-1',
      'other',
      'same-line',
      'same-load',
      'same-vessel',
    ]);
  });

  it('keeps to the dates, and to parts no run of which is on record: nothing tells that they lie outside', async () => {
    const app = await shop();
    const { body } = await ask(app, { from: '2026-01-01T00:00:00Z', until: '2026-01-03T12:00:00Z' });
    expect(serialsOf(body)).toContain('same-line');
    expect(serialsOf(body)).not.toContain('same-wire');
    expect(serialsOf(body)).not.toContain('late');
    expect(serialsOf(body)).toEqual(expect.arrayContaining(['same-kit', 'same-tool']));
    expect(body.document.completeness.runsWithoutLoad).toEqual([]);
    const swapped = await ask(app, { from: '2026-02-01T00:00:00Z', until: '2026-01-01T00:00:00Z' });
    expect([swapped.status, swapped.body.type]).toEqual([400, '/problems/invalid-request']);
  });

  it('says how much is not on record, and what of the failed part could not be followed', async () => {
    const app = await shop();
    const { completeness } = (await ask(app, { failed: ['P-1', 'same-vessel'] })).body.document;
    expect(completeness).toEqual({
      parts: 12,
      withoutRoll: 6,
      withoutTool: 8,
      withoutBagLine: 9,
      withoutThermocouple: 9,
      withoutRun: 5,
      runsWithoutLoad: [5],
      runsWithoutVessel: [5],
      notFollowed: [{ serial: 'same-vessel', lacks: ['roll', 'batch', 'tool', 'bag-line', 'thermocouple'] }],
    });
  });

  it('is what was known as it was made: what is written later is on another list', async () => {
    const app = await shop();
    const { db } = app.parts;
    const first = (await ask(app, {})).body;
    const shipped = await app.post('/api/parts/same-kit/whereabouts', {
      place: 'shipped',
      customer: 'the pier',
      since: '2026-03-01',
    });
    expect(shipped.status, shipped.text).toBe(201);
    await app.post('/api/parts/same-kit/results', { at: NOW, test: 'proof load', outcome: 'failed' });
    expect((await app.get(`/api/holds/${first.hold}`)).body).toEqual(first);
    const second = (await ask(app, {})).body;
    expect(second.hold).not.toBe(first.hold);
    const heldOf = (body: { document: { parts: { serial: string }[] } }) =>
      body.document.parts.find(({ serial }) => serial === 'same-kit');
    expect(heldOf(first)).toMatchObject({ whereabouts: null, failedTests: [] });
    expect(heldOf(second)).toMatchObject({
      whereabouts: { place: 'shipped', customer: 'the pier', since: '2026-03-01' },
      failedTests: ['proof load'],
    });
    const about = (await app.get('/api/parts/same-kit/whereabouts')).body;
    expect(about.holds.map(({ hold }: { hold: number }) => hold)).toEqual([second.hold, first.hold]);
    expect(() => db.exec("UPDATE hold_lists SET why = 'x'")).toThrow('a hold list is never updated');
    expect(() => db.exec('DELETE FROM hold_list_parts')).toThrow('a hold list is never deleted');
    expect(() => db.exec("UPDATE load_places SET channel = 'x'")).toThrow('a load is never updated');
    expect(verifyChains(db)).toMatchObject({ holds: true });
    expect((await app.get('/api/holds')).body.holds).toHaveLength(2);
  });

  it('carries the verdict of its latest judgement', async () => {
    const app = await liveApp();
    const run = await recordCase(app, 'two-bag-lines');
    const set = await loadCase(app, run, 'two-bag-lines');
    const { body } = await ask(app, { failed: ['SR-0417'] });
    expect(body.document.parts[0]).toMatchObject({
      serial: 'SR-0417',
      verdict: set.body.evaluation.document.parts[0].verdict,
      runs: [run],
    });
  });

  it('is written for a spreadsheet too, with no cell that it would take for a formula', async () => {
    const app = await shop();
    writePart(app.parts.db, part('=1+1', { tool: 'T-1' }));
    const { hold } = (await ask(app, { why: 'broke at 7.9 kN, "low"' })).body;
    const csv = await app.get(`/api/holds/${hold}/list.csv`);
    expect(csv.headers.get('content-type')).toMatch(/^text\/csv/);
    const lines = csv.text.split('\r\n');
    expect(lines).toContain('why,"broke at 7.9 kN, ""low"""');
    const roll = lines.find((line) => line.startsWith('same-roll,'));
    expect(roll).toMatch(/^same-roll,,,1,,not on record,,,not judged,,,"roll K-1, as P-1; batch B-1, as P-1"$/);
    expect(lines.some((line) => line.startsWith("'=1+1,"))).toBe(true);
  });

  it('is refused for a part that is not there, and without a reason', async () => {
    const app = await shop();
    const unknown = await ask(app, { failed: ['P-1', 'nobody'] });
    expect([unknown.status, unknown.body.facts]).toEqual([404, { part: 'nobody' }]);
    expect((await ask(app, { why: ' ' })).status).toBe(400);
    expect((await app.get('/api/holds')).body.holds).toEqual([]);
    expect((await app.get('/api/holds/1')).status).toBe(404);
  });
});

describe('where a part is', () => {
  it('is added to, never overwritten; a shipment names its customer and lies not in the future', async () => {
    const app = await shop();
    const say = (body: object) => app.post('/api/parts/P-1/whereabouts', body);
    expect((await app.get('/api/parts/P-1/whereabouts')).body).toEqual({
      serial: 'P-1',
      whereabouts: null,
      earlier: [],
      holds: [],
    });
    expect((await say({ place: 'in-shop', since: '2026-02-01' })).status).toBe(201);
    const { body } = await say({ place: 'shipped', customer: 'the pier', since: '2026-03-10', text: 'by boat' });
    expect(body.whereabouts).toMatchObject({ place: 'shipped', customer: 'the pier', text: 'by boat' });
    expect(body.earlier).toHaveLength(1);
    expect((await say({ place: 'shipped', since: '2026-03-01' })).status).toBe(400);
    expect((await say({ place: 'in-shop', customer: 'the pier', since: '2026-03-01' })).status).toBe(400);
    expect((await say({ place: 'in-shop', since: '2026-03-12' })).body.type).toBe('/problems/invalid-request');
    expect(() => app.parts.db.exec('DELETE FROM part_whereabouts')).toThrow('where a part was is never deleted');
  });
});
