import { describe, expect, it } from 'vitest';
import type { DoorCheck, LiveReading } from '../../server/contract/live.ts';
import { enoughSensors, sensorsAgree } from '../../server/http/door-sensors.ts';
import { cycleOf, dwell } from '../support/made-run.ts';
import { GOOD } from './instrument-steps.ts';
import { type LiveApp, liveApp, NOW } from './live-app.ts';
import { addLiveVessel, pushSource } from './live-workshop.ts';
import { receiveTape, room21 } from './material-steps.ts';
import { recordedCase } from './recorded-case.ts';

const reading = (channel: string, value: number | null, more: Partial<LiveReading> = {}): LiveReading => ({
  channel,
  role: 'part',
  unit: '°C',
  value,
  at: NOW,
  isStale: false,
  ...more,
});

describe('sensors before any heat', () => {
  // A lead reversed at both ends or a wrong type is seen at ambient or never (Okazaki; common practice).
  it.each<[string, LiveReading[], DoorCheck['outcome'], string]>([
    ['agree', [reading('A', 20), reading('B', 21), reading('C', 25)], 'in-order', '3 thermocouples read within 5 °C'],
    ['differ by just 5 °C', [reading('A', 20), reading('B', 20), reading('C', 25)], 'in-order', '3 thermocouples'],
    [
      'differ',
      [reading('A', 20), reading('B', 20), reading('C', 25.1)],
      'not-in-order',
      'C reads 25.1 °C, the others 20.0',
    ],
    ['in °F', [reading('A', 68, { unit: '°F' }), reading('B', 20), reading('C', 21)], 'in-order', 'about 20 °C'],
    [
      'are too few',
      [reading('A', 20), reading('B', 40), reading('C', null)],
      'not-on-record',
      '2 of this vessel read now',
    ],
    [
      'are stale',
      [reading('A', 20), reading('B', 20), reading('C', 90, { isStale: true })],
      'not-on-record',
      '2 of this',
    ],
    ['are warm', [reading('A', 90), reading('B', 92), reading('C', 60)], 'not-on-record', 'stands at 90 °C'],
  ])('%s', (_what, readings, outcome, because) => {
    expect(sensorsAgree(readings)).toMatchObject({ outcome, because: expect.stringContaining(because) });
  });

  it('are enough, each part has its own, and the places are named', () => {
    const cycle = cycleOf([dwell()], { sensors: { workingAtLeast: 2, own: true, mustWork: ['heel'] } });
    const readings = [reading('A', 20), reading('B', 20), reading('C', 20, { isStale: true })];
    const load = {
      format: 'dwellbook-load/1' as const,
      parts: [{ part: 'P1' }, { part: 'P2' }],
      sensors: [
        { channel: 'A', parts: ['P1'], place: 'heel' },
        { channel: 'C', parts: ['P2'] },
      ],
    };
    expect(enoughSensors(cycle, load, readings)).toEqual([
      { check: 'enough-sensors', outcome: 'not-in-order', because: 'No working sensor of their own: P2.' },
      { check: 'places-named', outcome: 'in-order', because: 'Each has its sensor: heel.' },
    ]);
    expect(enoughSensors(cycle, null, readings.slice(0, 1))).toMatchObject([
      { outcome: 'not-in-order', because: '1 part sensor reads now; the cycle asks for at least 2.' },
      { outcome: 'not-on-record', because: 'No sensor is named for: heel.' },
    ]);
  });
});

describe('before the door closes', () => {
  const CHECKS = '/api/vessels/Autoclave%203/door-checks';
  const ask = async (app: LiveApp, body: object): Promise<Record<string, DoorCheck>> => {
    const { checks } = (await app.post(CHECKS, body)).body as { checks: DoorCheck[] };
    return Object.fromEntries(checks.map((check) => [check.check, check]));
  };

  it('tells what is not on record, and enforces nothing', async () => {
    const app = await liveApp();
    await app.post('/api/vessels', { name: 'Autoclave 3', kind: 'autoclave' });
    const { body } = await app.get(CHECKS);
    expect(new Set(body.checks.map(({ outcome }: DoorCheck) => outcome))).toEqual(new Set(['not-on-record']));
    expect((await app.get('/api/vessels/Nowhere/door-checks')).status).toBe(404);
  });

  it('tells calibration, survey, range, material and leak test as they stand now', async () => {
    const app = await liveApp();
    addLiveVessel(app.parts.db, 'Autoclave 3', pushSource('recorder 3', 1));
    await app.post('/api/instruments', { instrument: 'K-1', kind: 'thermocouple', type: 'K' });
    await app.post('/api/instruments/K-1/calibrations', GOOD);
    const place = { on: { kind: 'source', name: 'recorder 3' }, channel: 'TC1', from: '2026-02-01T08:00:00Z' };
    await app.post('/api/instruments/K-1/places', place);
    const survey = { done: '2026-01-20', zone: 'all of it', unit: '°C', lowest: 100, highest: 190, uniformity: 4 };
    await app.post('/api/vessels/Autoclave%203/surveys', { ...survey, until: '2026-03-09' });
    const range = { unit: '°C', lowest: 60, highest: 150, document: 'SR-Q-12' };
    await app.post('/api/vessels/Autoclave%203/qualified-range', range);
    await receiveTape(app);
    await app.post('/api/items/K-1/events', { kind: 'out', at: '2026-03-02T08:00:00Z', room: room21 });
    await app.post('/api/parts/P-1/materials', { materials: [{ item: 'K-1' }] });
    const { cycle } = recordedCase('sound');
    const asking = { ...cycle, issue: 'L', leakTest: { over: 5, lossAtMost: 0.07 } };
    await app.post('/api/cycles', { document: asking });
    const load = { format: 'dwellbook-load/1', parts: [{ part: 'P-1' }], sensors: [] };
    const asked = { load, cycle: { code: cycle.code, issue: 'L' } };
    const told = await ask(app, asked);
    expect(told).toMatchObject({
      calibration: {
        outcome: 'in-order',
        because: 'Its one instrument is in calibration, until 2026-07-11.',
      },
      survey: { outcome: 'not-in-order', because: 'The uniformity survey was due on 2026-03-09.' },
      'accuracy-test': { outcome: 'not-on-record' },
      'qualified-range': { outcome: 'not-in-order' },
      'leak-test': { outcome: 'not-on-record' },
      'material-life': { outcome: 'in-order', because: 'Its material is in life now.' },
    });
    await app.post('/api/instruments/K-1/calibrations', {
      ...GOOD,
      until: '2026-03-01',
      replaces: 1,
      reason: 'misread',
    });
    expect((await ask(app, asked)).calibration).toEqual({
      check: 'calibration',
      outcome: 'not-in-order',
      because: 'K-1 at TC1 was due on 2026-03-01.',
    });
  });
});
