import { describe, expect, it } from 'vitest';
import { readKeptScans } from '../../../server/store/live-readings.ts';
import { type LiveApp, liveApp } from '../live-app.ts';
import { aedesBroker } from './brokers.ts';
import { until } from './listening.ts';
import { modbusDevice } from './modbus-peers.ts';

const VESSEL = 'Oven 2';
const SOURCES = `/api/vessels/${encodeURIComponent(VESSEL)}/sources`;

async function workshop(changes: Parameters<typeof liveApp>[0] = {}): Promise<LiveApp> {
  const app = await liveApp({ clock: Date.now, ...changes });
  app.parts.db.prepare("INSERT INTO vessels (name, kind) VALUES (?, 'oven')").run(VESSEL);
  return app;
}

const channels = [{ column: '1', name: 'TC1', role: 'part', unit: '°C', scale: 0.1 }];
const gateway = (port: number, address = 1) => ({
  format: 'dwellbook-source/1',
  name: 'Oven 2 gateway',
  intervalS: 0.2,
  reads: {
    kind: 'modbus-tcp',
    host: '127.0.0.1',
    port,
    registers: { TC1: { unitId: 1, table: 'input', address, type: 'int16' } },
  },
  channels,
});
const push = { format: 'dwellbook-source/1', name: 'PLC', intervalS: 1, reads: { kind: 'push' }, channels };
const gauge = {
  format: 'dwellbook-source/1',
  name: 'Oven 2 gauges',
  intervalS: 600,
  reads: { kind: 'gauge', readingError: { 'vessel pressure': 0.05 } },
  channels: [{ column: 'p', name: 'vessel pressure', role: 'pressure', unit: 'bar', range: [0, 16] }],
};

const kept = ({ parts }: LiveApp, sourceId: number) =>
  readKeptScans(parts.db, { sourceId, fromMs: 0, untilMs: Number.MAX_SAFE_INTEGER });
const verbs = async (app: LiveApp) =>
  (await app.get('/api/audit')).body.lines.map(({ verb, by }: { verb: string; by: string }) => `${verb} by ${by}`);

