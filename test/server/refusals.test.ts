import { describe, expect, it } from 'vitest';
import { ERROR_CODES } from '../../models/errors.ts';
import { OPERATIONS, type Operation } from '../../server/contract/operations.ts';
import { liveApp, upload } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';
import { loadCase, recordCase } from './workshop-steps.ts';

describe('a refusal', () => {
  it('is a problem as RFC 9457 has it, with the place and what was expected', async () => {
    const app = await liveApp();
    const missing = await app.get('/api/runs/7');
    expect(missing.headers.get('content-type')).toBe('application/problem+json; charset=utf-8');
    expect([missing.status, missing.body]).toEqual([
      404,
      { type: '/problems/not-found', title: 'Not found', status: 404, detail: 'There is no run 7', facts: { run: 7 } },
    ]);
    const body = await app.post('/api/vessels', { name: ' ', kind: 'kettle', colour: 'red' });
    expect([body.status, body.body]).toEqual([
      400,
      {
        type: '/problems/invalid-request',
        title: 'Request not understood',
        status: 400,
        detail: expect.stringContaining('#/name'),
        errors: [
          { pointer: '#/name', detail: expect.any(String) },
          { pointer: '#/kind', detail: expect.stringContaining('autoclave') },
          { pointer: '#', detail: expect.stringContaining('colour') },
        ],
      },
    ]);
  });

  it('names what is wrong with a document by its path', async () => {
    const app = await liveApp();
    const { cycle } = recordedCase('must-work');
    const answer = await app.post('/api/cycles', { document: { ...cycle, cealing: 190 } });
    expect([answer.status, answer.body.type, answer.body.facts]).toEqual([
      422,
      '/problems/document-unknown-key',
      { key: 'cealing' },
    ]);
    expect((await app.get('/api/cycles')).body).toEqual({ cycles: [] });
  });

  it('tells unreadable, too large, wrong media and unknown addresses apart', async () => {
    const app = await liveApp({ mostUploadBytes: 100 });
    const json = { 'content-type': 'application/json' };
    const send = (init: RequestInit) => app.send('/api/vessels', { method: 'POST', ...init });
    expect((await send({ headers: json, body: '{"name":' })).body.type).toBe('/problems/document-not-json');
    expect((await send({ headers: json, body: JSON.stringify({ name: 'x'.repeat(1_100_000) }) })).status).toBe(413);
    expect((await send({ headers: { 'content-type': 'text/plain' }, body: '{}' })).status).toBe(415);
    expect((await send({ headers: json, body: '' })).status).toBe(400);
    expect((await upload(app, '/api/imports?name=big.csv', 'x'.repeat(101))).body.type).toBe('/problems/too-large');
    expect((await upload(app, '/api/imports', 'x')).body.errors[0].pointer).toBe('?/name');
    expect((await app.get('/api/nothing')).status).toBe(404);
    expect((await app.get('/api/runs/0x1')).status).toBe(404);
    expect((await app.get('/api/runs?limit=0')).status).toBe(400);
  });

  it('keeps nothing of a load that cannot be judged', async () => {
    const app = await liveApp();
    const run = await recordCase(app, 'must-work');
    const { load } = recordedCase('must-work');
    const before = (await app.get('/api/audit')).body;
    const refuse = async (changes: object) => (await loadCase(app, run, 'must-work', changes)).body.type;
    expect(await refuse({ load: { ...load(), barometer: '1009 furlongs' } })).toBe('/problems/barometer-malformed');
    expect(await refuse({ load: { ...load(), sensors: [{ channel: 'TC9' }] } })).toBe('/problems/channel-unknown');
    expect(await refuse({ load: { ...load(), stove: 1 } })).toBe('/problems/document-unknown-key');
    expect(await refuse({ cycle: { code: 'SR-180', issue: 'Z' } })).toBe('/problems/not-found');
    expect(await refuse({ vessel: 'Oven 9' })).toBe('/problems/not-found');
    expect((await app.get('/api/audit')).body).toEqual(before);
    expect((await app.get(`/api/runs/${run}`)).body.state).toBe('awaiting-load');
    expect((await app.get('/api/parts')).body.parts).toEqual([]);
  });

  it('asks why a load is set again', async () => {
    const app = await liveApp();
    const run = await recordCase(app, 'must-work');
    await loadCase(app, run, 'must-work');
    expect((await loadCase(app, run, 'must-work')).body.type).toBe('/problems/state-conflict');
    const again = await loadCase(app, run, 'must-work', { reason: 'TC4 was on the other strut' });
    expect(again.status).toBe(201);
    expect((await app.get('/api/audit?subject=run/1')).body.lines[1].why).toBe('TC4 was on the other strut');
  });

  it('says nothing of a fault but its number', async () => {
    const app = await liveApp();
    app.parts.db.exec('DROP TABLE run_notes');
    await recordCase(app, 'must-work');
    const { status, body } = await app.get('/api/runs/1');
    const [fault] = app.takeFaults() as [{ incident: string }];
    expect([status, body]).toEqual([
      500,
      { type: 'about:blank', title: 'Fault of the program', status: 500, instance: `urn:uuid:${fault.incident}` },
    ]);
  });

  it('meets whoever has not the role, on every route', async () => {
    const app = await liveApp({ actor: { name: 'guest', roles: [] } });
    for (const { method, path } of Object.values(OPERATIONS) as Operation[]) {
      const address = path.replace(/\{\w+\}/g, '1');
      const answer = await (method === 'get' ? app.get(address) : app.post(address, {}));
      expect([method, path, answer.status, answer.body.type]).toEqual([method, path, 403, '/problems/not-permitted']);
    }
  });

  it('lets an operator record but not release', async () => {
    const app = await liveApp({ actor: { name: 'operator 1', roles: ['operator'] } });
    const { log, cycle } = recordedCase('must-work');
    expect((await upload(app, '/api/imports?name=run.csv', log)).status).toBe(201);
    expect((await app.post('/api/cycles', { document: cycle })).status).toBe(403);
    expect((await app.post('/api/cycles/SR-180/B/release', { reason: 'mine' })).status).toBe(403);
  });
});

