import { describe, expect, it } from 'vitest';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import { readLog } from '../../models/log/read-log.ts';
import { VERSION } from '../../server/contract/version.ts';
import { sha256Of, sha256OfDocument } from '../../server/store/canonical.ts';
import { liveApp, NOW, upload } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';
import { loadCase, recordCase } from './workshop-steps.ts';

const DEED = { at: NOW, by: 'inspector 2' };
const SHA256 = expect.stringMatching(/^[0-9a-f]{64}$/);

describe('from a file to a run', () => {
  it('makes a run of an uploaded file, awaiting its load', async () => {
    const app = await liveApp();
    const { log, layout } = recordedCase('must-work');
    const run = await recordCase(app, 'must-work');
    const view = await app.get(`/api/runs/${run}`);
    expect(view.body).toEqual({
      run: 1,
      vessel: 'Autoclave 1',
      recorder: 'recorder 1',
      from: '2026-03-03T08:14:00.000Z',
      until: '2026-03-03T14:56:30.000Z',
      scans: 806,
      workOrder: null,
      cycle: null,
      parts: [],
      state: 'awaiting-load',
      live: null,
      verdict: null,
      undecided: 0,
      notMet: [],
      cannotTell: [],
      channels: layout.channels.map(({ name, role, unit }) => ({ name, role, unit, source: 1 })),
      sources: [
        {
          n: 1,
          recorder: 'recorder 1',
          layout,
          layoutSha256: sha256OfDocument(layout),
          files: [{ n: 1, name: 'run.csv', bytes: log.length, sha256: sha256Of(log) }],
          chainSha256: SHA256,
          scans: 806,
          from: '2026-03-03T08:14:00.000Z',
          until: '2026-03-03T14:56:30.000Z',
          repairs: [],
          passedOver: [],
          joined: null,
          recorded: DEED,
        },
      ],
      joined: [],
      load: null,
      loadSet: null,
      cycleIssue: null,
      resin: null,
      evaluation: null,
      evaluations: [],
      decisions: [],
      notes: [],
      margin: [
        { at: '2026-03-03T08:14:00.000Z', kind: 'log', text: 'logging began' },
        { at: '2026-03-03T14:56:30.000Z', kind: 'log', text: 'logging ended' },
      ],
    });
    const now = await app.get('/api/now');
    expect(now.body.needs).toEqual([{ kind: 'awaiting-load', run: now.body.lastRuns[0] }]);
    expect(now.body.vessels).toEqual([
      { name: 'Autoclave 1', kind: 'autoclave', lastRun: now.body.lastRuns[0], recentRuns: 1, recentConforming: 0 },
    ]);
  });

  it('gives back the file byte for byte, and its readings in their units', async () => {
    const app = await liveApp();
    const { log } = recordedCase('must-work');
    const run = await recordCase(app, 'must-work');
    const file = await app.get(`/api/runs/${run}/file/1`);
    expect(file.text).toBe(log.toString());
    expect(file.headers.get('content-disposition')).toBe('attachment; filename=run.csv');
    const csv = await app.get(`/api/runs/${run}/readings.csv`);
    const rows = csv.text.trimEnd().split('\r\n');
    const { readings } = readLog([{ name: 'run.csv', chunks: [log] }], recordedCase('must-work').layout);
    expect(rows.length).toBe(807);
    expect(rows[0]).toBe(
      ['time_utc', ...readings.channels.map(({ channel }) => `${channel.name} [${channel.unit}]`)].join(','),
    );
    expect(rows[806]).toBe(
      ['2026-03-03T14:56:30.000Z', ...readings.channels.map(({ value }) => String(value[805]))].join(','),
    );
    expect((await app.get(`/api/runs/${run}/file/2`)).status).toBe(404);
  });

  it('knows a file by its bytes, whatever it is called', async () => {
    const app = await liveApp();
    const { log, layout } = recordedCase('must-work');
    const first = await upload(app, '/api/imports?name=a.csv', log);
    const again = await upload(app, '/api/imports?name=b.csv', log);
    expect(again.body.id).toBe(first.body.id);
    const { body } = await app.post(`/api/imports/${first.body.id}/run`, { layout });
    const late = await upload(app, '/api/imports?name=c.csv', log);
    expect(late.status).toBe(409);
    expect(late.body).toEqual({
      type: '/problems/already-recorded',
      title: 'Already recorded',
      status: 409,
      detail: 'c.csv is recorded already, as run 1',
      facts: { file: 'c.csv', run: body.run, sha256: sha256Of(log) },
    });
    expect((await app.get('/api/workshop')).body.counts.runs).toBe(1);
    expect((await app.get('/api/imports')).body).toEqual({ imports: [] });
  });
});

