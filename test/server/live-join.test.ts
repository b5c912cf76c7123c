import { describe, expect, it } from 'vitest';
import { readLog } from '../../models/log/read-log.ts';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { asLogFile } from '../../server/files/as-log-file.ts';
import { keepScans } from '../../server/store/live-scans.ts';
import { liveApp, upload } from './live-app.ts';
import { addLiveVessel, pushSource } from './live-workshop.ts';
import { recordedCase } from './recorded-case.ts';
import { loadCase } from './workshop-steps.ts';

const { log, layout, cycle } = recordedCase('must-work');
const GAP = { fromMs: Date.parse('2026-03-03T10:00:00Z'), untilMs: Date.parse('2026-03-03T10:40:00Z') };

async function caseReadings() {
  return readLog([await asLogFile('run.csv', [log], log.length)], layout).readings;
}

/** The recorder's file as one whose clock stands so many seconds behind wrote it; its zone is UTC's in March. */
function fileBehind(s: number): Buffer {
  const text = log
    .toString('latin1')
    .replace(/(\d\d)\/(\d\d)\/(\d{4});(\d\d:\d\d:\d\d)/g, (_, day, month, year, clock) => {
      const at = new Date(Date.parse(`${year}-${month}-${day}T${clock}Z`) - 1000 * s).toISOString();
      return `${at.slice(8, 10)}/${at.slice(5, 7)}/${at.slice(0, 4)};${at.slice(11, 19)}`;
    });
  return Buffer.from(text, 'latin1');
}

/** A run that was logged live but for forty minutes, closed. */
async function runWithGap() {
  const app = await liveApp();
  const { db } = app.parts;
  await app.post('/api/cycles', { document: cycle });
  const { vesselId, settings } = addLiveVessel(db, 'Autoclave 7', { ...pushSource('plc'), channels: layout.channels });
  const { timeMs, channels } = await caseReadings();
  const scans = [...timeMs].flatMap((at, n) =>
    at > GAP.fromMs && at < GAP.untilMs
      ? []
      : [{ timeMs: at, sequence: null, figures: Float64Array.from(channels, ({ value }) => value[n] ?? Number.NaN) }],
  );
  keepScans(db, [{ vesselId, settings, scans, arrivedMs: Date.parse('2026-03-03T15:00:00Z') }]);
  const from = new Date(timeMs[0] ?? 0).toISOString();
  const { run } = (await app.post('/api/vessels/Autoclave 7/runs', { from, load: null, cycle: null })).body;
  await app.post(`/api/runs/${run}/end`, { at: new Date(timeMs.at(-1) ?? 0).toISOString() });
  expect((await app.post(`/api/runs/${run}/close`, {})).status).toBe(200);
  expect((await loadCase(app, run, 'must-work')).status).toBe(201);
  return { app, run, timeMs };
}

describe('a recorder’s file joined into the gap of a live run', () => {
  it('fills it, the clock put right as a person says, and each stretch names its source', async () => {
    const { app, run, timeMs } = await runWithGap();
    const before = (await app.get(`/api/runs/${run}`)).body;
    const received = await upload(app, '/api/imports?name=run.csv', fileBehind(3600));
    const address = `/api/imports/${received.body.id}`;
    const beside = await app.post(`${address}/run`, { layout, run });
    expect(beside.body.detail).toMatch(/^Two sources of the run have a channel called "\S+"/);

    const looked = await app.post(`${address}/join`, { layout, run });
    expect(looked.status, looked.text).toBe(200);
    expect(looked.body.proposal).toMatchObject({
      unit: '°C',
      because: 'with its clock 3600 s later the two agree best',
    });
    expect(looked.body.proposal.shiftS).toBe(3600);
    // Nothing is applied by itself: by its own clock the file contradicts the run.
    expect(looked.body.joined[0].differences[0].largest.difference).not.toBe(0);
    const shown = (await app.post(`${address}/join`, { layout, run, shiftS: 3600 })).body;
    expect(shown.ownChannels).toEqual([]);
    for (const { differences } of shown.joined) expect(differences[0]).toMatchObject({ differing: 0, source: 2 });
    expect((await app.get(`/api/runs/${run}`)).body).toEqual(before);

    const join = { shiftS: 3600, because: 'its clock was never put on summer time' };
    expect((await app.post(`${address}/run`, { layout, run, join })).status).toBe(201);
    const { body } = await app.get(`/api/runs/${run}`);
    expect(body.sources.map((source: { joined: unknown }) => source.joined)).toEqual([null, join]);
    expect(body.channels).toEqual(before.channels);
    const [first] = body.joined;
    expect(first.stretches.map(({ source }: { source: number }) => source)).toEqual([1, 2, 1]);
    expect(first.stretches[1]).toEqual({
      source: 2,
      from: '2026-03-03T10:00:30.000Z',
      until: '2026-03-03T10:39:30.000Z',
      readings: 79,
    });
    expect(body.evaluation.because).toBe('readings added');
    expect(body.evaluation.inputs.readings).not.toBe(before.evaluation.inputs.readings);
    expect(body.evaluation.document.log.scans).toBe(timeMs.length);

    const rows = (await app.get(`/api/runs/${run}/readings.csv`)).text.trimEnd().split('\r\n');
    expect(rows).toHaveLength(timeMs.length + 1);
    expect(rows[0]?.split(',').slice(0, 3)).toEqual(['time_utc', `${first.channel} [°C]`, `${first.channel} source`]);
    const sourceAt = (at: string) => rows.find((row) => row.startsWith(at))?.split(',')[2];
    expect([sourceAt('2026-03-03T09:59:30'), sourceAt('2026-03-03T10:20:00')]).toEqual(['1', '2']);
    // The bytes are kept as they came, by their own clock, and so is their chain.
    expect((await app.get(`/api/runs/${run}/file/1`)).text).toBe(fileBehind(3600).toString());
    expect(verifyChains(app.parts.db)).toMatchObject({ holds: true, sources: 2 });
    expect((await app.get(`/api/runs/${run}/chart`)).status).toBe(200);
    const trail = (await app.get(`/api/audit?subject=run/${run}`)).body.lines;
    expect(trail.map((line: { verb: string }) => line.verb)).toContain('join-source');
  });

  it('comes to the verdict of the whole file', async () => {
    const { app, run } = await runWithGap();
    const gappy = (await app.get(`/api/runs/${run}`)).body.evaluation.document;
    const received = await upload(app, '/api/imports?name=run.csv', log);
    const join = { because: 'the recorder beside it reads the same thermocouples' };
    await app.post(`/api/imports/${received.body.id}/run`, { layout, run, join });
    const joined = (await app.get(`/api/runs/${run}`)).body.evaluation.document;
    expect(joined.parts).not.toEqual(gappy.parts);
    const other = await liveApp();
    const whole = await upload(other, '/api/imports?name=run.csv', log);
    await other.post('/api/cycles', { document: cycle });
    const { run: filed } = (await other.post(`/api/imports/${whole.body.id}/run`, { layout })).body;
    const judged = (await loadCase(other, filed, 'must-work')).body.evaluation.document;
    expect(joined.parts).toEqual(judged.parts);
  });
});
