import { closeSync, createReadStream, openSync, statSync, writeSync } from 'node:fs';
import { join } from 'node:path';
import { parse } from 'csv-parse';
import Papa from 'papaparse';
import type { Layout } from '../../models/log/layout.ts';
import { parseLayout } from '../../models/log/parse-layout.ts';
import { readLog } from '../../models/log/read-log.ts';
import { fileBytes, fileChunks } from '../../server/files/file-chunks.ts';
import type { BenchResult } from './result.ts';
import { inTemporaryFolder } from './temporary-workshop.ts';

const SENSORS = 24;
const BYTES = 100e6;
const GOAL_MB_PER_S = 100;

/**
 * Reads a log of 100 MB from the disk into readings, as a recorder writes it: date and time apart, 24 sensors, semicolons,
 * decimal comma. Floor: the faster of csv-parse and papaparse, which only take the same file apart into cells.
 */
export async function benchRead100Mb(): Promise<BenchResult[]> {
  return inTemporaryFolder(async (folder) => {
    const path = join(folder, 'long.csv');
    const scans = writeLog(path);
    const megabytes = statSync(path).size / 1e6;
    const own = [1, 2, 3].map(() => timed(() => readOnce(path, scans)));
    const value = megabytes / Math.min(...own);
    const csvParse = megabytes / (await timedAsync(() => csvParseOnce(path, scans)));
    const papaparse = megabytes / (await timedAsync(() => papaparseOnce(path, scans)));
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
        note: `csv-parse ${csvParse.toFixed(0)}, papaparse ${papaparse.toFixed(0)} MB/s; ${heldBeyondReadings(path, scans).toFixed(0)} MB held beyond the readings`,
      },
    ];
  });
}

function layout(): Layout {
  return parseLayout({
    format: 'dwellbook-layout/1',
    name: 'bench',
    delimiter: ';',
    decimal: ',',
    header: 1,
    time: { columns: ['Date', 'Time'], pattern: 'dd/MM/yyyy HH:mm:ss', zone: 'Europe/Lisbon' },
    channels: Array.from({ length: SENSORS }, (_, i) => ({
      column: `T${i + 1}`,
      name: `TC${i + 1}`,
      role: 'part',
      unit: '°C',
    })),
    missing: ['OPEN', '----', '9999'],
  });
}

/** Writes the log, a scan a second; returns how many scans. */
function writeLog(path: string): number {
  const file = openSync(path, 'w');
  let text = `Date;Time;${layout()
    .channels.map(({ column }) => column)
    .join(';')}\r\n`;
  let bytes = 0;
  let scans = 0;
  const cells = Array.from({ length: 2000 }, (_, tenths) => `;${(tenths / 10).toFixed(1).replace('.', ',')}`);
  while (bytes + text.length < BYTES) {
    const [date = '', time = ''] = new Date(Date.UTC(2026, 2, 3) + scans * 1000).toISOString().split('T');
    text += `${date.slice(8)}/${date.slice(5, 7)}/${date.slice(0, 4)};${time.slice(0, 8)}`;
    for (let sensor = 0; sensor < SENSORS; sensor++) text += cells[200 + ((scans * 7 + sensor * 131) % 1790)];
    text += '\r\n';
    scans++;
    if (text.length > 1e6) {
      bytes += writeSync(file, text);
      text = '';
    }
  }
  writeSync(file, text);
  closeSync(file);
  return scans;
}

function readOnce(path: string, scans: number): void {
  const { readings } = readLog([{ name: 'long.csv', chunks: fileChunks(path), bytes: fileBytes(path) }], layout());
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
function heldBeyondReadings(path: string, scans: number): number {
  globalThis.gc?.();
  const before = held();
  let most = 0;
  function* watched() {
    for (const chunk of fileChunks(path)) {
      yield chunk;
      most = Math.max(most, held() - before);
    }
  }
  readLog([{ name: 'long.csv', chunks: watched(), bytes: fileBytes(path) }], layout());
  return (Math.max(most, held() - before) - scans * (SENSORS + 1) * 8) / 1e6;
}

function held(): number {
  const { heapUsed, arrayBuffers } = process.memoryUsage();
  return heapUsed + arrayBuffers;
}

function expectScans(read: number, scans: number): void {
  if (read !== scans) throw new Error(`${read} of ${scans} scans were read`);
}

function timed(work: () => void): number {
  const startMs = performance.now();
  work();
  return (performance.now() - startMs) / 1000;
}

async function timedAsync(work: () => Promise<void>): Promise<number> {
  const startMs = performance.now();
  await work();
  return (performance.now() - startMs) / 1000;
}
