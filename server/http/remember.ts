/** Results of one owner kept at a time: a few runs are looked at together, and each may hold tens of MB. */
const MOST_KEPT = 6;

const keptBy = new WeakMap<object, Map<string, unknown>>();

/**
 * The result of `make`, made once while it is among the latest asked for. The key must name everything it is made from,
 * by hash, so that nothing kept can ever be out of date.
 */
export function remember<T>(owner: object, key: string, make: () => T): T {
  const kept = keptBy.get(owner) ?? new Map<string, unknown>();
  keptBy.set(owner, kept);
  const value = kept.has(key) ? (kept.get(key) as T) : make();
  kept.delete(key);
  kept.set(key, value);
  // What could not be made is made anew when it is asked for again; who asked is told by the promise itself.
  if (value instanceof Promise) value.catch(() => kept.delete(key));
  for (const oldest of kept.keys()) {
    if (kept.size <= MOST_KEPT) break;
    kept.delete(oldest);
  }
  return value;
}
