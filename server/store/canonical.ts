import { createHash } from 'node:crypto';

/**
 * The canonical form of a JSON document: keys in code-unit order at every level, no white space, numbers and strings
 * as ECMAScript writes them. What is equal as data has equal bytes, however it was laid out.
 *
 * Source: RFC 8785, JSON Canonicalization Scheme.
 */
export function canonicalJson(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map((item) => canonicalJson(item ?? null)).join(',')}]`;
  if (typeof value !== 'object' || value === null) return JSON.stringify(value) ?? 'null';
  let members = '';
  // Without a compare function, keys are sorted by code unit.
  for (const key of Object.keys(value).sort()) {
    const member = (value as Readonly<Record<string, unknown>>)[key];
    if (member !== undefined) members += `${members === '' ? '' : ','}${JSON.stringify(key)}:${canonicalJson(member)}`;
  }
  return `{${members}}`;
}

export function sha256OfDocument(document: unknown): string {
  return sha256Of(canonicalJson(document));
}

export function sha256Of(bytes: string | Uint8Array): string {
  return createHash('sha256').update(bytes).digest('hex');
}

/** One hash for several things in order: that of their hashes, a line each. Of one thing it is its own. */
export function oneHash(hashes: readonly string[]): string {
  const [only] = hashes;
  return hashes.length === 1 && only !== undefined ? only : sha256Of(hashes.map((hash) => `${hash}\n`).join(''));
}
