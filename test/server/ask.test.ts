import { describe, expect, it } from 'vitest';
import type { VerdictProgress } from '../../server/contract/ask.ts';
import { CHANNELS, GOOD, loadAsking, placeAll, runAskingCalibration } from './instrument-steps.ts';
import { type LiveApp, liveApp } from './live-app.ts';
import { receiveTape, runAskingOutLife } from './material-steps.ts';
import { recordedCase } from './recorded-case.ts';

/** What came of a question, to its last event. */
async function answersTo(app: LiveApp, query: string): Promise<{ steps: VerdictProgress[]; last: string }> {
  const { text } = await app.get(`/api/ask/verdicts/events?${query}`);
  const events = text
    .split('\n\n')
    .filter((one) => one.startsWith('event: '))
    .map((one) => ({ event: /^event: (.*)$/m.exec(one)?.[1], data: JSON.parse(/^data: (.*)$/m.exec(one)?.[1] ?? '') }));
  const steps = events.flatMap(({ event, data }) => (event === 'progress' ? [data as VerdictProgress] : []));
  return { steps, last: events.at(-1)?.event ?? '' };
}

describe('which parts saw it', () => {
  it('a roll or what was cut from it, a tool, a vessel, a thermocouple, an instrument', async () => {
    const app = await liveApp();
    const run = await runAskingOutLife(app);
    await receiveTape(app);
    await app.post('/api/items/K-1/kits', { kit: 'K-1A', at: '2026-03-01T08:00:00Z' });
    await app.post('/api/parts/SR-0417/materials', { materials: [{ item: 'K-1A' }] });
    const asked = async (query: string) => (await app.get(`/api/ask/parts?${query}`)).body;
    const saw = { total: 1, parts: [{ serial: 'SR-0417', runs: [run], lastRunAt: expect.any(String) }] };
    expect(await asked('kind=roll&code=K-1')).toMatchObject({ what: 'roll K-1', ...saw });
    expect(await asked('kind=kit&code=K-1A')).toMatchObject(saw);
    expect(await asked('kind=batch&code=B-1')).toMatchObject(saw);
    expect(await asked('kind=vessel&code=Autoclave%201')).toMatchObject(saw);
    expect(await asked(`kind=thermocouple&code=${CHANNELS[0]}&vessel=Autoclave%201`)).toMatchObject(saw);
    expect(await asked('kind=tool&code=T-9')).toMatchObject({ total: 0, parts: [] });
    await placeAll(app);
    expect(await asked('kind=instrument&code=K-1')).toMatchObject(saw);
    // The run was on 3 March.
    expect(await asked('kind=roll&code=K-1&until=2026-03-03T00:00:00Z')).toMatchObject({ total: 0 });
    expect(await asked('kind=vessel&code=Autoclave%201&from=2026-03-04T00:00:00Z')).toMatchObject({ total: 0 });
    expect(await asked('kind=instrument&code=K-1&until=2026-03-03T00:00:00Z')).toMatchObject({ total: 0 });
    expect((await app.get('/api/ask/parts?kind=roll&code=K-77')).status).toBe(404);
    expect((await app.get('/api/ask/parts?kind=thermocouple&code=TC1')).status).toBe(400);
  });

  it('and of which something is not on record', async () => {
    const app = await liveApp();
    await runAskingOutLife(app);
    expect((await app.get('/api/ask/without-record')).body).toEqual({
      parts: 1,
      noRun: { total: 0, parts: [] },
      noLayup: { total: 1, parts: ['SR-0417'] },
      noMaterial: { total: 1, parts: ['SR-0417'] },
    });
  });
});

