import { DomainError } from '../errors.ts';

/** What one run of letters of a pattern stands for. */
export const STAMP_FIELDS = [
  'year',
  'month',
  'day',
  'hour-0-23',
  'hour-1-24',
  'hour-0-11',
  'hour-1-12',
  'half-day',
  'minute',
  'second',
  'fraction',
  'offset',
] as const;
export type StampField = (typeof STAMP_FIELDS)[number];

export type PatternElement =
  | { readonly field: StampField; readonly letters: string; readonly abutsNext: boolean }
  | { readonly field: null; readonly literal: string };

const FIELD_BY_LETTER: Readonly<Record<string, StampField>> = {
  y: 'year',
  u: 'year',
  M: 'month',
  L: 'month',
  d: 'day',
  H: 'hour-0-23',
  k: 'hour-1-24',
  K: 'hour-0-11',
  h: 'hour-1-12',
  a: 'half-day',
  m: 'minute',
  s: 'second',
  S: 'fraction',
  X: 'offset',
  x: 'offset',
  Z: 'offset',
};

/**
 * Takes a date pattern apart: `dd/MM/yyyy HH:mm:ss` and its like.
 *
 * @throws {DomainError} `document-wrong-value` at `path` when a letter is unknown, a field is missing or written twice.
 * Source: Unicode TR 35 part 4, Date Format Patterns.
 */
export function parsePattern(pattern: string, path: string): readonly PatternElement[] {
  const elements: PatternElement[] = [];
  for (let at = 0; at < pattern.length; ) {
    const character = pattern[at]!;
    if (/[A-Za-z]/.test(character)) {
      const letters = new RegExp(`^${character}+`).exec(pattern.slice(at))![0];
      const field = FIELD_BY_LETTER[character];
      if (!field || letters.length > mostLetters(field)) refusePattern(path, pattern, `"${letters}" is not read here`);
      at += letters.length;
      elements.push({ field, letters, abutsNext: /[A-Za-z]/.test(pattern[at] ?? '') });
    } else {
      const [literal, next] = literalAt(pattern, at, path);
      const isMoreSpace = literal === ' ' && elements.at(-1)?.field === null && pattern[at - 1] === ' ';
      if (!isMoreSpace) elements.push({ field: null, literal });
      at = next;
    }
  }
  checkFields(elements, pattern, path);
  return elements;
}

function mostLetters(field: StampField): number {
  return { year: 4, month: 4, fraction: 9, offset: 5 }[field as string] ?? 2;
}

/** One literal character or quoted text, and where it ends. `''` is an apostrophe. */
function literalAt(pattern: string, from: number, path: string): [string, number] {
  if (pattern[from] !== "'") return [pattern[from]!, from + 1];
  if (pattern[from + 1] === "'") return ["'", from + 2];
  const quoted = /^'((?:[^']|'')+)'/.exec(pattern.slice(from));
  if (!quoted) return refusePattern(path, pattern, 'a quote is not closed');
  return [quoted[1]!.replaceAll("''", "'"), from + quoted[0].length];
}

function checkFields(elements: readonly PatternElement[], pattern: string, path: string): void {
  const fields = elements.flatMap((element) => (element.field ? [element.field] : []));
  const hours = fields.filter((field) => field.startsWith('hour'));
  const twelve = hours.some((hour) => hour === 'hour-0-11' || hour === 'hour-1-12');
  for (const field of STAMP_FIELDS) {
    if (fields.filter((one) => one === field).length > 1) refusePattern(path, pattern, `the ${field} stands twice`);
  }
  for (const field of ['year', 'month', 'day', 'minute'] as const) {
    if (!fields.includes(field)) refusePattern(path, pattern, `the ${field} is missing`);
  }
  if (hours.length !== 1) refusePattern(path, pattern, 'exactly one of H, k, h, K must give the hour');
  if (twelve !== fields.includes('half-day')) refusePattern(path, pattern, 'h or K goes with a, H or k without');
  if (fields.includes('fraction') && !fields.includes('second')) refusePattern(path, pattern, 'S goes with s');
  for (const element of elements) {
    if (element.field && element.abutsNext && element.letters.length === 1 && isNumeric(element)) {
      refusePattern(path, pattern, `"${element.letters}" right before another field could have one digit or two`);
    }
  }
}

function isNumeric({ field, letters }: { field: StampField; letters: string }): boolean {
  return field !== 'half-day' && field !== 'offset' && !(field === 'month' && letters.length > 2);
}

function refusePattern(path: string, pattern: string, why: string): never {
  throw new DomainError('document-wrong-value', `${path} is "${pattern}": ${why} (letters of Unicode TR 35)`, {
    key: path,
    pattern,
  });
}
