import { expect } from 'vitest';
import type { LiveSource } from '../../models/log/live-source.ts';
import { readLog } from '../../models/log/read-log.ts';
import type { Readings } from '../../models/log/readings.ts';
import { asLogFile } from '../../server/files/as-log-file.ts';
import type { Db } from '../../server/store/database.ts';
import { insertLiveSource } from '../../server/store/live-sources.ts';
import { requireVessel } from '../../server/store/vessels.ts';
import type { LiveApp } from './live-app.ts';
import { DEED } from './live-workshop.ts';
import { recordedCase } from './recorded-case.ts';

export const CASE = 'must-work';
export const { layout, log } = recordedCase(CASE);

export async function caseReadings(): Promise<Readings> {
  return readLog([await asLogFile('run.csv', [log], log.length)], layout).readings;
}

/** The case's vessel with a source that pushes its channels, by their names. */
export function addSource(db: Db, vessel: string, name = 'plc'): void {
  const channels = layout.channels.map((channel) => ({ ...channel, column: channel.name }));
  const document: LiveSource = { format: 'dwellbook-source/1', name, intervalS: 10, reads: { kind: 'push' }, channels };
  insertLiveSource(db, requireVessel(db, vessel), { document, isResting: false, ...DEED });
}

export async function liveVessel(app: LiveApp, vessel = 'Autoclave 7'): Promise<string> {
  await app.post('/api/vessels', { name: vessel, kind: 'autoclave' });
  addSource(app.parts.db, vessel, `plc of ${vessel}`);
  const made = await app.post(`/api/vessels/${vessel}/keys`, { name: 'cell controller' });
  expect(made.status, made.text).toBe(201);
  return made.body.key;
}

export function push(app: LiveApp, key: string, scans: object[]) {
  return app.send('/api/push', {
    method: 'POST',
    headers: { 'content-type': 'application/json', authorization: `Bearer ${key}` },
    body: JSON.stringify({ scans }),
  });
}

export function scansOf({ timeMs, channels }: Readings): { at: string; values: Record<string, number | null> }[] {
  return [...timeMs].map((at, scan) => ({
    at: new Date(at).toISOString(),
    values: Object.fromEntries(
      channels.map(({ channel, value }) => [channel.name, Number.isNaN(value[scan]) ? null : (value[scan] ?? null)]),
    ),
  }));
}

export async function pushAll(app: LiveApp, key: string, scans: object[]): Promise<void> {
  for (let first = 0; first < scans.length; first += 200) {
    const pushed = await push(app, key, scans.slice(first, first + 200));
    expect(pushed.status, pushed.text).toBe(200);
    expect(pushed.body.refused).toEqual([]);
  }
}
