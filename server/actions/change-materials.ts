import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import { refuseImpossible } from '../../models/material/refuse-impossible.ts';
import type { Db } from '../store/database.ts';
import { foresee } from '../store/foresee.ts';
import { readDescendants, readFamily, requireItem } from '../store/material-items.ts';
import { recordsOfItems } from '../store/material-records.ts';
import { readRunsTouched } from '../store/part-materials.ts';
import { evaluateInputs, type JudgingParts, writeEvaluation } from './judge-run.ts';
import { gatherInputs } from './run-inputs.ts';

/** A change of what is known of material, foreseen before it is written. */
export interface MaterialChange {
  /** Why runs are judged anew: `ledger of K-17`. */
  readonly because: string;
  /** Rolls and kits whose ledger it touches, once it is written. */
  readonly items: readonly string[];
  /** Runs it may judge otherwise, once it is written. */
  readonly runs: (db: Db) => readonly number[];
  readonly write: () => void;
}

/**
 * Writes a change of what is known of material, and judges anew every run that it judges otherwise, all in one
 * transaction. Nothing is written where a ledger could then not be true.
 *
 * @returns the runs that were judged anew.
 */
export async function changeMaterials(parts: JudgingParts, change: MaterialChange): Promise<readonly number[]> {
  const { db } = parts;
  const foreseen = foresee(db, change.write, () => {
    refuseImpossibleLedgers(parts, change.items);
    return change.runs(db).flatMap((run) => {
      const inputs = gatherInputs(db, run);
      return inputs === null ? [] : [{ run, inputs }];
    });
  });
  const touched = foreseen.filter(
    ({ run, inputs }) => gatherInputs(db, run)?.hashes.materials !== inputs.hashes.materials,
  );
  const judged: ((typeof touched)[number] & { readonly document: Evaluation })[] = [];
  for (const one of touched) judged.push({ ...one, document: await evaluateInputs(parts, one.inputs) });
  db.transaction(() => {
    change.write();
    for (const { run, inputs, document } of judged) writeEvaluation(parts, run, change.because, inputs, document);
  }).immediate();
  return touched.map(({ run }) => run);
}

/** Judged runs whose load holds something laid up from these items or what was cut from them, since an instant. */
export function runsOfItems(items: readonly string[], sinceMs: number): MaterialChange['runs'] {
  return (db) => {
    const ids = readDescendants(
      db,
      items.map((item) => requireItem(db, item).id),
    ).map(({ id }) => id);
    return readRunsTouched(db, ids, sinceMs);
  };
}

function refuseImpossibleLedgers({ db, clock }: JudgingParts, items: readonly string[]): void {
  const ids = items.map((item) => requireItem(db, item).id);
  refuseImpossible(recordsOfItems(db, readFamily(db, ids)), clock());
}
