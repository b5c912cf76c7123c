import type { Db } from '../../server/store/database.ts';
import { insertLoad } from '../../server/store/loads.ts';
import { insertItem, insertLine } from '../../server/store/material-items.ts';
import { insertPartMaterials } from '../../server/store/part-materials.ts';
import { insertParticulars, keepPart } from '../../server/store/parts.ts';
import { insertRun } from '../../server/store/runs.ts';
import { keepTool } from '../../server/store/tools.ts';

const DEED = { at: '2026-03-01T08:00:00.000Z', by: 'operator 1' };
export const DAY_MS = 86_400_000;
export const FIRST_DAY_MS = Date.parse('2026-01-01T06:00:00Z');

/** A part as it is put on record: each of these may be missing. */
export interface MadePart {
  readonly serial: string;
  readonly item: string | null;
  readonly tool: string | null;
  readonly bagLine: string | null;
  readonly channel: string | null;
}

export interface MadeRun {
  readonly vessel: string | null;
  readonly day: number;
  /** Null where nobody said what was in it. */
  readonly parts: readonly MadePart[] | null;
  readonly by?: string;
}

/** Writes runs with their parts straight into the store: no log is needed to tell who shared what. */
export function writeRuns(db: Db, runs: readonly MadeRun[]): number[] {
  return runs.map(({ vessel, day, parts, by = DEED.by }) => {
    const fromMs = FIRST_DAY_MS + day * DAY_MS;
    const vesselId = vessel === null ? null : keepVessel(db, vessel);
    const run = insertRun(db, { vesselId, fromMs, untilMs: fromMs + 6 * 3_600_000, ...DEED });
    if (parts !== null) {
      for (const part of parts) writePart(db, part);
      insertLoad(db, {
        run,
        document: {
          format: 'dwellbook-load/1',
          parts: parts.map(({ serial, bagLine }) => ({ part: serial, ...(bagLine === null ? {} : { bagLine }) })),
          sensors: parts.flatMap(({ serial, channel }) => (channel === null ? [] : [{ channel, parts: [serial] }])),
        },
        cycleId: null,
        reason: null,
        at: DEED.at,
        by,
      });
    }
    return run;
  });
}

export function writePart(db: Db, { serial, item, tool }: MadePart): void {
  const partId = keepPart(db, serial);
  if (tool !== null) {
    keepTool(db, tool);
    insertParticulars(db, { part: serial, title: 'Strut', tool }, DEED.at, DEED.by);
  }
  if (item !== null) insertPartMaterials(db, partId, [{ item }], { reason: null, ...DEED });
}

/** Rolls of batches, and kits cut from them. */
export function writeItems(
  db: Db,
  rolls: readonly { readonly roll: string; readonly batch: string; readonly kits: readonly string[] }[],
): void {
  for (const { roll, batch, kits } of rolls) {
    db.prepare('INSERT OR IGNORE INTO batches (code) VALUES (?)').run(batch);
    const { id } = insertItem(db, roll, 'roll');
    insertLine(db, { itemId: id, event: { kind: 'received', at: DEED.at, batch, as: 'frozen' }, ...DEED });
    for (const kit of kits) {
      const cut = insertItem(db, kit, 'kit');
      insertLine(db, { itemId: cut.id, event: { kind: 'cut', at: DEED.at, from: roll }, ...DEED });
    }
  }
}

function keepVessel(db: Db, name: string): number {
  db.prepare("INSERT OR IGNORE INTO vessels (name, kind) VALUES (?, 'autoclave')").run(name);
  return db.prepare<[string], number>('SELECT id FROM vessels WHERE name = ?').pluck().get(name) ?? 0;
}
