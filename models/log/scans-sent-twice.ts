import { cutPieces, type Piece } from './pieces.ts';
import type { RepairList } from './repair-list.ts';
import type { Scans } from './scan-table.ts';

/**
 * Leaves out scans that equal one of another piece in stamp and values, as where files overlap or a recorder sends twice.
 *
 * Equal scans also show that both pieces were written by one clock. So where more of a piece's stamps come again with
 * equal than with other values, the pieces are one: what remains is put in its place among the other's scans, and of two
 * scans of one stamp the first stays. Where fewer do, the equal ones are a quiet vessel seen twice by a clock that was
 * set back, and all stay.
 */
export function leaveOutSentTwice(
  sequence: readonly number[],
  log: Scans,
  timeMs: Float64Array,
  intervalMs: number,
  list: RepairList,
): readonly number[] {
  const firsts = new Set(log.firstOfFile);
  const pieces = cutPieces(sequence, timeMs, intervalMs, (scan) => firsts.has(scan));
  const shared = piecesWithCommonTimes(pieces);
  if (shared.size === 0) return sequence;
  const scansByStamp = new Map<number, { scan: number; piece: number }[]>();
  const groups = pieceGroups(pieces.length);
  const leftOut = new Set<number>();
  const keptFirst = new Set<number>();
  for (const [i, piece] of pieces.entries()) {
    if (!shared.has(i)) continue;
    const equal: number[] = [];
    const different: number[] = [];
    const partners = new Set<number>();
    for (const scan of sequence.slice(piece.from, piece.until)) {
      const others = scansByStamp.get(timeMs[scan]!) ?? [];
      if (others.length === 0) continue;
      const twin = others.find((other) => areEqual(log, scan, other.scan));
      if (twin) partners.add(twin.piece);
      (twin ? equal : different).push(scan);
    }
    if (equal.length > different.length) {
      for (const scan of equal) leftOut.add(scan);
      for (const scan of different) keptFirst.add(scan);
      for (const partner of partners) groups.join(partner, i);
    }
    for (const scan of sequence.slice(piece.from, piece.until)) {
      if (leftOut.has(scan) || keptFirst.has(scan)) continue;
      const there = scansByStamp.get(timeMs[scan]!);
      if (there) there.push({ scan, piece: i });
      else scansByStamp.set(timeMs[scan]!, [{ scan, piece: i }]);
    }
  }
  if (leftOut.size === 0) return sequence;
  list.add(
    'scan-left-out',
    [...leftOut],
    'These scans stand in the log twice, equal in stamp and values; one was left out.',
  );
  list.add('stamp-kept-first', [...keptFirst], KEPT_FIRST);
  const isDropped = (scan: number) => leftOut.has(scan) || keptFirst.has(scan);
  return mergeGroups(sequence, pieces, groups.of, isDropped, timeMs, list);
}

export const KEPT_FIRST = 'These scans have the stamp of another with different values; the first of them was kept.';

export function areEqual(log: Scans, scan: number, other: number): boolean {
  return log.values.every((figures) => Object.is(figures[scan], figures[other]));
}

/** Pieces that have at least an instant in common with another, by index. */
function piecesWithCommonTimes(pieces: readonly Piece[]): Set<number> {
  const order = pieces.map((_, i) => i).sort((a, b) => pieces[a]!.startMs - pieces[b]!.startMs);
  const shared = new Set<number>();
  let latest = -1;
  for (const i of order) {
    if (latest >= 0 && pieces[i]!.startMs <= pieces[latest]!.endMs) shared.add(i).add(latest);
    if (latest < 0 || pieces[i]!.endMs > pieces[latest]!.endMs) latest = i;
  }
  return shared;
}

/** Which pieces belong together; each group is called by its first piece. */
function pieceGroups(count: number) {
  const earlier = Array.from({ length: count }, (_, i) => i);
  const of = (piece: number): number => {
    let first = piece;
    while (earlier[first] !== first) first = earlier[first]!;
    for (let at = piece; at !== first; ) {
      const next = earlier[at]!;
      earlier[at] = first;
      at = next;
    }
    return first;
  };
  const join = (one: number, other: number): void => {
    const first = Math.min(of(one), of(other));
    earlier[of(one)] = first;
    earlier[of(other)] = first;
  };
  return { of, join };
}

/** The scans that stay: pieces of one clock as one, in the order of their stamps, where the first of them stood. */
function mergeGroups(
  sequence: readonly number[],
  pieces: readonly Piece[],
  groupOf: (piece: number) => number,
  isDropped: (scan: number) => boolean,
  timeMs: Float64Array,
  list: RepairList,
): readonly number[] {
  const merged = pieces.map((): number[] => []);
  for (const [i, piece] of pieces.entries()) {
    const group = merged[groupOf(i)]!;
    for (const scan of sequence.slice(piece.from, piece.until)) if (!isDropped(scan)) group.push(scan);
  }
  const result: number[] = [];
  for (const group of merged) {
    const sorted = group.toSorted((a, b) => timeMs[a]! - timeMs[b]! || a - b);
    const moved = sorted.filter((scan, place) => scan !== group[place]);
    list.add('pieces-put-in-order', moved, 'These scans stood out of order; their stamps put them in their place.');
    for (const scan of sorted) result.push(scan);
  }
  return result;
}
