import type { BatchRecord, LedgerEvent, LedgerItem, MaterialRecords } from '../../models/material/ledger.ts';
import type { Material } from '../../models/material/material.ts';
import { isCured } from '../../models/material/part-materials.ts';
import { findBatch } from './batches.ts';
import type { Db } from './database.ts';
import { type ItemRow, readChildren, readEvents, readForebears, requireItem } from './material-items.ts';
import { findMaterial, readMaterialDocument } from './materials.ts';
import { findPartMaterials, readCures, readUsesOfItem } from './part-materials.ts';

/**
 * Everything the ages of these parts' materials follow from up to an instant; null where none of them has any on
 * record. What was written of later times is left out, so that it makes no other judgement, and so is material that a
 * run which had ended by `curedByMs` had cured.
 */
export function recordsOfParts(
  db: Db,
  parts: readonly string[],
  untilMs: number,
  curedByMs = Number.NEGATIVE_INFINITY,
): MaterialRecords | null {
  const said = parts.map((part) => ({ part, materials: findPartMaterials(db, part)?.materials ?? [] }));
  const named = said
    .filter(({ materials }) => materials.length > 0)
    .map(({ part, materials }) => {
      const cures = readCures(db, part);
      return { part, materials: materials.filter((material) => !isCured(material, cures, curedByMs)) };
    });
  if (named.length === 0) return null;
  const items = named.flatMap(({ materials }) => materials.map(({ item }) => requireItem(db, item).id));
  return { ...recordsOfItems(db, readForebears(db, items), untilMs), parts: named };
}

/** The records of items that are a family: nothing among them may be cut from an item that is not. */
export function recordsOfItems(db: Db, rows: readonly ItemRow[], untilMs = Number.POSITIVE_INFINITY): MaterialRecords {
  const items = rows.map((row) => ledgerItem(db, row, untilMs));
  const codes = new Set(
    items.flatMap(({ events }) => events.flatMap((event) => (event.kind === 'received' ? [event.batch] : []))),
  );
  const batches = [...codes].sort().flatMap((batch) => batchRecord(db, batch));
  const materials = documentsOf(db, batches);
  return { format: 'dwellbook-material-records/1', materials, batches, items, parts: [] };
}

function ledgerItem(db: Db, { id, item, kind }: ItemRow, untilMs: number): LedgerItem {
  const isBefore = ({ at }: { readonly at: string }) => Date.parse(at) <= untilMs;
  const uses = [
    ...readChildren(db, id).map(({ item: kit, at }) => ({ at, what: `${kit} was cut from it` })),
    ...readUsesOfItem(db, id).flatMap(({ part, laidUpFrom }) =>
      laidUpFrom === null ? [] : [{ at: laidUpFrom, what: `${part} was laid up from it` }],
    ),
  ].filter(isBefore);
  const events: readonly LedgerEvent[] = readEvents(db, id).filter(isBefore);
  return { item, kind, events, ...(uses.length === 0 ? {} : { uses }) };
}

function batchRecord(db: Db, batch: string): BatchRecord[] {
  const line = findBatch(db, batch);
  if (line === undefined) return [];
  const { material, made, expires } = line;
  return [
    {
      batch,
      material,
      ...(made === null ? {} : { made }),
      ...(expires === null ? {} : { expires }),
    },
  ];
}

/** The issues of materials that batches are of, each once. */
function documentsOf(db: Db, batches: readonly BatchRecord[]): Material[] {
  const rows = batches.flatMap(({ material }) => findMaterial(db, material.code, material.issue) ?? []);
  return [...new Map(rows.map((row) => [row.id, row])).values()].map((row) => readMaterialDocument(db, row));
}
