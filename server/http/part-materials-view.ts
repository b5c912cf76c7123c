import { type Aged, agedOf } from '../../models/material/aged.ts';
import type { MaterialRecords, PartMaterial } from '../../models/material/ledger.ts';
import { productOf } from '../../models/material/material-state.ts';
import { courseInPart, isCured, partMaterialStates } from '../../models/material/part-materials.ts';
import type { AgedOffer, PartMaterials } from '../contract/materials.ts';
import type { Db } from '../store/database.ts';
import { isoFromMs } from '../store/instants.ts';
import { recordsOfParts } from '../store/material-records.ts';
import { findPartMaterials, readCures } from '../store/part-materials.ts';
import { findResin, readResinDocument } from '../store/resins.ts';

/**
 * What a part was laid up from and what each of it had aged to, and the degree that a cure may start from.
 *
 * @param atMs The instant that is asked for; null: each as the run began that cured it, or now where none did.
 */
export function partMaterialsView(db: Db, part: string, atMs: number | null, nowMs: number): PartMaterials {
  const set = findPartMaterials(db, part);
  const cures = readCures(db, part);
  const lines = (set?.materials ?? []).flatMap((use) => {
    const ms = atMs ?? cures.find((cure) => isCured(use, [cure], cure.untilMs))?.fromMs ?? nowMs;
    return materialLines(db, part, use, ms);
  });
  const fresh = (set?.materials ?? []).filter((use) => !isCured(use, cures, atMs ?? nowMs)).map(({ item }) => item);
  const offers = lines.filter(({ item }) => fresh.includes(item)).map(({ aged }) => aged);
  return {
    part,
    at: isoFromMs(atMs ?? nowMs),
    materials: lines,
    aged: offers.length === 0 ? null : furthest(offers),
    set: set === null ? null : { at: set.at, by: set.by },
  };
}

type Line = PartMaterials['materials'][number];

function materialLines(db: Db, part: string, use: PartMaterial, atMs: number): Line[] {
  const records = recordsOfParts(db, [part], atMs);
  if (records === null) return [];
  const one = { ...records, parts: [{ part, materials: [use] }] };
  return partMaterialStates(one, part, atMs).map((state) => materialLine(db, one, part, use, state, atMs));
}

function materialLine(
  db: Db,
  records: MaterialRecords,
  part: string,
  use: PartMaterial,
  state: Line['state'],
  atMs: number,
): Line {
  const { item, plies = null, laidUpFrom = null, laidUpUntil = null } = use;
  const course = courseInPart(records, part, use, atMs);
  const { batch, material } = productOf(records, course);
  const set = material.resin === undefined ? undefined : findResin(db, material.resin);
  const aged: Aged = agedOf(course, material, set === undefined ? null : readResinDocument(db, set));
  const { code, issue, name } = material;
  return { item, plies, laidUpFrom, laidUpUntil, material: { code, issue, name }, batch: batch.batch, state, aged };
}

/** The furthest aged; what has no degree is named beside it. */
function furthest(offers: readonly AgedOffer[]): AgedOffer {
  const known = offers.filter(({ degree }) => degree !== null);
  const first = known.reduce<AgedOffer | null>(
    (a, b) => (a === null || (b.degree ?? 0) > (a.degree ?? 0) ? b : a),
    null,
  );
  const unknown = offers.find(({ degree }) => degree === null);
  if (first === null) return unknown ?? { degree: null, basis: null, because: 'No material is on record.' };
  return unknown === undefined ? first : { ...first, because: `${first.because} Another: ${unknown.because}` };
}
