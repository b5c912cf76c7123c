import { expect } from 'vitest';
import type { Resin } from '../../models/cure/resin.ts';
import type { ChannelRole, Layout } from '../../models/log/layout.ts';
import { type LiveApp, upload } from './live-app.ts';

/** A channel of a made log: corners of its course in s and °C, straight between. */
export interface MadeChannel {
  readonly name: string;
  readonly role: ChannelRole;
  readonly corners: readonly (readonly [number, number])[];
  /** Of the load. */
  readonly place?: string;
}

const STARTS_MS = Date.parse('2026-03-02T08:00:00Z');
const EVERY_S = 60;

/** Brings in a log of these channels as a run of a vessel, with one part in its load. */
export async function recordMade(
  app: LiveApp,
  channels: readonly MadeChannel[],
  { part = 'SR-0501', vessel = 'oven', load = {} }: { part?: string; vessel?: string; load?: object } = {},
): Promise<number> {
  const lines = [['time', ...channels.map(({ name }) => name)].join(',')];
  const endS = Math.max(...channels.map(({ corners }) => corners.at(-1)?.[0] ?? 0));
  for (let s = 0; s <= endS; s += EVERY_S) {
    const stamp = new Date(STARTS_MS + 1000 * s).toISOString().slice(0, 19).replace('T', ' ');
    lines.push([stamp, ...channels.map(({ corners }) => readAt(corners, s))].join(','));
  }
  const layout: Layout = {
    format: 'dwellbook-layout/1',
    name: 'made',
    header: 1,
    time: { columns: ['time'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: 'UTC' },
    channels: channels.map(({ name, role }) => ({ column: name, name, role, unit: '°C' })),
  };
  await app.post('/api/vessels', { name: `the ${vessel}`, kind: vessel });
  const received = await upload(app, '/api/imports?name=made.csv', `${lines.join('\n')}\n`);
  expect(received.status, received.text).toBe(201);
  const recorded = await app.post(`/api/imports/${received.body.id}/run`, { layout, vessel: `the ${vessel}` });
  expect(recorded.status, recorded.text).toBe(201);
  const document = {
    format: 'dwellbook-load/1',
    parts: [{ part }],
    sensors: channels
      .filter(({ role }) => role === 'part')
      .map(({ name, place }) => ({ channel: name, parts: [part], ...(place === undefined ? {} : { place }) })),
    ...load,
  };
  const set = await app.post(`/api/runs/${recorded.body.run}/load`, { load: document, cycle: null });
  expect(set.status, set.text).toBe(201);
  return recorded.body.run;
}

export async function bringInResin(app: LiveApp, resin: Resin, thermal: Resin['thermal']): Promise<string> {
  const { thermal: _own, ...rest } = resin;
  const document = thermal === undefined ? rest : { ...rest, thermal };
  const answer = await app.post('/api/resins', { document });
  expect(answer.status, answer.text).toBe(201);
  return resin.code;
}

/** Empty where the corners leave a hole, written as NaN. */
function readAt(corners: MadeChannel['corners'], s: number): string {
  const after = Math.max(
    1,
    corners.findIndex(([at]) => at >= s),
  );
  const [[t0, c0], [t1, c1]] = [corners[after - 1] ?? [0, Number.NaN], corners[after] ?? [1, Number.NaN]];
  const reading = c0 + ((c1 - c0) * (s - t0)) / (t1 - t0);
  return Number.isNaN(reading) ? '' : String(Number(reading.toFixed(6)));
}
