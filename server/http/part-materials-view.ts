import { type Aged, agedOf } from '../../models/material/aged.ts';
import type { MaterialRecords, PartMaterial } from '../../models/material/ledger.ts';
import { productOf } from '../../models/material/material-state.ts';
import { courseInPart, partMaterialStates } from '../../models/material/part-materials.ts';
import type { AgedOffer, PartMaterials } from '../contract/materials.ts';
import type { Db } from '../store/database.ts';
import { isoFromMs } from '../store/instants.ts';
import { recordsOfParts } from '../store/material-records.ts';
import { findPartMaterials } from '../store/part-materials.ts';
import { findResin, readResinDocument } from '../store/resins.ts';

/** What a part was laid up from, what each of it had aged to at an instant, and the degree its cure may start from. */
export function partMaterialsView(db: Db, part: string, atMs: number): PartMaterials {
  const set = findPartMaterials(db, part);
  const records = recordsOfParts(db, [part], atMs);
  const materials = records === null || set === null ? [] : materialLines(db, records, part, set.materials, atMs);
  return {
    part,
    at: isoFromMs(atMs),
    materials,
    aged: materials.length === 0 ? null : furthest(materials.map(({ aged }) => aged)),
    set: set === null ? null : { at: set.at, by: set.by },
  };
}

type Line = PartMaterials['materials'][number];

function materialLines(
  db: Db,
  records: MaterialRecords,
  part: string,
  uses: readonly PartMaterial[],
  atMs: number,
): Line[] {
  const states = partMaterialStates(records, part, atMs);
  return uses.flatMap((use, i) => {
    const state = states[i];
    return state === undefined ? [] : [materialLine(db, records, part, use, state, atMs)];
  });
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
