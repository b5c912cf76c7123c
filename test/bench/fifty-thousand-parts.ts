import { join } from 'node:path';
import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import { uniformNumbers } from '../../models/trace/uniform-numbers.ts';
import { appendAudit } from '../../server/store/audit.ts';
import { type Db, openDatabase } from '../../server/store/database.ts';
import { keepDocument } from '../../server/store/documents.ts';
import { insertEvaluation } from '../../server/store/evaluations.ts';
import { insertLoad } from '../../server/store/loads.ts';
import { insertItem, insertLine } from '../../server/store/material-items.ts';
import { insertPartMaterials } from '../../server/store/part-materials.ts';
import { insertParticulars, keepPart } from '../../server/store/parts.ts';

export const RUNS = 10_000;
export const PARTS = 50_000;
const ROLLS = 2000;
const PARTS_IN_LOAD = PARTS / RUNS;
const [VESSELS, LINES, TOOLS, DRAWINGS, PEOPLE, CYCLES] = [8, 6, 250, 12, 20, 4];
const FIRST_MS = Date.parse('2016-01-04T06:00:00Z');
const HOURS_APART = 9;
const SHA = 'a'.repeat(64);

/** Ten years of a large workshop: runs, loads, judgements, rolls with their kits, tools and a few failed tests. */
export function writeFiftyThousand(folder: string): Db {
  const db = openDatabase(join(folder, 'large.sqlite'), { at: '2016-01-01T00:00:00.000Z' });
  const random = uniformNumbers(20260302);
  const pick = (from: number) => Math.floor(random() * from);
  const at = '2016-01-04T06:00:00.000Z';
  db.transaction(() => {
    const deed = { at, by: 'operator 1' };
    for (let n = 1; n <= VESSELS; n += 1) {
      db.prepare("INSERT INTO vessels (id, name, kind) VALUES (?, ?, 'autoclave')").run(n, `Autoclave ${n}`);
    }
    const document = keepDocument(db, { format: 'dwellbook-cycle/1' });
    const layout = keepDocument(db, { format: 'dwellbook-layout/1' });
    for (let n = 1; n <= CYCLES; n += 1) {
      db.prepare(
        "INSERT INTO cycles (id, code, issue, title, document_sha256, at, by) VALUES (?, ?, 'A', 'Cycle', ?, ?, 'engineer 1')",
      ).run(n, `SR-18${n}`, document, at);
    }
    for (let n = 0; n < ROLLS / 10; n += 1) db.prepare('INSERT INTO batches (code) VALUES (?)').run(`B-${n}`);
    for (let n = 0; n < ROLLS; n += 1) {
      const roll = insertItem(db, `K-${n}`, 'roll');
      const batch = `B-${Math.floor(n / 10)}`;
      insertLine(db, { itemId: roll.id, event: { kind: 'received', at, batch, as: 'frozen' }, ...deed });
      for (const kit of [`K-${n}/1`, `K-${n}/2`]) {
        const cut = insertItem(db, kit, 'kit');
        insertLine(db, { itemId: cut.id, event: { kind: 'cut', at, from: `K-${n}` }, ...deed });
      }
    }
    const addSource = db.prepare(
      `INSERT INTO run_sources (run_id, n, layout_sha256, chain_sha256, scans, from_ms, until_ms, repairs, passed_over, at, by)
       VALUES (?, 1, ?, ?, 720, ?, ?, '[]', '[]', ?, 'operator 1')`,
    );
    for (let run = 1; run <= RUNS; run += 1) {
      const vessel = 1 + pick(VESSELS);
      const fromMs = FIRST_MS + run * HOURS_APART * 3_600_000;
      const untilMs = fromMs + 6 * 3_600_000;
      const by = `operator ${1 + pick(PEOPLE)}`;
      db.prepare('INSERT INTO runs (id, vessel_id, from_ms, until_ms, at, by) VALUES (?, ?, ?, ?, ?, ?)').run(
        run,
        vessel,
        fromMs,
        untilMs,
        at,
        by,
      );
      addSource.run(run, layout, SHA, fromMs, untilMs, at);
      const first = pick(LINES);
      const roll = Math.floor(((run - 1) / RUNS) * ROLLS);
      const serials = Array.from({ length: PARTS_IN_LOAD }, (_, n) => `SR-${String(run * 10 + n).padStart(6, '0')}`);
      serials.forEach((serial, n) => {
        const partId = keepPart(db, serial);
        const tool = `T-${pick(TOOLS)}`;
        const drawing = `SR-D-${1100 + pick(DRAWINGS)}`;
        insertParticulars(db, { part: serial, title: 'Hydrofoil strut', drawing, tool }, at, by);
        const item = n % 4 === 0 ? `K-${roll}/${1 + pick(2)}` : `K-${roll}`;
        insertPartMaterials(db, partId, [{ item }], { reason: null, at, by });
        if (random() < 0.002) {
          db.prepare(
            `INSERT INTO part_results (part_id, tested_at, test, outcome, text, at, by)
             VALUES (?, ?, 'proof load', 'failed', 'broke', ?, ?)`,
          ).run(partId, at, at, by);
        }
      });
      insertLoad(db, {
        run,
        document: {
          format: 'dwellbook-load/1',
          workOrder: `W-${run}`,
          parts: serials.map((part, n) => ({ part, bagLine: `V${1 + ((first + n) % LINES)}` })),
          sensors: serials.flatMap((part, n) => [
            { channel: `TC${1 + 2 * ((first + n) % LINES)}`, parts: [part], place: 'lead' },
            { channel: `TC${2 + 2 * ((first + n) % LINES)}`, parts: [part], place: 'lag' },
          ]),
        },
        cycleId: 1 + pick(CYCLES),
        reason: null,
        at,
        by,
      });
      insertEvaluation(db, {
        run,
        because: 'load set',
        engine: 'bench',
        inputs: {
          readings: SHA,
          layout: SHA,
          load: document,
          cycle: document,
          resin: null,
          decisions: document,
          materials: null,
          instruments: null,
        },
        document: judged(serials, random() < 0.1),
        at,
        by,
      });
      for (const verb of ['record-run', 'set-load', 'judge-run']) {
        appendAudit(db, { at, by, verb, subject: `run/${run}`, why: null, details: { run } });
      }
    }
  })();
  db.exec('ANALYZE');
  return db;
}

