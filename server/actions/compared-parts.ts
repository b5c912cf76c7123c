import { DomainError } from '../../models/errors.ts';
import type { Compared, CompareQuery } from '../contract/comparison.ts';
import { type ComparablePart, listComparable } from '../store/comparable-parts.ts';
import type { Db } from '../store/database.ts';

/** Beyond this the answer takes longer than somebody waits for; dates or a drawing make it fewer. */
const MOST_PARTS = 3000;

export interface ChosenPart extends ComparablePart {
  readonly failed: boolean;
}

export interface ChosenParts extends Pick<Compared, 'leftOut'> {
  readonly parts: readonly ChosenPart[];
}

/** The parts of a scope, failed and sound. A part that failed a test is never called sound. */
export function chooseParts(db: Db, query: CompareQuery): ChosenParts {
  const within = listComparable(db, {
    drawing: query.drawing ?? null,
    cycle: query.cycle ?? null,
    fromMs: query.from === undefined ? null : Date.parse(query.from),
    untilMs: query.until === undefined ? null : Date.parse(query.until),
  });
  if (within.length > MOST_PARTS) {
    throw new DomainError(
      'invalid-request',
      `${within.length} parts are in scope, ${MOST_PARTS} can be compared; choose a drawing, a cycle or dates`,
      { parts: within.length, atMost: MOST_PARTS },
    );
  }
  const named = query.failed === undefined || query.failed.length === 0 ? null : new Set(query.failed);
  const leftOut: { serial: string; because: string }[] = [];
  const parts = within.flatMap((part): ChosenPart[] => {
    const failed = named === null ? part.hasFailed === 1 : named.has(part.serial);
    if (failed) return [{ ...part, failed }];
    if (part.hasFailed === 1) {
      leftOut.push({ serial: part.serial, because: 'it failed a test and was not chosen' });
      return [];
    }
    if (query.sound === 'passed' && part.hasPassed === 0) {
      leftOut.push({ serial: part.serial, because: 'no passed test of it is on record' });
      return [];
    }
    return [{ ...part, failed }];
  });
  const found = new Set(within.map(({ serial }) => serial));
  for (const serial of named ?? []) {
    if (!found.has(serial)) leftOut.push({ serial, because: 'no run of it lies within the scope' });
  }
  refuseOneSided(parts);
  return { parts, leftOut };
}

function refuseOneSided(parts: readonly ChosenPart[]): void {
  const failed = parts.filter((part) => part.failed).length;
  const sound = parts.length - failed;
  if (failed > 0 && sound > 0) return;
  const lacks = failed === 0 ? 'no failed part' : 'no sound part';
  throw new DomainError('state-conflict', `A comparison needs failed parts and sound ones; ${lacks} is in scope`, {
    failed,
    sound,
  });
}
