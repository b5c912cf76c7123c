import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync } from 'node:fs';
import { text } from 'node:stream/consumers';
import { fileURLToPath } from 'node:url';
import type { BenchResult } from './result.ts';
import { inTemporaryFolder } from './temporary-workshop.ts';
import { fullCycle, SCANS, tenHourRun } from './ten-hour-run.ts';

const PROGRAM = fileURLToPath(new URL('../../server/main.js', import.meta.url));
const SENDER = fileURLToPath(new URL('./peers/send-scans.js', import.meta.url));
const VESSELS = 20;
const CHANNELS = Array.from({ length: 32 }, (_, n) => `TC${n + 1}`);
const SECONDS = 60;
const MOST_OF_CORE = 0.1;
const MOST_MS = 50;
/** Linux counts a process's time in hundredths of a second (USER_HZ, proc(5)). */
const TICKS_PER_S = 100;

/** 20 vessels of 32 channels once a second with a run open in each; then the same while a long run is exported and judged again. */
export async function benchLiveLoad(): Promise<BenchResult[]> {
  return inTemporaryFolder(async (folder) => {
    const child = spawn(process.execPath, [PROGRAM, 'serve', '--port', '0', '--data', folder], {
      stdio: ['ignore', 'pipe', 'inherit'],
    });
    const [said] = (await once(child.stdout, 'data')) as [Buffer];
    const origin = String(said).trim().split(' ').at(-1) ?? '';
    try {
      const stored = await storeLongRun(origin);
      const keys = await setUp(origin);
      const idle = await sending(origin, keys, child.pid ?? 0, async () => undefined);
      const busy = await sending(origin, keys, child.pid ?? 0, async (goesOn) => {
        while (goesOn()) {
          await read(origin, `/api/runs/${stored}/readings.csv`);
          await post(origin, `/api/runs/${stored}/evaluations`, {});
        }
      });
      return [shareOf(idle.core), acknowledged(idle.p99Ms, busy.p99Ms, idle.missed + busy.missed)];
    } finally {
      child.kill('SIGTERM');
      await once(child, 'exit');
    }
  });
}

function shareOf(core: number): BenchResult {
  return {
    name: 'live-load',
    value: core,
    unit: 'cores',
    floor: null,
    ratio: null,
    goal: `≤ ${MOST_OF_CORE} cores on average`,
    holds: core <= MOST_OF_CORE,
    note: `${VESSELS} vessels of ${CHANNELS.length} channels at 1 Hz, a run open in each`,
  };
}

function acknowledged(alone: number, busy: number, missed: number): BenchResult {
  return {
    name: 'live-load/acknowledged-p99',
    value: busy,
    unit: 'ms',
    floor: alone,
    ratio: busy / alone,
    goal: `≤ ${MOST_MS} ms while a run of 24 x ${SCANS} is exported and judged again`,
    holds: busy <= MOST_MS && missed === 0,
    note: `floor: nothing else going on; ${missed} scans not acknowledged`,
  };
}

/** Sends for a minute while `work` goes on beside it; the share of a core the program took, and how long it let wait. */
async function sending(
  origin: string,
  keys: readonly string[],
  pid: number,
  work: (goesOn: () => boolean) => Promise<void>,
) {
  let goesOn = true;
  const before = cpuSeconds(pid);
  const startMs = performance.now();
  const orders = JSON.stringify({ origin, keys, channels: CHANNELS, seconds: SECONDS });
  const sender = spawn(process.execPath, [SENDER, orders], { stdio: ['ignore', 'pipe', 'inherit'] });
  const working = work(() => goesOn);
  const { tookMs, missed } = JSON.parse(await text(sender.stdout)) as { tookMs: number[]; missed: number };
  const core = (cpuSeconds(pid) - before) / ((performance.now() - startMs) / 1000);
  goesOn = false;
  await working;
  return { core, missed, p99Ms: tookMs[Math.floor(tookMs.length * 0.99)] ?? Number.NaN };
}

/** Time a process has had of all cores, s: utime and stime of proc(5). */
function cpuSeconds(pid: number): number {
  const fields = readFileSync(`/proc/${pid}/stat`, 'latin1').split(') ')[1]?.split(' ') ?? [];
  return (Number(fields[11]) + Number(fields[12])) / TICKS_PER_S;
}

async function setUp(origin: string): Promise<string[]> {
  const cycle = fullCycle();
  const keys: string[] = [];
  for (let n = 1; n <= VESSELS; n += 1) {
    const vessel = `Oven ${n}`;
    await post(origin, '/api/vessels', { name: vessel, kind: 'oven' });
    const channels = CHANNELS.map((name) => ({ column: name, name, role: 'part', unit: '°C' }));
    const document = {
      format: 'dwellbook-source/1',
      name: `logger ${n}`,
      intervalS: 1,
      reads: { kind: 'push' },
      channels,
    };
    await post(origin, `/api/vessels/${vessel}/sources`, { document });
    const made = await post<{ key: string }>(origin, `/api/vessels/${vessel}/keys`, { name: `logger ${n}` });
    keys.push(made.key);
    const sensors = CHANNELS.map((channel) => ({ channel, parts: [`SR-${n}`] }));
    await post(origin, `/api/vessels/${vessel}/runs`, {
      load: { format: 'dwellbook-load/1', parts: [{ part: `SR-${n}` }], sensors },
      cycle: { code: cycle.code, issue: cycle.issue },
    });
  }
  return keys;
}

/** A run of ten hours brought in as a file, and judged. */
async function storeLongRun(origin: string): Promise<number> {
  const cycle = fullCycle();
  await post(origin, '/api/cycles', { document: cycle });
  const { timeMs, channels } = tenHourRun();
  const header = ['time', ...channels.map(({ channel }) => channel.name)].join(',');
  const lines = Array.from(timeMs, (at, scan) =>
    [new Date(at).toISOString().slice(0, 19).replace('T', ' '), ...channels.map(({ value }) => value[scan])].join(','),
  );
  const received = await fetch(`${origin}/api/imports?name=ten-hours.csv`, {
    method: 'POST',
    headers: { 'content-type': 'application/octet-stream' },
    body: `${header}\n${lines.join('\n')}\n`,
  });
  const { id } = (await received.json()) as { id: number };
  const layout = {
    format: 'dwellbook-layout/1',
    name: 'ten hours',
    header: 1,
    time: { columns: ['time'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: 'UTC' },
    channels: channels.map(({ channel }) => ({ ...channel, column: channel.name })),
  };
  const { run } = await post<{ run: number }>(origin, `/api/imports/${id}/run`, { layout });
  await post(origin, `/api/runs/${run}/load`, {
    load: { format: 'dwellbook-load/1', parts: [{ part: 'SR-0' }], sensors: [] },
    cycle: { code: cycle.code, issue: cycle.issue },
  });
  return run;
}

async function post<T>(origin: string, path: string, body: unknown): Promise<T> {
  const headers = { 'content-type': 'application/json' };
  const response = await fetch(`${origin}${encodeURI(path)}`, { method: 'POST', headers, body: JSON.stringify(body) });
  if (!response.ok) throw new Error(`${path} answered ${response.status}: ${await response.text()}`);
  return (await response.json()) as T;
}

async function read(origin: string, path: string): Promise<void> {
  const response = await fetch(`${origin}${path}`);
  await response.arrayBuffer();
}