function judged(serials: readonly string[], isBroken: boolean): Evaluation {
  const instant = '2016-01-04T08:00:00.000Z';
  const finding = {
    outcome: 'met',
    observed: 64.2,
    possible: 64.2,
    atLeast: 60,
    atMost: 80,
    unit: 'min',
    margin: 4.2,
    uncertainty: null,
    sensor: 'TC2',
    from: instant,
    until: instant,
    because: 'TC2 was within the band for 64.2 min; at least 60 min are asked.',
  } as const;
  const limits = [
    'heat-up/slowest',
    'heat-up/fastest',
    'dwell/time',
    'dwell/upper',
    'window/vacuum',
    'ceiling',
    'spread',
  ];
  const verdict = isBroken ? 'does-not-conform' : 'conforms';
  return {
    format: 'dwellbook-evaluation/1',
    verdict,
    log: { sha256: SHA, from: instant, until: instant, scans: 720, repairs: [], passedOver: [] },
    cycle: { code: 'SR-181', issue: 'A', sha256: SHA },
    sensors: [],
    decisions: [],
    parts: serials.map((part) => ({
      part,
      verdict,
      withoutEstimates: verdict,
      judgedBy: ['TC1', 'TC2'],
      ownSensors: true,
      stages: [],
      windows: [],
      heatOn: instant,
      findings: limits.map((limit) => ({ limit, ...finding })),
      cure: [],
    })),
  } as unknown as Evaluation;
}
