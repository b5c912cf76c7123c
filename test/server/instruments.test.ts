import { describe, expect, it } from 'vitest';
import { CHANNELS, calibrationOf, GOOD, loadAsking, placeAll, runAskingCalibration } from './instrument-steps.ts';
import { liveApp } from './live-app.ts';

describe('instruments over HTTP', () => {
  it('are recorded, calibrated, placed, and listed by what is due', async () => {
    const app = await liveApp();
    await runAskingCalibration(app);
    await placeAll(app, (n) => ({ ...GOOD, until: n === 1 ? '2026-03-20' : '2026-07-11' }));
    const { body } = await app.get('/api/instruments');
    expect(body.today).toBe('2026-03-10');
    expect(body.instruments[0]).toMatchObject({
      instrument: 'K-2',
      standing: 'due-soon',
      due: '2026-03-20',
      makerNumber: '77-1',
      places: [{ on: { kind: 'vessel', name: 'Autoclave 1' }, channel: CHANNELS[1], until: null }],
    });
    const { body: one } = await app.get('/api/instruments/K-1');
    expect(one).toMatchObject({
      standing: 'in-date',
      calibrations: [GOOD],
      newWire: { standardC: 2.2, specialC: 1.1 },
    });
    expect(one.audit.map(({ verb }: { verb: string }) => verb)).toEqual([
      'place-instrument',
      'add-calibration',
      'set-instrument',
    ]);
  });

  it('correct a calibration by a later row that says why', async () => {
    const app = await liveApp();
    await runAskingCalibration(app);
    await placeAll(app);
    const path = '/api/instruments/K-1/calibrations';
    expect((await app.post(path, { ...GOOD, replaces: 1 })).status).toBe(400);
    const corrected = await app.post(path, { ...GOOD, until: '2026-01-31', replaces: 1, reason: 'misread' });
    expect(corrected.body).toMatchObject({ standing: 'out-of-date', due: '2026-01-31' });
    expect(
      corrected.body.calibrations.map(({ replacedBy }: { replacedBy: number | null }) => replacedBy === null),
    ).toEqual([true, false]);
    expect((await app.post(path, { ...GOOD, replaces: 1, reason: 'again' })).status).toBe(409);
  });

  it('takes off what sat on a channel when another is placed there, and refuses one that was there later', async () => {
    const app = await liveApp();
    await runAskingCalibration(app);
    await placeAll(app);
    await app.post('/api/instruments', { instrument: 'K-9', kind: 'thermocouple', type: 'K' });
    const place = (from: string) =>
      app.post('/api/instruments/K-9/places', {
        on: { kind: 'vessel', name: 'Autoclave 1' },
        channel: CHANNELS[0],
        from,
      });
    expect((await place('2026-01-10T08:00:00Z')).status).toBe(409);
    expect((await place('2026-03-01T08:00:00Z')).status).toBe(201);
    const { body } = await app.get('/api/instruments/K-1');
    expect(body.places).toEqual([]);
    expect(body.allPlaces[0]).toMatchObject({ until: '2026-03-01T08:00:00.000Z', reason: 'K-9 took its place' });
  });

  it.each<[string, string, object, number]>([
    ['done in the future', '/api/instruments/K-1/calibrations', { ...GOOD, done: '2026-03-11' }, 422],
    ['running out before it holds', '/api/instruments/K-1/calibrations', { ...GOOD, until: '2026-01-11' }, 422],
    ['of a thermocouple in bar', '/api/instruments/K-1/calibrations', { ...GOOD, unit: 'bar' }, 422],
    [
      'with points that do not rise',
      '/api/instruments/K-1/calibrations',
      {
        ...GOOD,
        points: [
          [1, 0],
          [1, 0],
        ],
      },
      400,
    ],
    ['of an instrument nobody knows', '/api/instruments/K-99/calibrations', GOOD, 404],
    ['twice the same instrument', '/api/instruments', { instrument: 'K-1', kind: 'thermocouple' }, 409],
    ['a pressure gauge of type K', '/api/instruments', { instrument: 'P-1', kind: 'pressure', type: 'K' }, 400],
    [
      'placed in the future',
      '/api/instruments/K-1/places',
      { on: { kind: 'vessel', name: 'Autoclave 1' }, channel: 'X', from: '2026-03-11T08:00:00Z' },
      422,
    ],
    [
      'placed in no vessel',
      '/api/instruments/K-1/places',
      { on: { kind: 'vessel', name: 'Oven 9' }, channel: 'X', from: '2026-03-01T08:00:00Z' },
      404,
    ],
  ])('refuses one %s, and writes nothing', async (_what, path, body, status) => {
    const app = await liveApp();
    await runAskingCalibration(app);
    await placeAll(app);
    const trail = (await app.get('/api/audit?limit=1')).body.lines[0].n;
    expect((await app.post(path, body)).status).toBe(status);
    expect((await app.get('/api/audit?limit=1')).body.lines[0].n).toBe(trail);
  });

  it('judge a run on its own day, by what is known when it is judged', async () => {
    const app = await liveApp();
    const run = await runAskingCalibration(app);
    await loadAsking(app, run);
    expect(await calibrationOf(app, run)).toMatchObject({
      finding: { outcome: 'cannot-tell', because: 'Not recorded.' },
    });
    await placeAll(app, (n) => ({ ...GOOD, until: n === 0 ? '2026-03-02' : '2026-07-11' }));
    // What is written later judges nothing by itself.
    expect((await calibrationOf(app, run)).inputs.instruments).toBeUndefined();
    await app.post(`/api/runs/${run}/evaluations`, {});
    const late = await calibrationOf(app, run);
    expect(late).toMatchObject({
      finding: {
        outcome: 'not-met',
        because: `K-1 at ${CHANNELS[0]} was due on 2026-03-02, and the run began on 2026-03-03.`,
      },
    });
    expect(late.assumptions.filter((sentence) => sentence.includes('was read by'))).toHaveLength(CHANNELS.length - 1);
    await app.post('/api/instruments/K-1/calibrations', { ...GOOD, done: '2026-03-03' });
    await app.post(`/api/runs/${run}/evaluations`, {});
    const met = await calibrationOf(app, run);
    expect(met.finding).toMatchObject({ outcome: 'met' });
    expect(met.inputs.instruments).not.toBe(late.inputs.instruments);
    // The load as it was written stays as it is.
    const { body } = await app.get(`/api/runs/${run}`);
    expect(JSON.stringify(body.load)).not.toContain('corrections');
    const { channels } = (await app.get(`/api/runs/${run}/instruments`)).body;
    expect(channels[0]).toMatchObject({ channel: CHANNELS[0], instrument: 'K-1', calibration: { done: '2026-03-03' } });
    expect((await app.get('/api/runs/99/instruments')).status).toBe(404);
    expect((await app.get('/api/find?code=k-1')).body.hits[0]).toMatchObject({
      kind: 'instrument',
      page: '/instruments/K-1',
      exact: true,
    });
  });
});

