/**
 * What a pointer finds in a document; `undefined` where there is nothing.
 *
 * Source: RFC 6901, 4.
 */
export function atPointer(document: unknown, pointer: string): unknown {
  let at = document;
  for (const piece of pointer.split('/').slice(1)) {
    const key = piece.replaceAll('~1', '/').replaceAll('~0', '~');
    if (Array.isArray(at)) at = /^(?:0|[1-9]\d*)$/.test(key) ? at[Number(key)] : undefined;
    else if (typeof at === 'object' && at !== null && Object.hasOwn(at, key)) at = (at as Record<string, unknown>)[key];
    else return undefined;
  }
  return at;
}
