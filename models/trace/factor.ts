import { DomainError } from '../errors.ts';

/** A part under comparison. */
export interface TracedPart {
  readonly id: string;
  readonly failed: boolean;
}

/** Something every part has a level of: a bag line, a tool, an operator; several where it came from several rolls. */
export interface LevelFactor {
  readonly kind: 'level';
  readonly name: string;
  /** Predicate before the level, in the plural: "were cured on bag line". Default: "have" and the name. */
  readonly says?: string;
  /** One a part, in the order of the parts; null where nothing is on record. */
  readonly values: readonly (string | readonly string[] | null)[];
}

/** Something every part has a number of: a heating rate, a dwell, the age of its roll. */
export interface NumberFactor {
  readonly kind: 'number';
  readonly name: string;
  /** Printed after the numbers; empty for a pure number. */
  readonly unit: string;
  /** Predicates for less and for more: "heated slower" and "heated faster". Default: "have the lower" and the name. */
  readonly says?: { readonly lower: string; readonly higher: string };
  /** One a part, in the order of the parts; null where nothing is on record. */
  readonly values: readonly (number | null)[];
}

export type Factor = LevelFactor | NumberFactor;

/**
 * Refuses parts and factors that cannot be compared.
 *
 * @throws {DomainError} `option-out-of-range` when a part or factor stands twice, no part failed or none is sound, a row is
 *   not as long as the parts, a number is not finite, or a level is empty.
 */
export function refuseIncomparable(parts: readonly TracedPart[], factors: readonly Factor[]): void {
  refuseTwice(
    parts.map(({ id }) => id),
    'part',
  );
  refuseTwice(
    factors.map(({ name }) => name),
    'factor',
  );
  const failed = parts.filter((part) => part.failed).length;
  if (failed === 0 || failed === parts.length) {
    throw new DomainError('option-out-of-range', 'A comparison needs failed parts and sound ones', {
      failed,
      sound: parts.length - failed,
    });
  }
  for (const factor of factors) {
    if (factor.values.length !== parts.length) {
      throw new DomainError('option-out-of-range', `A factor needs one value a part: ${factor.name}`, {
        values: factor.values.length,
        parts: parts.length,
      });
    }
    for (let at = 0; at < parts.length; at += 1) {
      const value = factor.values[at]!;
      if (value === null || isUsable(factor.kind, value)) continue;
      throw new DomainError('option-out-of-range', `Not a ${factor.kind} of ${factor.name}: null is "not on record"`, {
        part: parts[at]!.id,
        value: String(value),
      });
    }
  }
}

function isUsable(kind: Factor['kind'], value: string | readonly string[] | number): boolean {
  if (kind === 'number') return typeof value === 'number' && Number.isFinite(value);
  if (typeof value === 'string') return value !== '';
  return Array.isArray(value) && value.length > 0 && value.every((level) => typeof level === 'string' && level !== '');
}

function refuseTwice(names: readonly string[], what: string): void {
  const seen = new Set<string>();
  for (const name of names) {
    if (seen.has(name)) {
      throw new DomainError('option-out-of-range', `A ${what} stands twice in the comparison: ${name}`, {
        [what]: name,
      });
    }
    seen.add(name);
  }
}
