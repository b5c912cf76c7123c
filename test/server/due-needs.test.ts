import { expect, it } from 'vitest';
import { CHANNELS, GOOD, placeAll, runAskingCalibration } from './instrument-steps.ts';
import { liveApp } from './live-app.ts';
import { TAPE } from './material-steps.ts';

it('what is due within a fortnight and is used needs someone, the soonest first', async () => {
  const app = await liveApp();
  await runAskingCalibration(app);
  // Today is 10 March: a fortnight ends on the 24th.
  const until = ['2026-03-09', '2026-03-24', '2026-03-25'];
  await placeAll(app, (n) => ({ ...GOOD, until: until[n] ?? '2026-07-11' }));
  const survey = { done: '2026-01-20', zone: 'whole', unit: '°C', lowest: 60, highest: 200, uniformity: 4 };
  await app.post('/api/vessels/Autoclave%201/surveys', { ...survey, until: '2026-03-20' });
  await app.post('/api/materials', { document: TAPE });
  const batch = { material: { code: 'tape', issue: 'A' }, made: '2025-03-16' };
  await app.post('/api/batches', { ...batch, batch: 'B-1', expires: '2026-03-15' });
  await app.post('/api/batches', { ...batch, batch: 'B-2', expires: '2026-03-15' });
  await app.post('/api/rolls', { roll: 'R-1', batch: 'B-1', at: '2026-02-01T08:00:00Z' });
  const due = async () => (await app.get('/api/now')).body.needs.filter((need: object) => 'due' in need);
  expect(await due()).toEqual([
    {
      kind: 'calibration-due',
      instrument: 'K-1',
      due: '2026-03-09',
      isOver: true,
      places: [`${CHANNELS[0]} of Autoclave 1`],
    },
    { kind: 'batch-ends', batch: 'B-1', material: 'tape', due: '2026-03-15', isOver: false },
    { kind: 'survey-due', vessel: 'Autoclave 1', what: 'uniformity survey', due: '2026-03-20', isOver: false },
    {
      kind: 'calibration-due',
      instrument: 'K-2',
      due: '2026-03-24',
      isOver: false,
      places: [`${CHANNELS[1]} of Autoclave 1`],
    },
  ]);
  // One that sits nowhere, and a batch of which nothing is left, wait for nobody.
  await app.post('/api/instruments/K-1/places/1/take-off', { at: '2026-03-08T08:00:00Z', reason: 'sent away' });
  await app.post('/api/items/R-1/events', { kind: 'scrapped', reason: 'torn' });
  expect((await due()).map(({ kind }: { kind: string }) => kind)).toEqual(['survey-due', 'calibration-due']);
});