describe('the sources of a vessel', () => {
  it('are tried, added, changed, let rest and woken, and each is on record', async () => {
    const device = await modbusDevice();
    device.input.set(1, 1753).set(2, 216);
    const app = await workshop();
    const tried = await app.post(`${SOURCES}/try`, { document: gateway(device.port) });
    expect([tried.status, tried.body.channels]).toEqual([
      200,
      [{ channel: 'TC1', unit: '°C', raw: 1753, value: 175.3, because: null }],
    ]);
    expect((await app.get(SOURCES)).body).toEqual({ sources: [] });

    const added = await app.post(SOURCES, { document: gateway(device.port) });
    expect(added.status, added.text).toBe(201);
    const { id } = added.body;
    await until(() => kept(app, id).length >= 3);
    const view = (await app.get(`/api/sources/${id}`)).body;
    expect(view).toMatchObject({ name: 'Oven 2 gateway', vessel: VESSEL, kind: 'modbus-tcp', state: 'sending' });
    expect(view.latest).toEqual([{ channel: 'TC1', unit: '°C', raw: 1753, value: 175.3 }]);
    expect(view.document).toEqual(gateway(device.port));

    await app.post(`/api/sources/${id}`, { document: gateway(device.port, 2) });
    await until(() => kept(app, id).at(-1)?.figures[0] === 216);
    const resting = await app.post(`/api/sources/${id}/rest`, { resting: true, reason: 'moved to another hall' });
    expect(resting.body).toMatchObject({ state: 'resting', because: null });
    const asked = device.asked.length;
    await new Promise((resolve) => setTimeout(resolve, 500));
    expect(device.asked.length).toBe(asked);
    const woken = await app.post(`/api/sources/${id}/rest`, { resting: false, reason: 'back again' });
    expect(woken.body.state).toBe('sending');
    await until(() => device.asked.length > asked);
    expect((await app.get(SOURCES)).body.sources.map(({ name }: { name: string }) => name)).toEqual(['Oven 2 gateway']);
    expect(await verbs(app)).toEqual([
      'wake-source by inspector 2',
      'rest-source by inspector 2',
      'set-source by inspector 2',
      'add-source by inspector 2',
    ]);
  });

  it('say why nothing comes', async () => {
    const app = await workshop();
    const far = await app.post(SOURCES, { document: gateway(1) });
    await until(() => app.parts.sources.lines()[0]?.state === 'cannot-be-reached');
    expect((await app.get(`/api/sources/${far.body.id}`)).body.because).toMatch(/ECONNREFUSED/);
    const tried = await app.post(`${SOURCES}/try`, { document: gateway(1) });
    expect(tried.body.channels[0]).toMatchObject({ raw: null, value: null });
    expect(tried.body.channels[0].because).toMatch(/ECONNREFUSED/);
    const asked = await app.post(`${SOURCES}/try`, { document: push });
    expect(asked.body.channels[0].because).toMatch(/^It cannot be asked/);
  });

  it('are called silent once five intervals have brought nothing', async () => {
    let now = Date.parse('2026-03-10T08:00:00Z');
    const app = await workshop({ clock: () => now });
    const { id } = (await app.post(SOURCES, { document: push })).body;
    const state = async () => (await app.get(`/api/sources/${id}`)).body;
    now += 5000;
    expect(await state()).toMatchObject({ state: 'sending', because: 'Nothing yet' });
    now += 1;
    expect(await state()).toMatchObject({
      state: 'silent',
      since: '2026-03-10T08:00:05.000Z',
      because: 'Nothing since the program began to listen',
    });
    const scan = { timeMs: now, sequence: null, figures: Float64Array.of(201) };
    await app.parts.live.journal.take(id, [scan]);
    expect(await state()).toMatchObject({ state: 'sending', since: '2026-03-10T08:00:05.001Z', because: null });
    now += 5001;
    expect(await state()).toMatchObject({ state: 'silent', because: 'Nothing for five intervals' });
  });

  it('are refused by name, and set up by engineers and administrators alone', async () => {
    const app = await workshop();
    const wrong = await app.post(SOURCES, { document: { ...push, channels: [{ ...channels[0], unit: 'bar' }] } });
    expect([wrong.status, wrong.body.facts.key]).toEqual([422, 'channels[0].unit']);
    expect((await app.post('/api/vessels/Oven%209/sources', { document: push })).status).toBe(404);
    expect((await app.get('/api/sources/7')).status).toBe(404);
    const reads = { kind: 'practice', speed: 20, cycle: { code: 'SR-180', issue: 'B' } };
    const practice = await app.post(SOURCES, { document: { ...push, reads } });
    expect([practice.status, practice.body.detail]).toEqual([409, 'Only a practice workshop has invented vessels']);
    await app.post(SOURCES, { document: push });
    expect((await app.post(SOURCES, { document: push })).status).toBe(409);
    const operator = await workshop({ actor: { name: 'operator 1', roles: ['operator'] } });
    for (const [path, body] of [
      [SOURCES, { document: push }],
      [`${SOURCES}/try`, { document: push }],
      ['/api/sources/1', { document: push }],
      ['/api/sources/1/rest', { resting: true, reason: 'x' }],
    ] as const) {
      expect((await operator.post(path, body)).status).toBe(403);
    }
    expect((await operator.get(SOURCES)).status).toBe(200);
  });

  it('keep a password beside the document, show it never, and send it to no other broker', async () => {
    const own = await aedesBroker(0, 'open sesame');
    const other = await aedesBroker(0, 'open sesame');
    const app = await workshop();
    const document = (broker: string) => ({
      ...push,
      name: 'Oven 2 broker',
      reads: { kind: 'mqtt', broker, user: 'oven', topics: { TC1: { topic: 'oven/2' } } },
    });
    const added = await app.post(SOURCES, { document: document(own.address), password: 'open sesame' });
    expect(added.body.document.reads.hasPassword).toBe(true);
    expect(added.text).not.toContain('sesame');
    const because = () => app.parts.sources.lines()[0]?.because ?? null;
    await until(() => because() === 'Nothing yet' || because() === null);
    const same = await app.post(`/api/sources/${added.body.id}`, {
      document: { ...document(own.address), intervalS: 2 },
    });
    expect(same.body.document.reads.hasPassword).toBe(true);
    const moved = await app.post(`/api/sources/${added.body.id}`, { document: document(other.address) });
    expect(moved.body.document.reads.hasPassword).toBeUndefined();
    await until(() => /not authori[sz]ed/i.test(because() ?? ''));
    expect((await app.get('/api/audit')).text).not.toContain('sesame');
  });
});

describe('what a person reads off a gauge', () => {
  it('is taken by anyone, with the name of who read it, and refused where it cannot be', async () => {
    const app = await workshop({ actor: { name: 'operator 1', roles: ['operator', 'engineer'] } });
    const { id } = (await app.post(SOURCES, { document: gauge })).body;
    const entered = await app.post(`/api/sources/${id}/readings`, { at: '2026-03-10T08:14:00Z', values: { p: 6.5 } });
    expect([entered.status, entered.body]).toEqual([201, { kept: 1, known: 0, refused: [] }]);
    const [scan] = kept(app, id);
    expect([scan?.timeMs, [...(scan?.figures ?? [])]]).toEqual([Date.parse('2026-03-10T08:14:00Z'), [6.5]]);
    const enter = async (body: object) => {
      const answer = await app.post(`/api/sources/${id}/readings`, body);
      return [answer.status, answer.body.detail];
    };
    const soon = new Date(Date.now() + 3_600_000).toISOString();
    expect(await enter({ values: { p: 65 } })).toEqual([422, 'vessel pressure: 65 bar is outside 0 to 16 bar']);
    expect(await enter({ values: { q: 6 } })).toEqual([422, 'There is no "q" here; there are p']);
    expect(await enter({ values: { p: null } })).toEqual([422, 'Enter at least one reading']);
    expect(await enter({ at: soon, values: { p: 6 } })).toEqual([422, `${soon} is still to come`]);
    expect((await enter({ at: '2026-03-10T08:14:00Z', values: { p: 6.6 } }))[0]).toBe(409);
    await app.post(`/api/sources/${id}/rest`, { resting: true, reason: 'gauge away' });
    expect(await enter({ values: { p: 6 } })).toEqual([409, '"Oven 2 gauges" rests']);
    const other = (await app.post(SOURCES, { document: push })).body.id;
    expect((await app.post(`/api/sources/${other}/readings`, { values: { 1: 6 } })).status).toBe(409);
    expect(await verbs(app)).toContain('enter-readings by operator 1');
  });
});