describe('an instrument found out of tolerance', () => {
  const FOUND = {
    ...GOOD,
    done: '2026-03-09',
    asFound: {
      outOfTolerance: true,
      points: [
        [0, -9],
        [200, -9],
      ],
    },
  };

  it('lists the runs since the calibration before, and those that would be judged otherwise', async () => {
    const app = await liveApp();
    const run = await runAskingCalibration(app);
    await placeAll(app);
    await loadAsking(app, run);
    const before = (await app.get(`/api/runs/${run}`)).body;
    const { body } = await app.post('/api/instruments/K-1/calibrations', FOUND);
    const { id } = body.calibrations[0];
    expect((await app.get(`/api/instruments/K-1/calibrations/${id}/touched`)).body).toMatchObject({
      since: '2026-01-12',
      until: '2026-03-09',
      runs: [{ run }],
    });
    const { steps, last } = await answersTo(app, `by=calibration&instrument=K-1&calibration=${id}`);
    expect(last).toBe('done');
    expect(steps.map(({ done, of }) => [done, of])).toEqual([
      [0, 1],
      [1, 1],
    ]);
    expect(steps[1]?.change).toMatchObject({ run, was: before.evaluation.verdict, becomes: 'cannot-tell' });
    expect(before.evaluation.verdict).toBe('conforms');
    expect(steps[1]?.change?.limits.length).toBeGreaterThan(0);
    // Nothing of it is stored.
    expect((await app.get(`/api/runs/${run}`)).body.evaluations).toHaveLength(before.evaluations.length);
    expect((await app.get('/api/instruments/K-1/calibrations/1/touched')).status).toBe(409);
  });

  it.each<[string, string, string, number]>([
    ['on the day of the calibration before', '2026-03-03', '2026-03-09', 1],
    ['before it', '2026-03-04', '2026-03-09', 0],
    ['on the day it was found out', '2026-01-12', '2026-03-03', 1],
    ['after it', '2026-01-12', '2026-03-02', 0],
  ])('a run %s: from %s to %s', async (_what, good, found, runs) => {
    const app = await liveApp();
    const run = await runAskingCalibration(app);
    await placeAll(app, () => ({ ...GOOD, done: good }));
    await loadAsking(app, run);
    const { body } = await app.post('/api/instruments/K-1/calibrations', { ...FOUND, done: found });
    const { id } = body.calibrations.find(({ asFound }: { asFound: object | null }) => asFound !== null);
    const touched = await app.get(`/api/instruments/K-1/calibrations/${id}/touched`);
    expect(touched.body.runs).toHaveLength(runs);
  });

  it('touches no run it did not read', async () => {
    const app = await liveApp();
    const run = await runAskingCalibration(app);
    await placeAll(app);
    await loadAsking(app, run);
    await app.post('/api/instruments/K-1/places/1/take-off', { at: '2026-02-01T08:00:00Z', reason: 'lead crushed' });
    const { body } = await app.post('/api/instruments/K-1/calibrations', FOUND);
    const touched = await app.get(`/api/instruments/K-1/calibrations/${body.calibrations[0].id}/touched`);
    expect(touched.body.runs).toEqual([]);
  });
});

describe('which runs would be judged otherwise', () => {
  it('by another issue of their cycle', async () => {
    const app = await liveApp();
    const run = await runAskingCalibration(app);
    await loadAsking(app, run);
    const { cycle } = recordedCase('sound');
    await app.post('/api/cycles', { document: { ...cycle, issue: 'Z' } });
    const { steps } = await answersTo(app, `by=issue&cycle=${cycle.code}&issue=I&other=Z`);
    expect(steps[1]?.change).toMatchObject({ run, was: 'cannot-tell', becomes: 'conforms' });
    expect((await answersTo(app, `by=issue&cycle=${cycle.code}&issue=I&other=I`)).steps[1]?.change).toBeNull();
  });

  it('without a sensor; a channel the run has not is told by name', async () => {
    const app = await liveApp();
    const run = await runAskingOutLife(app);
    const query = `by=exclusion&run=${run}&from=2026-03-03T00:00:00Z`;
    const { steps } = await answersTo(app, `${query}&channel=${CHANNELS[0]}`);
    expect(steps.at(-1)).toMatchObject({ done: 1, of: 1, refused: null });
    const other = await answersTo(app, `${query}&channel=TC99`);
    expect(other.steps.at(-1)?.refused).toMatchObject({ run, because: expect.stringContaining('TC99') });
    expect((await answersTo(app, 'by=exclusion&run=1')).last).toBe('refused');
  });

  it('by what is on record now of an instrument', async () => {
    const app = await liveApp();
    const run = await runAskingCalibration(app);
    await loadAsking(app, run);
    await placeAll(app);
    const { steps } = await answersTo(app, 'by=records&instrument=K-1');
    expect(steps[1]?.change).toMatchObject({ run, was: 'cannot-tell' });
    expect(steps[1]?.change?.limits[0]).toMatchObject({ limit: 'instruments/calibration' });
  });
});
