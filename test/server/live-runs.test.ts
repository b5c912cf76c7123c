import { describe, expect, it } from 'vitest';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { type LiveApp, liveApp, upload } from './live-app.ts';
import { CASE, caseReadings, layout, liveVessel, log, push, pushAll, scansOf } from './live-steps.ts';
import { recordedCase } from './recorded-case.ts';
import { loadCase, recordCase } from './workshop-steps.ts';

describe('a run logged as it happens', () => {
  it('comes to the same readings and the same verdict as the recorder’s file of it', async () => {
    // In a workshop of its own: one part is in two vessels at once in none.
    const files = await liveApp();
    const filed = await recordCase(files, CASE);
    expect((await loadCase(files, filed, CASE)).status).toBe(201);
    const ofFile = (await files.get(`/api/runs/${filed}`)).body;
    const app = await liveApp();
    await app.post('/api/cycles', { document: recordedCase(CASE).cycle });

    const key = await liveVessel(app);
    const scans = scansOf(await caseReadings());
    const [head, rest] = [scans.slice(0, 50), scans.slice(50)];
    await pushAll(app, key, head);
    // Its start was forgotten: begun from the first scan that is kept.
    const begun = await app.post('/api/vessels/Autoclave 7/runs', { from: head[0]?.at, load: null, cycle: null });
    expect(begun.status, begun.text).toBe(201);
    const { run } = begun.body;
    expect(begun.body).toMatchObject({ live: 'running', scans: 50, recorder: 'plc of Autoclave 7', from: head[0]?.at });
    const loaded = await loadCase(app, run, CASE);
    expect(loaded.status, loaded.text).toBe(201);
    const outcomes = loaded.body.evaluation.document.parts[0].findings.map((one: { outcome: string }) => one.outcome);
    expect(outcomes).toContain('pending');
    await pushAll(app, key, rest);
    expect((await app.get(`/api/runs/${run}/chart?points=200`)).status).toBe(200);
    expect((await app.get('/api/runs')).body.runs.map((line: { live: string | null }) => line.live)).toContain(
      'running',
    );
    const ended = await app.post(`/api/runs/${run}/end`, { at: scans.at(-1)?.at });
    expect(ended.status, ended.text).toBe(200);
    expect(ended.body).toMatchObject({ live: 'ended', scans: scans.length, until: scans.at(-1)?.at });
    const open = ended.body.sources[0];
    const csvWhileOpen = (await app.get(`/api/runs/${run}/readings.csv`)).text;

    const closed = await app.post(`/api/runs/${run}/close`, {});
    expect(closed.status, closed.text).toBe(200);
    expect(closed.body.live).toBeNull();
    expect(closed.body.sources).toEqual([{ ...open, recorded: closed.body.sources[0].recorded }]);
    expect((await app.get(`/api/runs/${run}/readings.csv`)).text).toBe(csvWhileOpen);
    expect(csvWhileOpen).toBe((await files.get(`/api/runs/${filed}/readings.csv`)).text);
    expect(closed.body.evaluation.because).toBe('run closed');
    expect(closed.body.evaluation.document.parts).toEqual(ofFile.evaluation.document.parts);
    expect(closed.body.evaluation.verdict).toBe(ofFile.evaluation.verdict);
    expect(verifyChains(app.parts.db)).toMatchObject({ holds: true });
    await app.parts.live.rolling.sweep();
    expect(app.parts.db.prepare('SELECT count(*) FROM live_scans').pluck().get()).toBe(0);
    const verbs = (await app.get(`/api/audit?subject=run/${run}`)).body.lines.map(
      (line: { verb: string }) => line.verb,
    );
    expect(verbs).toEqual(['judge-run', 'close-run', 'end-run', 'judge-run', 'set-load', 'begin-run']);
  });

  it('is begun with its load, and open runs are one a vessel', async () => {
    const app = await liveApp();
    await recordCase(app, CASE);
    await liveVessel(app);
    const { cycle } = recordedCase(CASE);
    const load = {
      format: 'dwellbook-load/1',
      parts: [{ part: 'P-1' }],
      sensors: [{ channel: 'TC1', parts: ['P-1'] }],
    };
    const request = { load, cycle: { code: cycle.code, issue: cycle.issue } };
    const unknown = { ...request, load: { ...load, sensors: [{ channel: 'TC99', parts: ['P-1'] }] } };
    const refused = await app.post('/api/vessels/Autoclave 7/runs', unknown);
    expect([refused.status, refused.body.type]).toEqual([422, '/problems/channel-unknown']);
    expect((await app.get('/api/runs')).body.total).toBe(1);
    const begun = await app.post('/api/vessels/Autoclave 7/runs', request);
    expect(begun.status, begun.text).toBe(201);
    expect(begun.body).toMatchObject({ state: 'judged', live: 'running', scans: 0, evaluation: null, parts: ['P-1'] });
    const { run } = begun.body;
    expect((await app.get(`/api/runs/${run}/chart`)).body.detail).toBe('A log without scans cannot be drawn');
    const again = await app.post('/api/vessels/Autoclave 7/runs', { load: null, cycle: null });
    expect([again.status, again.body.detail]).toEqual([
      409,
      `Run ${run} is open in this vessel; end and close it first`,
    ]);
    const running = await app.post(`/api/runs/${run}/close`, {});
    expect([running.status, running.body.detail]).toEqual([409, `Run ${run} is still running; end it first`]);
    await app.post(`/api/runs/${run}/end`, {});
    // Nothing ever came: its channels are the run's all the same, and there is nothing to judge.
    const closed = await app.post(`/api/runs/${run}/close`, {});
    expect(closed.status, closed.text).toBe(200);
    expect(closed.body).toMatchObject({ live: null, evaluation: null, sources: [{ scans: 0, files: [] }] });
    expect(closed.body.channels.map(({ name }: { name: string }) => name)).toContain('TC1');
    const after = await app.post('/api/vessels/Autoclave 7/runs', {
      from: '2026-03-01T00:00:00Z',
      load: null,
      cycle: null,
    });
    expect([after.status, after.body.detail]).toEqual([
      409,
      'The run before it in this vessel ended at 2026-03-10T08:00:00.000Z',
    ]);
  });

  it('cannot begin before what is kept, nor in what is still to come, nor where nothing sends', async () => {
    const app = await liveApp();
    const key = await liveVessel(app);
    const begin = (from: string, vessel = 'Autoclave 7') =>
      app.post(`/api/vessels/${vessel}/runs`, { from, load: null, cycle: null });
    expect((await begin('2026-03-10T07:00:00Z')).body.detail).toBe(
      'A run cannot begin at 2026-03-10T07:00:00.000Z: nothing is kept',
    );
    await push(app, key, [{ at: '2026-03-10T07:30:00Z', values: { TC1: 20 } }]);
    expect((await begin('2026-03-10T07:00:00Z')).body.detail).toBe(
      'A run cannot begin at 2026-03-10T07:00:00.000Z: scans are kept from 2026-03-10T07:30:00.000Z on',
    );
    expect((await begin('2026-03-10T08:00:01Z')).body.detail).toBe('2026-03-10T08:00:01.000Z is still to come');
    await app.post('/api/vessels', { name: 'Oven 9', kind: 'oven' });
    expect((await begin('2026-03-10T08:00:00Z', 'Oven 9')).status).toBe(409);
    expect((await begin('2026-03-10T07:30:00Z')).status).toBe(201);
  });

  it('refuses what is for files and for closed runs by name', async () => {
    const app = await liveApp();
    const key = await liveVessel(app);
    await push(app, key, [{ at: '2026-03-10T07:30:00Z', values: { TC1: 20 } }]);
    const { run } = (
      await app.post('/api/vessels/Autoclave 7/runs', { from: '2026-03-10T07:30:00Z', load: null, cycle: null })
    ).body;
    const received = await upload(app, '/api/imports?name=late.csv', log);
    const joined = await app.post(`/api/imports/${received.body.id}/run`, { layout, run });
    expect(joined.body.detail).toBe(`Run ${run} is still open; end and close it before a file is added to it`);
    await app.post(`/api/runs/${run}/end`, {});
    await app.post(`/api/runs/${run}/close`, {});
    const again = await app.post(`/api/runs/${run}/sources/1/layout`, { layout, reason: 'a column' });
    expect([again.status, again.body.detail]).toEqual([
      409,
      `Source 1 of run ${run}, "plc of Autoclave 7", was logged as it happened; there is no file to read again`,
    ]);
    expect((await app.post(`/api/runs/${run}/end`, {})).body.detail).toBe(`Run ${run} is closed already`);
  });
});

