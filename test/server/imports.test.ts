import { describe, expect, it } from 'vitest';
import { sha256Of } from '../../server/store/canonical.ts';
import { makeXlsx, type SheetCell } from './files/make-xlsx.ts';
import { liveApp, NOW, upload } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';

const { log, layout, cycle } = recordedCase('untidy');

describe('an uploaded file', () => {
  it('is shown with its first lines, and a layout that says what is proved, guessed and asked', async () => {
    const app = await liveApp();
    const { status, body } = await upload(app, '/api/imports?name=run.csv', log);
    expect(status).toBe(201);
    const { proposal, firstLines, ...line } = body;
    expect(line).toEqual({
      id: 1,
      name: 'run.csv',
      bytes: log.length,
      sha256: sha256Of(log),
      origin: 'upload',
      recorder: null,
      state: 'waiting',
      received: { at: NOW, by: 'inspector 2' },
      run: null,
      problem: null,
      knownLayouts: [],
    });
    expect(firstLines[3]).toBe(log.toString().split(/\r?\n/)[3]);
    expect(proposal.layout).toMatchObject({ delimiter: ';', decimal: ',', header: 4, units: 5, firstReading: 6 });
    const bases = new Set(proposal.statements.map(({ basis }: { basis: string }) => basis));
    expect(bases.has('proved') && bases.has('asked')).toBe(true);
    expect((await app.get('/api/imports/1')).body).toEqual(body);
    expect((await app.get('/api/now')).body.needs).toEqual([
      { kind: 'unread-file', import: (await app.get('/api/imports')).body.imports[0] },
    ]);
  });

  it('is read whole by a layout before anything is kept', async () => {
    const app = await liveApp();
    await upload(app, '/api/imports?name=run.csv', log);
    const preview = (await app.post('/api/imports/1/preview', { layout })).body;
    expect(preview.channels.map(({ name, unit }: never) => [name, unit])).toEqual(
      layout.channels.map(({ name, unit }) => [name, unit]),
    );
    expect(preview.first[0]).toEqual({
      at: '2026-03-03T08:14:00.000Z',
      values: [20, 20.2, 20, 20, 20, 0, 0.86],
    });
    expect(preview.intervalS).toBe(30);
    expect(preview.scans).toBeGreaterThan(500);
    const wrong = { ...layout, channels: [{ column: 'T9', name: 'TC9', role: 'part', unit: '°C' }] };
    const refused = await app.post('/api/imports/1/preview', { layout: wrong });
    expect([refused.status, refused.body.type]).toEqual([422, '/problems/log-column-missing']);
    expect(refused.body.detail).toContain('T9');
    expect((await app.get('/api/workshop')).body.counts).toMatchObject({ runs: 0, recorders: 0 });
  });

  it('is offered the kept layouts that read it first', async () => {
    const app = await liveApp();
    const other = {
      ...layout,
      channels: layout.channels.map((channel) => ({ ...channel, column: `X${channel.column}` })),
    };
    await app.post('/api/recorders', { name: 'a recorder', layout: other });
    await app.post('/api/recorders', { name: 'b recorder', layout });
    const { body } = await upload(app, '/api/imports?name=run.csv', log);
    expect(body.knownLayouts.map(({ recorder, reads }: never) => [recorder, reads])).toEqual([
      ['b recorder', true],
      ['a recorder', false],
    ]);
  });

  it('waits where it is text without a table, is refused where it is none, and can be set aside', async () => {
    const app = await liveApp();
    const letter = await upload(app, '/api/imports?name=letter.txt', 'Dear all,\nthe oven is off.\n');
    expect([letter.status, letter.body.proposal, letter.body.problem.type]).toEqual([
      201,
      null,
      '/problems/layout-not-provable',
    ]);
    expect((await upload(app, '/api/imports?name=empty.csv', '')).body.type).toBe('/problems/log-empty');
    const picture = await upload(
      app,
      '/api/imports?name=picture.png',
      Buffer.from([0x89, 0x50, 0x4e, 0x47, 0, 0, 1, 2]),
    );
    expect(picture.body.type).toBe('/problems/log-not-text');
    expect((await app.get('/api/imports')).body.imports.length).toBe(1);
    const set = await app.post('/api/imports/1/discard', { reason: 'a letter' });
    expect(set.body).toEqual({ imports: [] });
    expect((await app.post('/api/imports/1/discard', { reason: 'again' })).status).toBe(409);
    expect((await app.post('/api/imports/1/run', { layout })).status).toBe(422);
  });

  it('may be a workbook, kept as it came', async () => {
    const app = await liveApp();
    const rows = Array.from({ length: 30 }, (_, n): SheetCell[] => [
      `2026-03-03 08:${String(n).padStart(2, '0')}:00`,
      20 + n / 10,
    ]);
    const book = makeXlsx([['Time', 'TC1 (°C)'], ...rows]);
    const { status, body } = await upload(app, '/api/imports?name=run.xlsx', book);
    expect(status).toBe(201);
    expect(body.firstLines.slice(0, 2)).toEqual(['Time,TC1 (°C)', '2026-03-03 08:00:00,20']);
    const { time, ...proposed } = body.proposal.layout;
    const recorded = await app.post('/api/imports/1/run', { layout: { ...proposed, time: { ...time, zone: 'UTC' } } });
    expect(recorded.status, recorded.text).toBe(201);
    expect((await app.get('/api/runs/1')).body).toMatchObject({
      scans: 30,
      sources: [{ files: [{ name: 'run.xlsx', bytes: book.length, sha256: sha256Of(book) }] }],
    });
  });

  it('is another source of a run where that is said, its channels beside the others', async () => {
    const app = await liveApp();
    await upload(app, '/api/imports?name=run.csv', log);
    await app.post('/api/imports/1/run', { layout });
    const vacuum = 'time,V9\n2026-03-03 08:14:10,0.9\n2026-03-03 08:14:40,0.8\n2026-03-03 08:15:10,\n';
    const vacuumLayout = {
      format: 'dwellbook-layout/1',
      name: 'vacuum recorder',
      header: 1,
      time: { columns: ['time'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: 'UTC' },
      channels: [{ column: 'V9', name: 'line 9', role: 'vacuum', unit: 'bar' }],
    };
    await upload(app, '/api/imports?name=vacuum.csv', vacuum);
    const clash = { ...vacuumLayout, channels: [{ ...vacuumLayout.channels[0], name: 'TC1' }] };
    const refused = await app.post('/api/imports/2/run', { layout: clash, run: 1 });
    expect([refused.status, refused.body.facts]).toEqual([409, { channel: 'TC1' }]);
    expect((await app.post('/api/imports/2/run', { layout: vacuumLayout, run: 1 })).body).toEqual({ run: 1 });
    const run = (await app.get('/api/runs/1')).body;
    expect(run.sources.map(({ n, files }: never) => [n, files])).toEqual([
      [1, [expect.objectContaining({ n: 1, name: 'run.csv' })]],
      [2, [expect.objectContaining({ n: 2, name: 'vacuum.csv' })]],
    ]);
    const rows = (await app.get('/api/runs/1/readings.csv')).text.split('\r\n');
    expect(rows[0]).toMatch(/,line 9 \[bar\]$/);
    expect(rows[1]).toMatch(/^2026-03-03T08:14:00.000Z,20,.*,$/);
    expect(rows[2]).toBe(`2026-03-03T08:14:10.000Z${','.repeat(layout.channels.length)},0.9`);
    expect((await app.get('/api/runs/1/file/2')).text).toBe(vacuum);
  });
});

describe('a run', () => {
  it('is read again by another layout, and what was read and judged first stays', async () => {
    const app = await liveApp();
    await app.post('/api/cycles', { document: cycle });
    await upload(app, '/api/imports?name=run.csv', log);
    const asTools = layout.channels.map((channel) =>
      channel.role === 'part' ? { ...channel, role: 'tool' as const } : channel,
    );
    await app.post('/api/imports/1/run', { layout: { ...layout, channels: asTools }, recorder: 'recorder 1' });
    const load = { format: 'dwellbook-load/1', parts: [{ part: 'P-A' }], sensors: [] };
    const named = { code: cycle.code, issue: cycle.issue };
    const first = (await app.post('/api/runs/1/load', { load, cycle: named })).body;
    expect(first.verdict).toBe('cannot-tell');
    const again = await app.post('/api/runs/1/sources/1/layout', { layout, reason: 'they were on the parts' });
    expect(again.status, again.text).toBe(201);
    expect(again.body.verdict).toBe('conforms');
    expect(again.body.sources.map(({ n, recorder, layout: by }: never) => [n, recorder, by])).toEqual([
      [2, 'recorder 1', layout],
    ]);
    expect((await app.get('/api/runs/1/evaluations/1')).body).toEqual(first.evaluation);
    expect((await app.get('/api/audit/verify')).body).toMatchObject({ holds: true, sources: 2 });
    const gone = await app.post('/api/runs/1/sources/1/layout', { layout, reason: 'once more' });
    expect(gone.status).toBe(404);
    const unfit = { ...layout, channels: layout.channels.filter(({ role }) => role !== 'vacuum') };
    const channels = unfit.channels.map((channel) => ({ ...channel, name: `x ${channel.name}` }));
    const set = { ...load, sensors: [{ channel: 'TC1', parts: ['P-A'] }] };
    await app.post('/api/runs/1/load', { load: set, cycle: named, reason: 'TC1 was its own' });
    const refused = await app.post('/api/runs/1/sources/2/layout', { layout: { ...unfit, channels }, reason: 'no' });
    expect([refused.status, refused.body.type]).toEqual([422, '/problems/channel-unknown']);
    expect((await app.get('/api/runs/1')).body.sources[0].n).toBe(2);
  });
});
