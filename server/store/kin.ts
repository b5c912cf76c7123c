import type { KinKind } from '../contract/trace.ts';
import type { Db } from './database.ts';
import { KEYS_OF, KIN_OF } from './kin-statements.ts';
import { prepared } from './prepared.ts';

/** Runs whose first scan lies from the first instant on and before the second, in ms. */
export interface Span {
  readonly fromMs: number;
  readonly untilMs: number;
}

/** Something a part has: of a kind, told apart by its key, and in words. */
export interface Trait {
  readonly partId: number;
  readonly key: string;
  readonly what: string;
}

/** A part that has something, and the run in which it did; null where it is no matter of runs. */
export interface Kin {
  readonly partId: number;
  readonly key: string;
  readonly run: number | null;
}

/** What these parts have of a kind. */
export function readTraits(db: Db, kind: KinKind, partIds: readonly number[]): Trait[] {
  return prepared<[object], Trait>(db, KEYS_OF[kind]).all({ parts: JSON.stringify(partIds) });
}

/** Every part that has one of these of a kind, with the run it had it in where that began within the span. */
export function readKin(db: Db, kind: KinKind, keys: readonly string[], span: Span): Kin[] {
  if (keys.length === 0) return [];
  return prepared<[object], Kin>(db, KIN_OF[kind]).all({ keys: JSON.stringify(keys), ...span });
}