describe('closing a run', () => {
  const begin = async (app: LiveApp, key: string) => {
    const scans = scansOf(await caseReadings());
    await pushAll(app, key, scans.slice(0, 100));
    const request = { from: scans[0]?.at, load: null, cycle: null };
    const { run } = (await app.post('/api/vessels/Autoclave 7/runs', request)).body;
    return { run, scans };
  };

  it('takes in a scan that comes late while it is judged', async () => {
    let whileJudged: () => Promise<unknown> = async () => undefined;
    const app = await liveApp({
      evaluate: async (readings, inputs) => {
        if (!inputs.open) await whileJudged();
        return evaluateLog(readings, inputs);
      },
    });
    await app.post('/api/cycles', { document: recordedCase(CASE).cycle });
    const key = await liveVessel(app);
    const { run, scans } = await begin(app, key);
    await loadCase(app, run, CASE);
    await app.post(`/api/runs/${run}/end`, { at: scans[150]?.at });
    let pushes = 0;
    whileJudged = async () => {
      pushes += 1;
      if (pushes === 1) await push(app, key, scans.slice(140, 145));
    };
    const closed = await app.post(`/api/runs/${run}/close`, {});
    expect(closed.status, closed.text).toBe(200);
    expect(pushes).toBe(2);
    expect(closed.body).toMatchObject({ live: null, scans: 105, evaluation: { document: { log: { scans: 105 } } } });
    expect(verifyChains(app.parts.db)).toMatchObject({ holds: true });
  });

  it('merges nothing that no longer has its hash, and leaves it as it is', async () => {
    const app = await liveApp();
    const { db } = app.parts;
    const key = await liveVessel(app);
    const { run, scans } = await begin(app, key);
    await pushAll(app, key, scans.slice(100, 101));
    await app.post(`/api/runs/${run}/end`, { at: scans[150]?.at });
    db.exec('DROP TRIGGER live_scans_are_never_updated');
    db.prepare('UPDATE live_scans SET packed = zeroblob(length(packed)) WHERE time_ms = ?').run(
      Date.parse(scans[50]?.at ?? ''),
    );
    const closed = await app.post(`/api/runs/${run}/close`, {});
    expect([closed.status, closed.body.type]).toEqual([503, '/problems/database-damaged']);
    expect((await app.get(`/api/runs/${run}`)).body).toMatchObject({ live: 'ended', scans: 101 });
    expect(verifyChains(db)).toMatchObject({
      holds: false,
      firstBroken: `scans of run ${run}, source "plc of Autoclave 7"`,
    });
  });
});