describe('every answer', () => {
  it('forbids scripts and styles from anywhere else, and asks for no upgrade', async () => {
    const app = await liveApp();
    const { headers } = await app.get('/api/workshop');
    const policy = headers.get('content-security-policy') ?? '';
    expect(policy).toContain("script-src 'self'");
    expect(policy).toContain("style-src 'self'");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toMatch(/unsafe|upgrade-insecure/);
    expect(headers.get('strict-transport-security')).toBeNull();
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('x-powered-by')).toBeNull();
    expect(headers.get('cache-control')).toBe('no-store');
  });

  it('has a help page for every problem', async () => {
    const app = await liveApp();
    for (const code of ERROR_CODES) {
      const page = await app.get(`/problems/${code}`);
      expect([code, page.status, page.headers.get('content-type')]).toEqual([code, 200, 'text/html; charset=utf-8']);
      expect(page.text).toMatch(/<h1>.+<\/h1>\n<p>.{20,}<\/p>/);
    }
    expect((await app.get('/problems/no-such')).status).toBe(404);
  });
});

describe('the OpenAPI description', () => {
  it('describes every route with its roles, and refers to nothing that is not there', async () => {
    const app = await liveApp();
    const { body } = await app.get('/api/openapi.json');
    expect(body.openapi).toBe('3.1.0');
    const described = Object.entries(body.paths as Record<string, Record<string, object>>).flatMap(([path, methods]) =>
      Object.keys(methods).map((method) => `${method} ${path}`),
    );
    expect(described.sort()).toEqual(
      Object.values(OPERATIONS)
        .map(({ method, path }) => `${method} ${path}`)
        .sort(),
    );
    for (const methods of Object.values(body.paths as Record<string, Record<string, Record<string, unknown>>>)) {
      for (const operation of Object.values(methods)) {
        expect(operation['x-roles']).not.toEqual([]);
        expect(operation.responses).toBeDefined();
      }
    }
    const references = [...JSON.stringify(body).matchAll(/"\$ref":"([^"]+)"/g)].map(([, target]) => target ?? '');
    expect(references.length).toBeGreaterThan(5);
    for (const reference of references) {
      const there = reference
        .split('/')
        .slice(1)
        .reduce((place, key) => place?.[key], body);
      expect(there, reference).toBeTypeOf('object');
    }
  });
});
