import { describe, expect, it } from 'vitest';
import { liveApp, NOW } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';
import { loadCase, recordCase } from './workshop-steps.ts';

const DEED = { at: NOW, by: 'inspector 2' };

describe('from a part to its history', () => {
  it('shows everything that touched it and who shares it', async () => {
    const app = await liveApp();
    const { load } = recordedCase('two-bag-lines');
    const run = await recordCase(app, 'two-bag-lines');
    const parts = load().parts.map(({ part }) => part);
    const particulars = parts.map((part) => ({ part, title: 'Strut', drawing: 'SR-D-12', tool: 'T-7' }));
    const set = await loadCase(app, run, 'two-bag-lines', { load: load(), particulars });
    expect(set.status, set.text).toBe(201);
    const [serial = '', mate = ''] = parts;
    const result = { at: NOW, test: 'proof load', outcome: 'failed', figure: 41.5, unit: 'kN', text: 'broke' };
    await app.post(`/api/parts/${mate}/results`, result);
    const part = (await app.get(`/api/parts/${serial}`)).body;
    const line = (await app.get('/api/runs')).body.runs[0];
    expect(part).toEqual({
      serial,
      title: 'Strut',
      drawing: 'SR-D-12',
      drawingIssue: null,
      tool: 'T-7',
      quantity: 1,
      verdict: set.body.evaluation.document.parts[0].verdict,
      runs: [
        {
          line,
          evaluation: set.body.evaluation.document.parts[0],
          evaluatedAt: NOW,
          sensors: load()
            .sensors.filter((sensor) => sensor.parts?.includes(serial))
            .map(({ channel, place = null, parts: on = [] }) => ({
              channel,
              place,
              sharedWith: on.filter((one) => one !== serial),
            })),
          bagLine: load().parts[0]?.bagLine ?? null,
          startDegree: null,
          leakTest: null,
          workOrder: load().workOrder ?? null,
          loadMates: [mate],
          files: set.body.sources[0].files,
          cycleSha256: set.body.cycleIssue.sha256,
          decisions: [],
        },
      ],
      results: [],
      nonconformances: [],
      layup: null,
      toolRecord: null,
      works: [],
      coupons: [],
      shares: [
        {
          serial: mate,
          verdict: set.body.evaluation.document.parts[1].verdict,
          failedTest: true,
          what: expect.arrayContaining([`run ${run}`, 'tool T-7']),
        },
      ],
      audit: expect.arrayContaining([expect.objectContaining({ verb: 'set-load', by: 'inspector 2' })]),
    });
    const failed = (await app.get(`/api/parts/${mate}`)).body;
    expect(failed.results).toEqual([{ ...result, id: 1, measured: null, reason: null, deed: DEED }]);
    const listed = (await app.get('/api/parts?q=SR-D-12')).body;
    expect(listed.total).toBe(2);
    expect(listed.parts.map(({ serial: one, failedTest }: never) => [one, failedTest])).toEqual(
      expect.arrayContaining([
        [serial, false],
        [mate, true],
      ]),
    );
  });

  it('is found by any code on it', async () => {
    const app = await liveApp();
    const run = await recordCase(app, 'must-work');
    await loadCase(app, run, 'must-work');
    const find = async (code: string) => (await app.get(`/api/find?code=${encodeURIComponent(code)}`)).body.hits;
    expect(await find('sr-0417')).toEqual([{ kind: 'part', title: 'SR-0417', page: '/parts/SR-0417', exact: true }]);
    expect(await find('W-2231')).toEqual([
      { kind: 'work-order', title: 'Work order W-2231, run 1', page: '/runs/1', exact: true },
    ]);
    expect(await find('1')).toContainEqual({ kind: 'run', title: 'Run 1', page: '/runs/1', exact: true });
    expect(await find('SR-180')).toContainEqual({
      kind: 'cycle',
      title: 'SR-180 issue B',
      page: '/cycles/SR-180/B',
      exact: true,
    });
    expect(await find('run.csv')).toContainEqual({
      kind: 'file',
      title: 'run.csv, run 1',
      page: '/runs/1',
      exact: true,
    });
    expect(await find('Autoclave')).toContainEqual({
      kind: 'vessel',
      title: 'Autoclave 1',
      page: '/runs?vessel=Autoclave%201',
      exact: false,
    });
    expect(await find('%')).toEqual([]);
  });
});

describe('the audit trail', () => {
  it('names who did what to what, and every chain holds', async () => {
    const app = await liveApp();
    const run = await recordCase(app, 'must-work');
    await loadCase(app, run, 'must-work');
    await app.post(`/api/runs/${run}/notes`, { text: 'Door opened at once', at: '2026-03-03T14:00:00Z' });
    const { lines } = (await app.get('/api/audit')).body;
    expect(lines.map(({ n, by, verb, subject }: never) => [n, by, verb, subject])).toEqual(
      [
        [8, 'inspector 2', 'add-note', 'run/1'],
        [7, 'inspector 2', 'judge-run', 'run/1'],
        [6, 'inspector 2', 'set-load', 'run/1'],
        [5, 'inspector 2', 'record-run', 'run/1'],
        [4, 'inspector 2', 'keep-layout', 'recorder/recorder 1'],
        [3, 'inspector 2', 'add-recorder', 'recorder/recorder 1'],
        [2, 'inspector 2', 'receive-file', 'import/1'],
        [1, 'inspector 2', 'import-cycle', 'cycle/SR-180/B'],
      ]
        .map(([n, ...rest]) => [Number(n) + 1, ...rest])
        .concat([[1, 'inspector 2', 'add-vessel', 'vessel/Autoclave 1']]),
    );
    expect((await app.get('/api/audit/verify')).body).toEqual({ holds: true, lines: 9, sources: 1, firstBroken: null });
    app.parts.db.exec('DROP TRIGGER evaluations_are_never_updated; UPDATE evaluations SET packed = zeroblob(9)');
    await expect(app.get('/api/audit/verify')).resolves.toMatchObject({ status: 200, body: { holds: false } });
  });
});
