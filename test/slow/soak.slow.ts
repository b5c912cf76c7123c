import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { addressOf, startDwellbook } from '../server/built-program.ts';
import { freshFolder } from '../server/fresh-database.ts';
import { HOUR } from '../support/open-run.ts';

const MINUTES = Number(process.env.SOAK_MINUTES ?? 10);
const SPEED = 20;
/** While caches fill and the heap grows to the size the collector settles at. */
const WARM_UP_MINUTES = 5;
const CHANNELS = Array.from({ length: 32 }, (_, n) => `TC${n + 1}`);
/**
 * What the run itself adds: a digest keeps each reading with its instant, its scan and two trees of extremes, 5 × 8 bytes;
 * anything beyond is a leak.
 */
const MB_PER_MIN_OF_THE_RUN = (SPEED * 60 * CHANNELS.length * 5 * 8) / 1024 ** 2;

describe('a soak', () => {
  it(`of ${MINUTES} minutes at ${SPEED} times the clock leaves memory flat`, async () => {
    const child = startDwellbook('serve', '--port', '0', '--data', freshFolder());
    const origin = await addressOf(child);
    const post = async (path: string, body: unknown, key?: string) => {
      const headers = {
        'content-type': 'application/json',
        ...(key === undefined ? {} : { authorization: `Bearer ${key}` }),
      };
      const response = await fetch(`${origin}${path}`, { method: 'POST', headers, body: JSON.stringify(body) });
      expect(response.ok, `${path} ${response.status}`).toBe(true);
      return response.json();
    };
    await post('/api/vessels', { name: 'Oven', kind: 'oven' });
    await post('/api/cycles', { document: HOUR });
    const channels = CHANNELS.map((name) => ({ column: name, name, role: 'part', unit: '°C' }));
    const document = { format: 'dwellbook-source/1', name: 'logger', intervalS: 1, reads: { kind: 'push' }, channels };
    await post('/api/vessels/Oven/sources', { document });
    const { key } = (await post('/api/vessels/Oven/keys', { name: 'logger' })) as { key: string };
    // The sender's stamps run ahead of its clock, so they begin as long ago as they will have gained.
    const beginMs = Date.now() - MINUTES * 60_000 * SPEED;
    let sent = 0;
    const send = () => {
      const scans = Array.from({ length: SPEED }, () => {
        const minutes = sent / 60;
        const at = new Date(beginMs + sent * 1000).toISOString();
        sent += 1;
        const figure = (n: number) =>
          Math.min(110, 20 + minutes * (1 + n / 32)) + Math.round(Math.sin(sent + n) * 3) / 10;
        return { at, sequence: sent, values: Object.fromEntries(CHANNELS.map((name, n) => [name, figure(n)])) };
      });
      return post('/api/push', { scans }, key);
    };
    await send();
    const sensors = CHANNELS.map((channel) => ({ channel, parts: ['SR-1'] }));
    const { run } = (await post('/api/vessels/Oven/runs', {
      from: new Date(beginMs).toISOString(),
      load: { format: 'dwellbook-load/1', parts: [{ part: 'SR-1' }], sensors },
      cycle: { code: HOUR.code, issue: HOUR.issue },
    })) as { run: number };
    const stop = new AbortController();
    const watching = watch(`${origin}/api/runs/${run}/live/events`, stop.signal);
    const memory: Sample[] = [];
    const startMs = performance.now();
    for (let second = 1; second <= MINUTES * 60; second += 1) {
      await send();
      const minutes = (performance.now() - startMs) / 60_000;
      if (second % 10 === 0) memory.push({ minutes, mb: residentMb(child.pid ?? 0) });
      await new Promise((resolve) => setTimeout(resolve, Math.max(0, startMs + second * 1000 - performance.now())));
    }
    stop.abort();
    const seen = await watching;
    const settled = memory.filter(({ minutes }) => minutes >= Math.min(WARM_UP_MINUTES, MINUTES / 2));
    const slope = slopeOf(settled);
    console.log(
      `memory after the warm-up, MB: ${settled.map(({ mb }) => mb.toFixed(0)).join(' ')}\nslope ` +
        `${slope.toFixed(2)} MB/min of which the run itself takes ${MB_PER_MIN_OF_THE_RUN.toFixed(2)}; ` +
        `${sent} scans sent, ${seen} seen by a watcher`,
    );
    expect(seen).toBeGreaterThanOrEqual(sent - 2 * SPEED);
    expect(slope).toBeLessThan(MB_PER_MIN_OF_THE_RUN + 2);
  });
});

/** Scans a reader of a run's events is told of, until it leaves. */
async function watch(address: string, signal: AbortSignal): Promise<number> {
  let last = 0;
  try {
    const response = await fetch(address, { headers: { 'last-event-id': '0' }, signal });
    let text = '';
    for await (const chunk of response.body!.pipeThrough(new TextDecoderStream())) {
      text = (text + chunk).slice(-100_000);
      for (const [, id] of text.matchAll(/\nid: (\d+)\n/g)) last = Math.max(last, Number(id));
    }
  } catch (error) {
    if (!signal.aborted) throw error;
  }
  return last;
}

/** Memory a process has in use, MB: VmRSS of proc(5). */
function residentMb(pid: number): number {
  return Number(/VmRSS:\s+(\d+) kB/.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))?.[1]) / 1024;
}

/** Least-squares slope, MB/min. */
function slopeOf(points: readonly Sample[]): number {
  const meanX = points.reduce((sum, { minutes }) => sum + minutes, 0) / points.length;
  const meanY = points.reduce((sum, { mb }) => sum + mb, 0) / points.length;
  const sxy = points.reduce((sum, { minutes, mb }) => sum + (minutes - meanX) * (mb - meanY), 0);
  const sxx = points.reduce((sum, { minutes }) => sum + (minutes - meanX) ** 2, 0);
  return sxy / sxx;
}

interface Sample {
  readonly minutes: number;
  readonly mb: number;
}
