import type { MarginEntry } from '../../server/contract/runs.ts';

/** The margin for one part: what belongs to other parts is left out, and its own needs no name. */
export function marginOf(
  margin: readonly MarginEntry[],
  parts: readonly string[],
  part: string | null,
): readonly MarginEntry[] {
  if (part === null || parts.length < 2) return margin;
  return margin.flatMap((entry) => {
    const other = parts.find((name) => entry.text.endsWith(` (${name})`));
    if (other === undefined) return [entry];
    return other === part ? [{ ...entry, text: entry.text.slice(0, -` (${part})`.length) }] : [];
  });
}
