import { DomainError } from '../../models/errors.ts';
import type { PartMaterial } from '../../models/material/ledger.ts';
import type { SetPartMaterialsRequest } from '../contract/materials.ts';
import { appendAudit } from '../store/audit.ts';
import { readEvents, requireItem } from '../store/material-items.ts';
import { findPartMaterials, insertPartMaterials, readRunsAsking } from '../store/part-materials.ts';
import { keepPart } from '../store/parts.ts';
import { deedOf } from './action-parts.ts';
import { changeMaterials, runsOfItems } from './change-materials.ts';
import type { JudgingParts } from './judge-run.ts';

/** Says which rolls and kits a part was laid up from, and judges anew its runs whose cycle asks for their out-life. */
export async function setPartMaterials(
  parts: JudgingParts,
  part: string,
  request: SetPartMaterialsRequest,
): Promise<readonly number[]> {
  const { db } = parts;
  const { reason = null } = request;
  if (findPartMaterials(db, part) !== null && reason === null) {
    throw new DomainError('state-conflict', `What ${part} was laid up from is on record; say why it is set again`, {
      part,
    });
  }
  const materials = request.materials.map(materialOf);
  for (const material of materials) refuseUntrue(parts, part, material);
  const before = findPartMaterials(db, part)?.materials ?? [];
  const items = [...new Set([...before, ...materials].map(({ item }) => item))];
  const others = runsOfItems(items, earliestMs([...before, ...materials]));
  const deed = deedOf(parts);
  let partId = 0;
  return changeMaterials(parts, {
    because: `materials of ${part}`,
    items,
    runs: () => [...new Set([...readRunsAsking(db, partId), ...others(db)])],
    write() {
      partId = keepPart(db, part);
      insertPartMaterials(db, partId, materials, { reason, ...deed });
      const used = materials.map(
        ({ item, laidUpFrom }) => `${item}${laidUpFrom === undefined ? '' : ` ${laidUpFrom}`}`,
      );
      appendAudit(db, {
        ...deed,
        verb: 'set-part-materials',
        subject: `part/${part}`,
        why: reason,
        details: { materials: used.join(', ') },
      });
    },
  });
}

/** From when on another use of an item may be seen in what else was made of it. */
function earliestMs(materials: readonly PartMaterial[]): number {
  return Math.min(...materials.flatMap(({ laidUpFrom }) => (laidUpFrom === undefined ? [] : [Date.parse(laidUpFrom)])));
}

function materialOf({
  item,
  plies,
  laidUpFrom,
  laidUpUntil,
}: SetPartMaterialsRequest['materials'][number]): PartMaterial {
  return {
    item,
    ...(plies == null ? {} : { plies }),
    ...(laidUpFrom == null ? {} : { laidUpFrom }),
    ...(laidUpUntil == null ? {} : { laidUpUntil }),
  };
}

function refuseUntrue(
  { db, clock }: JudgingParts,
  part: string,
  { item, laidUpFrom, laidUpUntil }: PartMaterial,
): void {
  const refuse = (why: string): never => {
    throw new DomainError('event-impossible', `${part}: ${why}`, { part, item });
  };
  if (readEvents(db, requireItem(db, item).id).length === 0) refuse(`${item} was never received or cut`);
  const [from, until] = [laidUpFrom, laidUpUntil].map((at) => (at === undefined ? null : Date.parse(at)));
  if (from == null && until != null) refuse(`the end of laying up ${item} is given and its beginning is not`);
  if (from != null && until != null && until < from) refuse(`laying up ${item} cannot end before it began`);
  if (Math.max(from ?? 0, until ?? 0) > clock()) refuse(`laying up ${item} lies in the future`);
}
