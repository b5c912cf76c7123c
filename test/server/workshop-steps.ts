import { expect } from 'vitest';
import { type Answer, type LiveApp, upload } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';

/** Brings in a recorded run as a person would: vessel, cycle, file, run. Returns its number. */
export async function recordCase(app: LiveApp, name: string, fileName = 'run.csv'): Promise<number> {
  const { log, layout, cycle } = recordedCase(name);
  await app.post('/api/vessels', { name: 'Autoclave 1', kind: 'autoclave' });
  await app.post('/api/cycles', { document: cycle });
  const received = await upload(app, `/api/imports?name=${fileName}`, log);
  expect(received.status, received.text).toBe(201);
  const recorded = await app.post(`/api/imports/${received.body.id}/run`, {
    layout,
    recorder: 'recorder 1',
    vessel: 'Autoclave 1',
  });
  expect(recorded.status, recorded.text).toBe(201);
  return recorded.body.run;
}

/** Sets the load of a recorded case; where the case has none, one part with all its part thermocouples. */
export async function loadCase(app: LiveApp, run: number, name: string, changes: object = {}): Promise<Answer> {
  const { layout, cycle } = recordedCase(name);
  const sensors = layout.channels
    .filter(({ role }) => role === 'part')
    .map(({ name: channel }) => ({ channel, parts: ['SR-0417'] }));
  const load = { format: 'dwellbook-load/1', workOrder: 'W-2231', parts: [{ part: 'SR-0417' }], sensors };
  return app.post(`/api/runs/${run}/load`, { load, cycle: { code: cycle.code, issue: cycle.issue }, ...changes });
}
