import { existsSync, readFileSync } from 'node:fs';
import type { Resin } from '../../models/cure/resin.ts';
import type { Layout } from '../../models/log/layout.ts';
import type { Load } from '../../models/run/load.ts';

/** Recorded runs as files: the same that the engine alone is held against. */
export function recordedFile(name: string, file: string): Buffer {
  return readFileSync(new URL(`../golden/recorded/${name}/${file}`, import.meta.url));
}

export function recordedPath(name: string, file: string): string {
  return new URL(`../golden/recorded/${name}/${file}`, import.meta.url).pathname;
}

export function recordedJson<T>(name: string, file: string): T {
  return JSON.parse(recordedFile(name, file).toString()) as T;
}

/** What a workshop knows besides what the recorded case holds. */
export interface KnownBesides {
  readonly resin?: Partial<Resin>;
  readonly load?: (load: Load) => Load;
}

/** A workshop with these recorded runs on record, each with its own part; run numbers by case. */
export async function recordWorkshop(
  address: string,
  names: readonly string[],
  besides: KnownBesides = {},
): Promise<Map<string, number>> {
  await post(address, '/api/workshop', {
    name: 'Test workshop',
    zone: 'Europe/Lisbon',
    units: { temperature: '°C', pressure: 'bar', vacuum: 'bar' },
  });
  await post(address, '/api/vessels', { name: 'Autoclave 1', kind: 'autoclave' });
  const runs = new Map<string, number>();
  for (const name of names) runs.set(name, await recordRun(address, name, besides));
  return runs;
}

/** A material with a roll that is out of the freezer, a kit cut from it, and one whose room nobody wrote down. */
export async function recordMaterials(address: string): Promise<void> {
  const hoursAgo = (hours: number) => new Date(Date.now() - hours * 3_600_000).toISOString();
  const room = { temperature: 21, unit: '°C', humidity: 45 };
  const document = {
    format: 'dwellbook-material/1',
    code: 'tape',
    issue: 'A',
    name: 'Test tape',
    units: { temperature: '°C' },
    storage: { atMost: -18, lifeDays: 365 },
    out: { lifeDays: 10, atMost: 24 },
    tack: { lifeDays: 8 },
    refreezing: { atMost: 3 },
  };
  const material = { code: 'tape', issue: 'A' };
  await post(address, '/api/materials', { document });
  await post(address, '/api/batches', { batch: 'B-1', material, made: hoursAgo(4000).slice(0, 10) });
  for (const roll of ['K-17', 'K-18']) {
    await post(address, '/api/rolls', { roll, batch: 'B-1', at: hoursAgo(900), lengthM: 40 });
  }
  await post(address, '/api/items/K-17/events', { kind: 'out', at: hoursAgo(300), room });
  await post(address, '/api/items/K-17/kits', { kit: 'K-17-1', at: hoursAgo(299), lengthM: 6 });
  await post(address, '/api/items/K-17/events', { kind: 'in', at: hoursAgo(290) });
  await post(address, '/api/items/K-17/events', { kind: 'out', at: hoursAgo(4), room });
  await post(address, '/api/items/K-18/events', { kind: 'out', at: hoursAgo(30) });
}

/** Leaves a recorded file waiting to be read, as an upload does; its number. */
export async function leaveWaiting(address: string, name: string): Promise<number> {
  return (await postBytes(address, `/api/imports?name=${name}.csv`, recordedFile(name, 'run.csv'))).id;
}

async function recordRun(address: string, name: string, { resin, load = (as) => as }: KnownBesides): Promise<number> {
  const cycle = recordedJson<{ code: string; issue: string }>(name, 'cycle.json');
  // Cases share a code; each keeps its own limits under an issue of its own.
  const document = { ...cycle, issue: `${cycle.issue}-${name}` };
  if (existsSync(new URL(`../golden/recorded/${name}/resin.json`, import.meta.url))) {
    await post(address, '/api/resins', { document: { ...recordedJson<Resin>(name, 'resin.json'), ...resin } });
  }
  await post(address, '/api/cycles', { document });
  const layout = recordedJson<Layout>(name, 'layout.json');
  const channels = layout.channels.map(({ parts: _parts, ...channel }) => channel);
  const received = await postBytes(address, `/api/imports?name=${name}.csv`, recordedFile(name, 'run.csv'));
  const { run } = await post<{ run: number }>(address, `/api/imports/${received.id}/run`, {
    layout: { ...layout, channels },
    recorder: `recorder of ${name}`,
    vessel: 'Autoclave 1',
  });
  await post(address, `/api/runs/${run}/load`, {
    load: load(loadOf(layout, name)),
    cycle: { code: document.code, issue: document.issue },
  });
  return run;
}

function loadOf(layout: Layout, name: string): Load {
  const named = [...new Set(layout.channels.flatMap(({ parts }) => parts ?? []))];
  const serials = named.length > 0 ? named.map((part) => `${part} of ${name}`) : [`part of ${name}`];
  const sensors = layout.channels
    .filter(({ role }) => role === 'part')
    .map(({ name: channel, parts }) => ({
      channel,
      parts: parts ? parts.map((part) => `${part} of ${name}`) : serials,
    }));
  return { format: 'dwellbook-load/1', workOrder: `W-${name}`, parts: serials.map((part) => ({ part })), sensors };
}

async function post<T>(address: string, path: string, body: unknown): Promise<T> {
  return answer(
    await fetch(address + path, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    }),
  );
}

async function postBytes(address: string, path: string, bytes: Buffer): Promise<{ id: number }> {
  return answer(
    await fetch(address + path, {
      method: 'POST',
      headers: { 'content-type': 'application/octet-stream' },
      body: new Uint8Array(bytes),
    }),
  );
}

async function answer<T>(response: Response): Promise<T> {
  const text = await response.text();
  if (!response.ok) throw new Error(`${response.url} answered ${response.status}: ${text}`);
  return JSON.parse(text) as T;
}
