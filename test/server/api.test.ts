import { describe, expect, it } from 'vitest';
import { sha256Of, sha256OfDocument } from '../../server/store/canonical.ts';
import { type LiveApp, liveApp, NOW, upload } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';

const DEED = { at: NOW, by: 'inspector 2' };

/** Brings in a recorded run as a person would: vessel, cycle, file, run. */
async function recordCase(app: LiveApp, name: string): Promise<number> {
  const { log, layout, cycle } = recordedCase(name);
  await app.post('/api/vessels', { name: 'Autoclave 1', kind: 'autoclave' });
  await app.post('/api/cycles', { document: cycle });
  const received = await upload(app, '/api/imports?name=run.csv', log);
  expect(received.status, received.text).toBe(201);
  const recorded = await app.post(`/api/imports/${received.body.id}/run`, {
    layout,
    recorder: 'recorder 1',
    vessel: 'Autoclave 1',
  });
  expect(recorded.status, recorded.text).toBe(201);
  return recorded.body.run;
}

describe('from a file to a verdict', () => {
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
          chainSha256: expect.stringMatching(/^[0-9a-f]{64}$/),
          scans: 806,
          from: '2026-03-03T08:14:00.000Z',
          until: '2026-03-03T14:56:30.000Z',
          repairs: [],
          passedOver: [],
          recorded: DEED,
        },
      ],
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
  });
});
