import { describe, expect, it } from 'vitest';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import type { Layout } from '../../models/log/layout.ts';
import { readLog } from '../../models/log/read-log.ts';
import { emfMillivolt } from '../../models/log/thermocouple/emf.ts';
import { readSourceLog, readSources } from '../../server/store/sources.ts';
import { type LiveApp, liveApp, upload } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';

// The recorded run "sound", its first thermocouple turned into what a recorder without compensation writes: the emf of a
// type K wire against terminals that warm from 20 to 30 °C, in mV to the nanovolt (4e-5 °C), the terminals beside it.
const { log, layout, cycle } = recordedCase('sound');
const COLD = { column: 'Term', name: 'terminals', role: 'other', unit: '°C' } as const;
const emfLayout: Layout = {
  ...layout,
  channels: [
    ...layout.channels.map((channel, n) =>
      n === 0 ? { ...channel, unit: 'mV', thermocouple: { type: 'K' as const, coldJunction: COLD.name } } : channel,
    ),
    COLD,
  ],
};
const lines = log.toString('latin1').split(/\r?\n/);
const emfLog = Buffer.from(
  lines
    .map((line, n) => {
      const cells = line.split(';');
      if (n === layout.header - 1) return `${line};${COLD.column}`;
      if (n === layout.header) return line.replace('°C', 'mV').concat(';°C');
      if (n < layout.header || line === '') return line;
      const coldC = (20 + (10 * n) / lines.length).toFixed(1);
      const emf = emfMillivolt('K', Number(cells[2]!.replace(',', '.'))) - emfMillivolt('K', Number(coldC));
      return [...cells.with(2, emf.toFixed(6).replace('.', ',')), coldC.replace('.', ',')].join(';');
    })
    .join('\r\n'),
  'latin1',
);

async function record(app: LiveApp): Promise<void> {
  await app.post('/api/vessels', { name: 'Autoclave 1', kind: 'autoclave' });
  await app.post('/api/cycles', { document: cycle });
  await upload(app, '/api/imports?name=run.csv', emfLog);
  const recorded = await app.post('/api/imports/1/run', { layout: emfLayout, recorder: 'r', vessel: 'Autoclave 1' });
  expect(recorded.status, recorded.text).toBe(201);
  const sensors = layout.channels
    .filter(({ role }) => role === 'part')
    .map(({ name: channel }) => ({ channel, parts: ['SR-0417'] }));
  const load = { format: 'dwellbook-load/1', workOrder: 'W-1', parts: [{ part: 'SR-0417' }], sensors };
  const judged = await app.post('/api/runs/1/load', { load, cycle: { code: cycle.code, issue: cycle.issue } });
  expect(judged.status).toBe(201);
}

describe('a run with a thermocouple recorded as emf', () => {
  it('is judged as the same run in °C', () => {
    const judge = (bytes: Uint8Array, by: Layout) =>
      evaluateLog(readLog([{ name: 'run.csv', chunks: [bytes] }], by), {
        cycle,
        load: null,
        resin: null,
        exclusions: [],
        barometer: null,
        open: false,
      });
    const [asEmf, asTemperature] = [judge(emfLog, emfLayout), judge(log, layout)];
    expect(asEmf.verdict).toBe(asTemperature.verdict);
    const figures = ({ parts }: typeof asEmf) =>
      parts[0]!.findings.map(({ limit, outcome, observed }) => [limit, outcome, Number(observed?.toFixed(2))]);
    expect(figures(asEmf)).toEqual(figures(asTemperature));
  });

  it('shows °C wherever its readings are shown, and keeps the figures of the file', async () => {
    const app = await liveApp();
    await record(app);
    const preview = (await app.post('/api/imports/1/preview', { layout: emfLayout })).body;
    expect(preview.channels[0]).toMatchObject({ name: 'TC1', unit: '°C' });
    expect(preview.channels[0].greatest).toBeGreaterThan(170);
    expect(preview.first[0].values[0]).toBeCloseTo(20, 3);
    const run = (await app.get('/api/runs/1')).body;
    expect(run.channels[0]).toEqual({ name: 'TC1', role: 'part', unit: '°C', source: 1 });
    expect(run.sources[0].layout.channels[0].unit).toBe('mV');
    const csv = (await app.get('/api/runs/1/readings.csv')).text.split('\r\n');
    expect(csv[0]).toContain('TC1 [°C]');
    expect(Number(csv[1]!.split(',')[1])).toBeCloseTo(20, 3);
    const chart = (await app.get('/api/runs/1/chart')).body;
    const hottest = (channel: string): [string, number] => {
      const line = chart.lines.find((one: { channel: string }) => one.channel === channel);
      return [line.strip, Math.max(...line.value)];
    };
    expect(hottest('TC1')).toEqual(['temperature', expect.closeTo(hottest('TC2')[1], 0)]);
    const { db } = app.parts;
    const stored = readSourceLog(db, readSources(db, 1)[0]!).readings.channels[0]!;
    expect(stored.channel.unit).toBe('mV');
    expect(stored.value[0]).toBeCloseTo(emfMillivolt('K', 20) - emfMillivolt('K', 20), 1);
    expect(Math.max(...stored.value)).toBeLessThan(8);
  });
});
