import { DomainError } from '../../models/errors.ts';
import type { SetBatchRequest } from '../contract/materials.ts';
import { appendAudit } from '../store/audit.ts';
import { findBatch, insertBatch } from '../store/batches.ts';
import { requireMaterial } from '../store/materials.ts';
import { deedOf } from './action-parts.ts';
import { changeMaterials, runsOfItems } from './change-materials.ts';
import type { JudgingParts } from './judge-run.ts';

/** Records a maker's lot, or corrects what was said of it; runs that it judges otherwise are judged anew. */
export async function setBatch(parts: JudgingParts, request: SetBatchRequest): Promise<readonly number[]> {
  const { db } = parts;
  const { batch, material, made = null, expires = null, certificate = null, reason = null } = request;
  const known = findBatch(db, batch);
  if (known !== undefined && reason === null) {
    throw new DomainError('already-recorded', `Batch ${batch} is on record already; say why it is corrected`, {
      batch,
    });
  }
  if (made !== null && expires !== null && expires < made) {
    throw new DomainError(
      'event-impossible',
      `Batch ${batch} cannot expire on ${expires}, before it was made on ${made}`,
      {
        batch,
      },
    );
  }
  const { at, by } = deedOf(parts);
  if (made !== null && made > at.slice(0, 10)) {
    throw new DomainError('event-impossible', `Batch ${batch} cannot have been made on ${made}, in the future`, {
      batch,
    });
  }
  const rolls = known?.rolls ?? [];
  return changeMaterials(parts, {
    because: `batch ${batch}`,
    items: rolls,
    runs: runsOfItems(rolls, 0),
    write() {
      const materialId = requireMaterial(db, material.code, material.issue).id;
      insertBatch(db, { batch, materialId, made, expires, certificate, reason, at, by });
      appendAudit(db, {
        at,
        by,
        verb: 'set-batch',
        subject: `batch/${batch}`,
        why: reason,
        details: { material: `${material.code}/${material.issue}`, made, expires, certificate },
      });
    },
  });
}
