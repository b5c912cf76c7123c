import { closeSync, createReadStream, openSync, statSync, writeSync } from 'node:fs';
import { join } from 'node:path';
import { parse } from 'csv-parse';
import Papa from 'papaparse';
import type { Layout } from '../../models/log/layout.ts';
import { parseLayout } from '../../models/log/parse-layout.ts';
import { readLog } from '../../models/log/read-log.ts';
import type { Readings } from '../../models/log/readings.ts';
import { fileBytes, fileChunks } from '../../server/files/file-chunks.ts';
import type { BenchResult } from './result.ts';
import { inTemporaryFolder } from './temporary-workshop.ts';
import { tenHourRun } from './ten-hour-run.ts';

const BYTES = 100e6;
const GOAL_MB_PER_S = 100;

/**
 * Reads a log of 100 MB from the disk into readings, as a recorder writes it: date and time apart, 27 sensors, semicolons,
 * decimal comma, a run of ten hours over and over. Floor: the faster of csv-parse and papaparse, which only take the same file apart into cells.
 */
export async function benchRead100Mb(): Promise<BenchResult[]> {
  return inTemporaryFolder(async (folder) => {
    const path = join(folder, 'long.csv');
    const run = tenHourRun();
    const layout = layoutOf(run);
    const scans = writeLog(path, run);
    const megabytes = statSync(path).size / 1e6;
    const value = megabytes / (await fastest(5, async () => readOnce(path, layout, scans)));
    const papaparse = megabytes / (await fastest(3, () => papaparseOnce(path, scans)));
    const csvParse = megabytes / (await fastest(1, () => csvParseOnce(path, scans)));
    const floor = Math.max(csvParse, papaparse);
    return [
      {
        name: 'read-100MB',
        value,
        unit: 'MB/s',
        floor,
        ratio: value / floor,
        goal: `≥ ${GOAL_MB_PER_S} MB/s, and faster than csv-parse and papaparse`,
        holds: value >= GOAL_MB_PER_S && value > floor,
        note: `csv-parse ${csvParse.toFixed(0)}, papaparse ${papaparse.toFixed(0)} MB/s; ${heldBeyondReadings(path, layout, scans).toFixed(0)} MB held beyond the readings`,
      },
    ];
  });
}

function layoutOf({ channels }: Readings): Layout {
  return parseLayout({
    format: 'dwellbook-layout/1',
    name: 'bench',
    delimiter: ';',
    decimal: ',',
    header: 1,
    time: { columns: ['Date', 'Time'], pattern: 'dd/MM/yyyy HH:mm:ss', zone: 'Europe/Lisbon' },
    channels: channels.map(({ channel }) => channel),
    missing: ['OPEN', '----', '9999'],
  });
}

/** Writes the log, a scan a second; returns how many scans. */
function writeLog(path: string, { channels }: Readings): number {
  const file = openSync(path, 'w');
  let text = `Date;Time;${channels.map(({ channel }) => channel.column).join(';')}\r\n`;
  let bytes = 0;
  let scans = 0;
  for (; bytes + text.length < BYTES; scans++) {
    const [date = '', time = ''] = new Date(Date.UTC(2026, 2, 3) + scans * 1000).toISOString().split('T');
    text += `${date.slice(8)}/${date.slice(5, 7)}/${date.slice(0, 4)};${time.slice(0, 8)}`;
    for (const { channel, value } of channels) {
      const decimals = channel.unit === '°C' ? 1 : 3;
      text += `;${value[scans % value.length]!.toFixed(decimals).replace('.', ',')}`;
    }
    text += '\r\n';
    if (text.length > 1e6) {
      bytes += writeSync(file, text);
      text = '';
    }
  }
  writeSync(file, text);
  closeSync(file);
  return scans;
}

function readOnce(path: string, layout: Layout, scans: number): void {
  const { readings } = readLog(
    [{ name: 'long.csv', chunks: fileChunks(path, new Uint8Array(1 << 18)), bytes: fileBytes(path) }],
    layout,
  );
  expectScans(readings.timeMs.length, scans);
}

async function csvParseOnce(path: string, scans: number): Promise<void> {
  let rows = 0;
  for await (const _ of createReadStream(path).pipe(parse({ delimiter: ';' }))) rows++;
  expectScans(rows - 1, scans);
}

function papaparseOnce(path: string, scans: number): Promise<void> {
  return new Promise((resolve, reject) => {
    let rows = 0;
    Papa.parse(createReadStream(path), {
      delimiter: ';',
      skipEmptyLines: true,
      chunk: ({ data }) => {
        rows += data.length;
      },
      complete: () => {
        expectScans(rows - 1, scans);
        resolve();
      },
      error: reject,
    });
  });
}

/** MB of memory that reading took at its most, less the readings themselves. */
function heldBeyondReadings(path: string, layout: Layout, scans: number): number {
  globalThis.gc?.();
  const before = held();
  let most = 0;
  function* watched() {
    for (const chunk of fileChunks(path, new Uint8Array(1 << 18))) {
      yield chunk;
      most = Math.max(most, held() - before);
    }
  }
  readLog([{ name: 'long.csv', chunks: watched(), bytes: fileBytes(path) }], layout);
  return (Math.max(most, held() - before) - scans * (layout.channels.length + 1) * 8) / 1e6;
}

function held(): number {
  const { heapUsed, arrayBuffers } = process.memoryUsage();
  return heapUsed + arrayBuffers;
}

function expectScans(read: number, scans: number): void {
  if (read !== scans) throw new Error(`${read} of ${scans} scans were read`);
}

/** Seconds of the fastest of some turns, each begun with an empty heap so that none cleans up after another. */
async function fastest(turns: number, work: () => Promise<void>): Promise<number> {
  let least = Number.POSITIVE_INFINITY;
  for (let turn = 0; turn < turns; turn++) {
    globalThis.gc?.();
    const startMs = performance.now();
    await work();
    least = Math.min(least, performance.now() - startMs);
  }
  return least / 1000;
}
