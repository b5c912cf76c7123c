import { join } from 'node:path';
import Database from 'better-sqlite3';
import type { LiveScan, LiveSource } from '../../models/log/live-source.ts';
import { type Db, openDatabase } from '../../server/store/database.ts';
import { insertLiveRun } from '../../server/store/live-runs.ts';
import { keepScans, type ScanBatch } from '../../server/store/live-scans.ts';
import { insertLiveSource, requireLiveSource } from '../../server/store/live-sources.ts';
import { insertRun } from '../../server/store/runs.ts';
import { insertVessel, requireVessel } from '../../server/store/vessels.ts';
import type { BenchResult } from './result.ts';
import { inTemporaryFolder } from './temporary-workshop.ts';

const DEED = { at: '2026-03-03T08:00:00.000Z', by: 'bench' };
const BEGUN_MS = Date.parse(DEED.at);
const CHANNELS = 24;
const GOAL = 0.8;
const ROUNDS = 40;
const SCANS_IN_ROUND = 100;

/**
 * Scans of 24 channels made durable one by one in an open run, chain and all; floor: rows of the same bytes, one a
 * commit, by SQLite alone on the same disk. In turns of 100, so that a disk that grows slower does so for both.
 */
export async function benchDurableScans(): Promise<BenchResult[]> {
  return inTemporaryFolder(async (folder) => {
    const db = openDatabase(join(folder, 'workshop.sqlite'), { at: DEED.at });
    const keep = scanKeeper(db);
    const plain = new Database(join(folder, 'plain.sqlite'));
    const commit = plainWriter(plain);
    const scans = Array.from({ length: (ROUNDS + 1) * SCANS_IN_ROUND }, (_, n) => scanAt(n));
    const takenMs = { keep: 0, commit: 0 };
    for (let round = 0; round <= ROUNDS; round += 1) {
      const own = scans.slice(round * SCANS_IN_ROUND, (round + 1) * SCANS_IN_ROUND);
      // Who goes first takes turns too; the first round only warms up.
      const sides = round % 2 === 0 ? (['keep', 'commit'] as const) : (['commit', 'keep'] as const);
      for (const side of sides) {
        const startMs = performance.now();
        for (const scan of own) (side === 'keep' ? keep : commit)(scan);
        if (round > 0) takenMs[side] += performance.now() - startMs;
      }
    }
    db.close();
    plain.close();
    const [value, floor] = [takenMs.keep, takenMs.commit].map((ms) => (1000 * ROUNDS * SCANS_IN_ROUND) / ms);
    const ratio = (value ?? 0) / (floor ?? 1);
    return [
      {
        name: 'durable-scans',
        value: value ?? 0,
        unit: 'scans/s',
        floor: floor ?? 0,
        ratio,
        goal: `≥ ${GOAL} of plain commits`,
        holds: ratio >= GOAL,
        note: `${CHANNELS} channels, one scan a commit, synchronous=FULL`,
      },
    ];
  });
}

function scanKeeper(db: Db): (scan: LiveScan) => void {
  insertVessel(db, { name: 'Autoclave 1', kind: 'autoclave' });
  const vesselId = requireVessel(db, 'Autoclave 1');
  const document: LiveSource = {
    format: 'dwellbook-source/1',
    name: 'plc',
    intervalS: 1,
    reads: { kind: 'push' },
    channels: Array.from({ length: CHANNELS }, (_, n) => ({
      column: `t${n}`,
      name: `TC${n}`,
      role: 'part' as const,
      unit: '°C',
    })),
  };
  const source = insertLiveSource(db, vesselId, { document, isResting: false, ...DEED });
  const { settings } = requireLiveSource(db, source);
  insertLiveRun(db, insertRun(db, { vesselId, fromMs: BEGUN_MS, untilMs: BEGUN_MS, ...DEED }), vesselId, BEGUN_MS);
  return (scan) => {
    const batch: ScanBatch = { vesselId, settings, scans: [scan], arrivedMs: scan.timeMs };
    keepScans(db, [batch]);
  };
}

/** The same bytes as a row: 24 figures of 8 bytes, the hash of 32, and six numbers. */
function plainWriter(db: Database.Database): (scan: LiveScan) => void {
  db.pragma('journal_mode = WAL');
  db.pragma('synchronous = FULL');
  db.exec(`CREATE TABLE scans (time_ms REAL PRIMARY KEY, source INTEGER, arrival INTEGER, settings INTEGER,
    sequence INTEGER, arrived_ms REAL, packed BLOB, chain BLOB) STRICT, WITHOUT ROWID`);
  const insert = db.prepare('INSERT INTO scans VALUES (?, 1, ?, 1, ?, ?, ?, ?)');
  const chain = Buffer.alloc(32, 7);
  let arrival = 0;
  return ({ timeMs, sequence, figures }) => {
    arrival += 1;
    insert.run(timeMs, arrival, sequence, timeMs, Buffer.from(figures.buffer), chain);
  };
}

function scanAt(n: number): LiveScan {
  const figures = Float64Array.from({ length: CHANNELS }, (_, c) => Math.round(10 * (20 + c + n / 7)) / 10);
  return { timeMs: BEGUN_MS + 1000 * n, sequence: n, figures };
}
