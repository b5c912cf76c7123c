import type { Vertex } from './made-run.ts';

/** A shop with one vessel that a sender pushes scans of, with a real key; all over HTTP, as a workshop would set it up. */
export interface LiveShop {
  readonly vessel: string;
  readonly push: (scans: readonly PushedScan[]) => Promise<void>;
}

export interface PushedScan {
  readonly at: string;
  readonly values: Readonly<Record<string, number | null>>;
}

export const LIVE_CYCLE = {
  format: 'dwellbook-cycle/1',
  code: 'LV-110',
  issue: 'A',
  title: 'One dwell, for tests of live logging',
  units: { temperature: '°C' },
  judgedBy: 'part',
  stages: [
    { name: 'heat-up', kind: 'heat' },
    {
      name: 'dwell 1',
      kind: 'dwell',
      target: 110,
      plus: 5,
      minus: 5,
      time: { atLeast: 30 },
      clock: { opens: 'lagging-enters', closes: 'first-leaves' },
      counting: 'contiguous',
    },
    { name: 'cool-down', kind: 'cool', until: 60 },
  ],
  ceiling: 130,
};

export async function liveShop(
  address: string,
  channels: readonly string[],
  intervalS: number,
  vessel = 'Oven 1',
): Promise<LiveShop> {
  await post(address, '/api/vessels', { name: vessel, kind: 'oven' });
  const name = encodeURIComponent(vessel);
  await post(address, `/api/vessels/${name}/sources`, {
    document: {
      format: 'dwellbook-source/1',
      name: `sender of ${vessel}`,
      intervalS,
      reads: { kind: 'push' },
      channels: channels.map((channel) => ({ column: channel, name: channel, role: 'part', unit: '°C' })),
    },
  });
  const { key } = await post<{ key: string }>(address, `/api/vessels/${name}/keys`, { name: 'sender' });
  return {
    vessel,
    async push(scans) {
      for (let first = 0; first < scans.length; first += MOST_AT_ONCE) {
        await pushSome(address, key, scans.slice(first, first + MOST_AT_ONCE));
      }
    },
  };
}

/** A vessel with a run that is open and half an hour old, one of whose thermocouples stands still; and one to be loaded. */
export async function openLive(address: string): Promise<{ run: number; vessel: string }> {
  const ramp = [
    [0, 21],
    [45, 111],
  ] as const;
  const stands = [
    [0, 21],
    [20, 61],
    [45, 61],
  ] as const;
  const startMs = Date.now() - 40 * 60_000;
  await post(address, '/api/cycles', { document: LIVE_CYCLE });
  const waiting = await liveShop(address, ['TC1', 'TC2', 'TC3', 'TC4'], 10, 'Oven 8');
  await waiting.push(scansAlong({ TC1: ramp, TC2: ramp, TC3: ramp, TC4: ramp }, Date.now() - 60_000, [0, 1], 10));
  const shop = await liveShop(address, ['TC1', 'TC2', 'TC3'], 10, 'Oven 9');
  const scans = scansAlong({ TC1: ramp, TC2: ramp, TC3: stands }, startMs, [0, 40], 10);
  await shop.push(scans.map((scan, n) => (n < 122 ? scan : { ...scan, values: { ...scan.values, TC3: 61 } })));
  const { run } = await post<{ run: number }>(address, `/api/vessels/${encodeURIComponent(shop.vessel)}/runs`, {
    from: new Date(startMs).toISOString(),
    load: {
      format: 'dwellbook-load/1',
      parts: [{ part: 'LV-1' }, { part: 'LV-2' }],
      sensors: [
        { channel: 'TC1', parts: ['LV-1'] },
        { channel: 'TC2', parts: ['LV-1'] },
        { channel: 'TC3', parts: ['LV-2'] },
      ],
    },
    cycle: { code: LIVE_CYCLE.code, issue: LIVE_CYCLE.issue },
  });
  return { run, vessel: shop.vessel };
}

/** Scans in one request: a body has its bound. */
const MOST_AT_ONCE = 200;

async function pushSome(address: string, key: string, scans: readonly PushedScan[]): Promise<void> {
  const headers = { 'content-type': 'application/json', authorization: `Bearer ${key}` };
  const answer = await fetch(`${address}/api/push`, { method: 'POST', headers, body: JSON.stringify({ scans }) });
  const said = (await answer.json()) as { kept?: number };
  if (said.kept !== scans.length) throw new Error(`not all scans were kept: ${JSON.stringify(said)}`);
}

/** Scans along straight lines with a recorder's flicker of ±0.1 °C; a history ends where its channel falls silent. */
export function scansAlong(
  histories: Readonly<Record<string, readonly Vertex[]>>,
  startMs: number,
  [fromMin, untilMin]: readonly [number, number],
  everyS: number,
): PushedScan[] {
  const scans: PushedScan[] = [];
  for (let second = Math.ceil((fromMin * 60) / everyS) * everyS; second < untilMin * 60; second += everyS) {
    const values = Object.fromEntries(
      Object.entries(histories).map(([name, history], n) => {
        const flicker = ((second / everyS) * 7 + n * 3) % 3;
        const along = valueAlong(history, second / 60);
        return [name, along === null ? null : Math.round(10 * along + flicker - 1) / 10];
      }),
    );
    scans.push({ at: new Date(startMs + second * 1000).toISOString(), values });
  }
  return scans;
}

function valueAlong(history: readonly Vertex[], minute: number): number | null {
  const after = history.findIndex(([at]) => at >= minute);
  const [next, before] = [history[after], history[after - 1]];
  if (next === undefined) return null;
  if (before === undefined) return next[1];
  return before[1] + ((next[1] - before[1]) * (minute - before[0])) / (next[0] - before[0]);
}

export async function post<T>(address: string, path: string, body: unknown): Promise<T> {
  const response = await fetch(address + path, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify(body),
  });
  const text = await response.text();
  if (!response.ok) throw new Error(`${path} answered ${response.status}: ${text}`);
  return JSON.parse(text) as T;
}