describe('from a load to a verdict', () => {
  it('judges the run as the engine does, and keeps the hash of every input', async () => {
    const app = await liveApp();
    const { log, layout, cycle, load } = recordedCase('must-work');
    const run = await recordCase(app, 'must-work');
    const set = await loadCase(app, run, 'must-work', { load: load() });
    expect(set.status, set.text).toBe(201);
    const { evaluation, ...view } = set.body;
    const engine = evaluateLog(readLog([{ name: 'run.csv', chunks: [log] }], layout), {
      cycle,
      load: load(),
      resin: null,
      exclusions: [],
      barometer: null,
      open: false,
    });
    const cycleSha256 = sha256OfDocument(cycle);
    expect(evaluation).toEqual({
      id: 1,
      deed: DEED,
      engine: VERSION,
      verdict: engine.verdict,
      because: 'load set',
      inputs: {
        readings: view.sources[0].chainSha256,
        layout: sha256OfDocument(layout),
        load: sha256OfDocument(load()),
        cycle: cycleSha256,
        resin: null,
        decisions: sha256OfDocument({ format: 'dwellbook-decisions/1', exclusions: [], believed: [] }),
      },
      sha256: SHA256,
      document: JSON.parse(
        JSON.stringify({
          ...engine,
          log: { ...engine.log, sha256: sha256Of(log) },
          cycle: { ...engine.cycle, sha256: cycleSha256 },
        }),
      ),
    });
    expect(view.state).toBe('judged');
    expect(view.parts).toEqual(['P-A']);
    expect(view.margin.map(({ text }: { text: string }) => text)).toContain('heat-on');
  });

  it('judges anew when a suspect is decided on, and keeps the earlier judgement', async () => {
    const app = await liveApp();
    const run = await recordCase(app, 'stuck');
    const before = (await loadCase(app, run, 'stuck')).body;
    expect(before.undecided).toBeGreaterThan(0);
    const [suspect] = before.evaluation.document.decisions;
    const now = await app.get('/api/now');
    expect(now.body.needs).toEqual([
      { kind: 'undecided-suspect', run: now.body.lastRuns[0], channels: [suspect.channel] },
    ]);
    const decision = { channel: suspect.channel, kind: suspect.kind, from: suspect.from, reason: 'reads the same' };
    const after = (await app.post(`/api/runs/${run}/exclusions`, { decision: 'exclude', ...decision })).body;
    expect(after.decisions).toEqual([{ decision: 'exclude', ...decision, deed: DEED }]);
    expect(after.undecided).toBe(0);
    expect(after.evaluations.map(({ id, because }: { id: number; because: string }) => [id, because])).toEqual([
      [2, `${suspect.channel} excluded`],
      [1, 'load set'],
    ]);
    expect((await app.get(`/api/runs/${run}/evaluations/1`)).body).toEqual(before.evaluation);
    const kept = await app.post(`/api/runs/${run}/exclusions`, {
      decision: 'keep',
      channel: suspect.channel,
      reason: 'was sound after all',
    });
    expect(kept.body.undecided).toBe(0);
    expect(kept.body.evaluation.document.sensors).not.toEqual(after.evaluation.document.sensors);
  });

  it('gives the old answer when an old run is judged again', async () => {
    const app = await liveApp();
    const run = await recordCase(app, 'must-work');
    const { evaluation } = (await loadCase(app, run, 'must-work')).body;
    const again = await app.post(`/api/runs/${run}/evaluations`, { reason: 'to be sure' });
    expect(again.status).toBe(201);
    expect({ ...again.body, id: 1, because: 'load set' }).toEqual(evaluation);
  });

  it('draws the run, whole and a stretch of it', async () => {
    const app = await liveApp();
    const run = await recordCase(app, 'cure-estimates');
    await loadCase(app, run, 'cure-estimates');
    const whole = (await app.get(`/api/runs/${run}/chart`)).body;
    expect(whole.lines.length).toBeGreaterThan(3);
    expect(whole.bands.length).toBeGreaterThan(0);
    const part = (
      await app.get(
        `/api/runs/${run}/chart?part=SR-0417&from=2026-03-03T09:00:00Z&until=2026-03-03T10:00:00Z&points=50`,
      )
    ).body;
    expect(part.untilH - part.fromH).toBeCloseTo(1, 9);
    expect(part.part).toBe('SR-0417');
    const wrong = await app.get(`/api/runs/${run}/chart?part=NOBODY`);
    expect(wrong.status).toBe(404);
  });
});
