import { createHash } from 'node:crypto';
import { join } from 'node:path';
import type { Layout } from '../../models/log/layout.ts';
import type { Readings } from '../../models/log/readings.ts';
import { type Db, openDatabase } from '../../server/store/database.ts';
import { keepFile } from '../../server/store/files.ts';
import { insertRun } from '../../server/store/runs.ts';
import { insertSource } from '../../server/store/sources.ts';
import type { BenchResult } from './result.ts';
import { inTemporaryFolder } from './temporary-workshop.ts';
import { tenHourRun } from './ten-hour-run.ts';

const DEED = { at: '2026-03-03T20:00:00.000Z', by: 'bench' };
const GOAL = 1.5;

/** Bytes of the database a reading takes; floor: the entropy of the readings' differences, one reading at a time. */
export async function benchStoredBytes(): Promise<BenchResult[]> {
  const readings = tenHourRun();
  const count = readings.timeMs.length * readings.channels.length;
  return inTemporaryFolder(async (folder) => {
    const db = openDatabase(join(folder, 'workshop.sqlite'), { at: DEED.at });
    const before = databaseBytes(db);
    writeRun(db, readings);
    const value = (databaseBytes(db) - before) / count;
    const log = Buffer.from(csvOf(readings));
    const beforeFile = databaseBytes(db);
    keepFile(db, {
      sha256: createHash('sha256').update(log).digest('hex'),
      bytes: log.length,
      chunks: () => [log],
    });
    const fileBytes = (databaseBytes(db) - beforeFile) / count;
    db.close();
    const floor = entropyBytes(readings);
    return [
      {
        name: 'stored-bytes',
        value,
        unit: 'byte/reading',
        floor,
        ratio: value / floor,
        goal: `≤ ${GOAL} byte/reading`,
        holds: value <= GOAL,
        note: `a file's own bytes, kept beside its readings, take ${fileBytes.toFixed(2)} more`,
      },
    ];
  });
}

function writeRun(db: Db, readings: Readings): void {
  const [fromMs = 0, untilMs = 0] = [readings.timeMs[0], readings.timeMs.at(-1)];
  const layout: Layout = {
    format: 'dwellbook-layout/1',
    name: 'bench',
    header: 1,
    time: { columns: ['time'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: 'UTC' },
    channels: readings.channels.map(({ channel }) => channel),
  };
  db.transaction(() => {
    const runId = insertRun(db, { vesselId: null, fromMs, untilMs, ...DEED });
    const log = { readings, repairs: [], passedOver: [] };
    insertSource(db, { runId, recorderId: null, replacesId: null, layout, log, files: [], ...DEED });
  })();
}

function databaseBytes(db: Db): number {
  return Number(db.pragma('page_count', { simple: true })) * Number(db.pragma('page_size', { simple: true }));
}

/** Shannon's entropy of order 0 of each channel's first differences: no code for single differences does better. */
function entropyBytes({ channels }: Readings): number {
  const bits = channels.map(({ value }) => {
    const times = new Map<number, number>();
    for (let scan = 1; scan < value.length; scan += 1) {
      const difference = Math.round((value[scan]! - value[scan - 1]!) * 1000);
      times.set(difference, (times.get(difference) ?? 0) + 1);
    }
    const all = value.length - 1;
    return [...times.values()].reduce((sum, n) => sum - (n / all) * Math.log2(n / all), 0);
  });
  return bits.reduce((sum, one) => sum + one, 0) / channels.length / 8;
}

function csvOf({ timeMs, channels }: Readings): string {
  const rows = [['time', ...channels.map(({ channel }) => channel.name)].join(',')];
  timeMs.forEach((at, scan) => {
    const stamp = new Date(at).toISOString().slice(0, 19).replace('T', ' ');
    rows.push([stamp, ...channels.map(({ value }) => value[scan]!.toFixed(1))].join(','));
  });
  return rows.join('\n');
}
