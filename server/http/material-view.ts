import { DomainError } from '../../models/errors.ts';
import { courseOf } from '../../models/material/course.ts';
import type { MaterialRecords } from '../../models/material/ledger.ts';
import { materialState, productOf } from '../../models/material/material-state.ts';
import type { ItemLine, ItemView, MaterialLine, Materials, MaterialView } from '../contract/materials.ts';
import { readAudit } from '../store/audit.ts';
import { listBatches } from '../store/batches.ts';
import type { Db } from '../store/database.ts';
import { isoFromMs } from '../store/instants.ts';
import { type ItemRow, listItems, readChildren, readFamily, readLedger, requireItem } from '../store/material-items.ts';
import { recordsOfItems } from '../store/material-records.ts';
import { listMaterials, type MaterialRow, readMaterialDocument } from '../store/materials.ts';
import { listLaidUpItems, readUsesOfItem } from '../store/part-materials.ts';

const AUDIT_LINES = 100;

/** What is in life and what is due. */
export function materialsView(db: Db, nowMs: number): Materials {
  const all = itemLines(db, listItems(db), nowMs);
  const items = all.filter((line) => line.state?.place !== 'scrapped' && !line.laidUp);
  return {
    now: isoFromMs(nowMs),
    materials: latestOf(listMaterials(db)).map(lineOf),
    batches: listBatches(db),
    items: items.sort(bySoonest),
    done: all.length - items.length,
  };
}

/** A material by its latest issue, and what is here of it. */
export function materialView(db: Db, code: string, nowMs: number): MaterialView {
  const [latest, ...earlier] = listMaterials(db, code);
  if (latest === undefined) throw new DomainError('not-found', `There is no material "${code}"`, { material: code });
  return {
    ...lineOf(latest),
    document: readMaterialDocument(db, latest),
    issues: earlier.map(lineOf),
    batches: listBatches(db, code),
    items: materialsView(db, nowMs).items.filter(({ material }) => material?.code === code),
  };
}

/** A roll or kit with its ledger, and what was made of it. */
export function itemView(db: Db, item: string, nowMs: number): ItemView {
  const row = requireItem(db, item);
  const lines = itemLines(db, readFamily(db, [row.id]), nowMs);
  const own = lines.find((line) => line.item === row.item);
  const ledger = readLedger(db, row.id);
  const children = readChildren(db, row.id);
  const born = ledger.find(
    ({ event, replacedBy }) => (event?.kind === 'received' || event?.kind === 'cut') && replacedBy === null,
  );
  const lengthM = born?.lengthM ?? null;
  const cutM = children.reduce((sum, child) => sum + (child.lengthM ?? 0), 0);
  return {
    ...(own ?? {
      item: row.item,
      kind: row.kind,
      batch: null,
      material: null,
      cutFrom: null,
      laidUp: false,
      state: null,
    }),
    now: isoFromMs(nowMs),
    ledger,
    children: children.flatMap((child) => lines.find((line) => line.item === child.item) ?? []),
    parts: readUsesOfItem(db, row.id),
    lengthM,
    lengthLeftM: lengthM === null ? null : Math.round((lengthM - cutM) * 1000) / 1000,
    audit: readAudit(db, { subject: `${row.kind}/${row.item}`, limit: AUDIT_LINES }).lines,
  };
}

/** Items as they stand; `rows` must hold all that any of them was cut from. */
function itemLines(db: Db, rows: readonly ItemRow[], nowMs: number): ItemLine[] {
  const records = recordsOfItems(db, rows);
  const laidUp = listLaidUpItems(db);
  return records.items.map((item): ItemLine => {
    const { events, kind } = item;
    const birth = events.find((event) => event.kind === 'received' || event.kind === 'cut');
    const state = birth === undefined ? null : materialState(records, item.item, nowMs);
    return {
      item: item.item,
      kind,
      ...(birth === undefined ? { batch: null, material: null } : productLine(records, item.item, nowMs)),
      cutFrom: birth?.kind === 'cut' ? birth.from : null,
      laidUp: kind === 'kit' && laidUp.has(item.item),
      state,
    };
  });
}

function productLine(records: MaterialRecords, item: string, nowMs: number): Pick<ItemLine, 'batch' | 'material'> {
  const { batch, material } = productOf(records, courseOf(records, item, nowMs));
  const { code, issue, name } = material;
  return { batch: batch.batch, material: { code, issue, name } };
}

function bySoonest(one: ItemLine, other: ItemLine): number {
  const due = ({ state }: ItemLine) => (state?.dueAt == null ? Number.POSITIVE_INFINITY : Date.parse(state.dueAt));
  const [a, b] = [due(one), due(other)];
  return a === b ? (one.item < other.item ? -1 : 1) : a - b;
}

/** The latest issue of each code: they come latest first. */
function latestOf(rows: readonly MaterialRow[]): MaterialRow[] {
  return rows.filter(({ code }, i) => rows.findIndex((row) => row.code === code) === i);
}

function lineOf({ id: _id, ...line }: MaterialRow): MaterialLine {
  return line;
}