describe('surveys over HTTP', () => {
  const SURVEY = {
    done: '2026-01-20',
    until: '2026-07-19',
    zone: 'from 0.3 m of the door to 0.3 m of the fan, 0.8 m across',
    unit: '°C',
    lowest: 120,
    highest: 200,
    uniformity: 4.2,
  };

  it('tell what is in date, and are corrected by a later row', async () => {
    const app = await liveApp();
    await app.post('/api/vessels', { name: 'Oven 2', kind: 'oven' });
    expect((await app.get('/api/vessels/Oven%202/surveys')).body).toMatchObject({
      survey: { standing: 'not-on-record', due: null },
      accuracy: { standing: 'not-on-record', due: null },
      ranges: [],
    });
    await app.post('/api/vessels/Oven%202/surveys', SURVEY);
    await app.post('/api/vessels/Oven%202/accuracy-tests', {
      done: '2026-01-20',
      until: '2026-02-20',
      unit: '°C',
      difference: 0.7,
    });
    const range = { unit: '°C', lowest: 60, highest: 220, document: 'SR-Q-12 issue 2' };
    await app.post('/api/vessels/Oven%202/qualified-range', range);
    expect((await app.post('/api/vessels/Oven%202/qualified-range', range)).status).toBe(409);
    const again = { ...SURVEY, until: '2026-03-20', replaces: 1, reason: 'certificate says two months' };
    expect((await app.post('/api/vessels/Oven%202/surveys', again)).body).toMatchObject({
      survey: { standing: 'due-soon', due: '2026-03-20' },
      accuracy: { standing: 'out-of-date', due: '2026-02-20' },
      surveys: [{ replacedBy: null }, { replacedBy: 2 }],
      ranges: [range],
    });
    expect((await app.post('/api/vessels/Oven%202/surveys', { ...SURVEY, lowest: 210 })).status).toBe(400);
    expect((await app.post('/api/vessels/Oven%202/surveys', { ...SURVEY, done: '2026-03-11' })).status).toBe(422);
  });
});
