import { DomainError } from '../errors.ts';
import { byStart, cutPieces, doOverlap, type Piece } from './pieces.ts';
import { placeOf, type RepairList } from './repair-list.ts';
import type { Scans } from './scan-table.ts';

const DAY_MS = 86_400_000;
/** Nobody sets a clock back more often in one run. */
const MOST_STEPS_BACK = 20;

/**
 * Puts right the steps back of a log: pieces that stand out of order are put in order; otherwise the clock was set back,
 * and what makes the next stamp follow the latest by one median interval is added from there on.
 *
 * A clock was set back only where the stamps behind the step contradict those before it: two scans of different pieces
 * less than half an interval apart. Stamps that fall between the others may as well be a piece out of order, and then
 * nothing tells which it was.
 *
 * @returns the scans in their order. Adds to `timeMs` in place.
 * @throws {DomainError} `log-time-ambiguous` where a clock set back cannot be told from pieces out of order.
 */
export function mendStepsBack(
  sequence: readonly number[],
  log: Scans,
  timeMs: Float64Array,
  intervalMs: number,
  files: readonly string[],
  list: RepairList,
): readonly number[] {
  const pieces = cutPieces(sequence, timeMs, intervalMs);
  const stepsBack = pieces.filter((piece, i) => i > 0 && piece.startMs < pieces[i - 1]!.endMs);
  const nextStepBack = new Map(stepsBack.map((piece, i) => [piece, stepsBack[i + 1]]));
  if (stepsBack.length === 0) return sequence;
  if (!doOverlap(pieces)) return putInOrder();
  if (stepsBack.length > MOST_STEPS_BACK) throw ambiguous(stepsBack[0]!);
  addWhatWasTaken();
  return sequence;

  function putInOrder(): readonly number[] {
    const sorted = pieces.toSorted(byStart);
    const lengthMs = sorted.reduce((sum, { startMs, endMs }) => sum + endMs - startMs, 0);
    const stoodBehind = new Map(pieces.map((piece, i) => [piece, pieces[i - 1]]));
    for (const [i, piece] of sorted.entries()) {
      const before = sorted[i - 1];
      if (!before || before === stoodBehind.get(piece)) continue;
      // A pause longer than the log, made by the order alone: rather a clock that had lost its date.
      if (piece.startMs - before.endMs > Math.max(DAY_MS, lengthMs)) throw ambiguous(stepsBack[0]!);
    }
    const inOrder = sorted.flatMap((piece) => sequence.slice(piece.from, piece.until));
    const moved = sorted.flatMap((piece, i) => (piece === pieces[i] ? [] : sequence.slice(piece.from, piece.until)));
    list.add('pieces-put-in-order', moved, 'The log stands in pieces out of order; their stamps put them in order.');
    return inOrder;
  }

  function addWhatWasTaken(): void {
    let addedMs = 0;
    let latestMs = Number.NEGATIVE_INFINITY;
    const earlier: number[] = [];
    for (const piece of pieces) {
      if (nextStepBack.has(piece)) {
        if (!contradicts(piece, addedMs, earlier)) throw ambiguous(piece);
        const moreMs = latestMs + intervalMs - (piece.startMs + addedMs);
        addedMs += moreMs;
        const before = nextStepBack.get(piece)?.from ?? sequence.length;
        const because = `The clock was set back here by ${spoken(moreMs)}; ${spoken(addedMs)} are added from here on.`;
        list.add('clock-set-back', sequence.slice(piece.from, before), because);
      }
      for (const scan of sequence.slice(piece.from, piece.until)) {
        latestMs = timeMs[scan]! + addedMs;
        timeMs[scan] = latestMs;
        earlier.push(latestMs);
      }
    }
  }

  /** Whether a piece, as its clock has it, puts a scan where there is one already. */
  function contradicts(piece: Piece, addedMs: number, earlier: readonly number[]): boolean {
    for (const scan of sequence.slice(piece.from, piece.until)) {
      const at = timeMs[scan]! + addedMs;
      const place = firstNotBefore(earlier, at);
      if (place === 0 || place === earlier.length) continue;
      if (Math.min(at - earlier[place - 1]!, earlier[place]! - at) <= intervalMs / 2) return true;
    }
    return false;
  }

  function ambiguous(piece: Piece): DomainError {
    const { file, line } = placeOf(log, files, sequence[piece.from]!);
    return new DomainError(
      'log-time-ambiguous',
      `${file}, line ${line}: the time steps back, and nothing tells whether the clock was set back or the lines stand out ` +
        'of order. Take the log apart into files that each run forward.',
      { file, line },
    );
  }
}

/** First place of rising times whose time is at or after `at`. */
function firstNotBefore(times: readonly number[], at: number): number {
  let low = 0;
  let high = times.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (times[middle]! < at) low = middle + 1;
    else high = middle;
  }
  return low;
}

function spoken(durationMs: number): string {
  const seconds = Math.round(durationMs / 1000);
  const parts = [
    [Math.floor(seconds / 3600), 'h'],
    [Math.floor(seconds / 60) % 60, 'min'],
    [seconds % 60, 's'],
  ] as const;
  const said = parts.filter(([figure]) => figure > 0).map(([figure, unit]) => `${figure} ${unit}`);
  return said.join(' ') || `${durationMs} ms`;
}
