import type { Material } from '../../models/material/material.ts';
import type { LiveApp } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';
import { loadCase, recordCase } from './workshop-steps.ts';

export const CASE = 'must-work';

export const TAPE: Material = {
  format: 'dwellbook-material/1',
  code: 'tape',
  issue: 'A',
  name: 'Practice tape',
  units: { temperature: '°C' },
  storage: { atMost: -18, lifeDays: 365 },
  out: { lifeDays: 10, atMost: 24 },
  extension: { times: 1, tests: ['DSC'] },
};

export const room21 = { temperature: 21, unit: '°C' } as const;

/** A material, a batch made in January, and a roll of it that came frozen on 1 February. */
export async function receiveTape(app: LiveApp, roll = 'K-1'): Promise<void> {
  await app.post('/api/materials', { document: TAPE });
  await app.post('/api/batches', { batch: 'B-1', material: { code: 'tape', issue: 'A' }, made: '2026-01-15' });
  const received = await app.post('/api/rolls', { roll, batch: 'B-1', at: '2026-02-01T08:00:00Z', lengthM: 40 });
  if (received.status !== 201) throw new Error(received.text);
}

/** The recorded run of 3 March, judged by a cycle that asks for out-life. */
export async function runAskingOutLife(app: LiveApp): Promise<number> {
  const run = await recordCase(app, CASE);
  const { cycle } = recordedCase(CASE);
  const asking = { ...cycle, issue: 'M', material: { outLife: true } };
  await app.post('/api/cycles', { document: asking });
  const loaded = await loadCase(app, run, CASE, { cycle: { code: asking.code, issue: 'M' } });
  if (loaded.status !== 201) throw new Error(loaded.text);
  return run;
}
