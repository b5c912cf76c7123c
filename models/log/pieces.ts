/** Scans that follow each other without a step back or a long step forward: places `from` to before `until` of a sequence. */
export interface Piece {
  readonly from: number;
  readonly until: number;
  readonly startMs: number;
  readonly endMs: number;
}

/** A step forward of more than this many intervals cuts a sequence into pieces. */
const LONG_STEP_INTERVALS = 5;

/** Cuts a sequence of scans at every step back and every long step forward, and where `cutsBefore` says so. */
export function cutPieces(
  sequence: readonly number[],
  timeMs: Float64Array,
  intervalMs: number,
  cutsBefore: (scan: number) => boolean = () => false,
): Piece[] {
  const pieces: Piece[] = [];
  let from = 0;
  for (let place = 1; place <= sequence.length; place++) {
    if (place < sequence.length) {
      const stepMs = timeMs[sequence[place]!]! - timeMs[sequence[place - 1]!]!;
      const isCut = stepMs < 0 || stepMs > LONG_STEP_INTERVALS * intervalMs || cutsBefore(sequence[place]!);
      if (!isCut) continue;
    }
    pieces.push({ from, until: place, startMs: timeMs[sequence[from]!]!, endMs: timeMs[sequence[place - 1]!]! });
    from = place;
  }
  return pieces;
}

/** Pieces by their start, then their end. */
export function byStart(a: Piece, b: Piece): number {
  return a.startMs - b.startMs || a.endMs - b.endMs;
}

/** Whether any two pieces have more than an instant in common. */
export function doOverlap(pieces: readonly Piece[]): boolean {
  const sorted = pieces.toSorted(byStart);
  let latestMs = Number.NEGATIVE_INFINITY;
  for (const { startMs, endMs } of sorted) {
    if (startMs < latestMs) return true;
    latestMs = Math.max(latestMs, endMs);
  }
  return false;
}

/** Median of the steps forward from scan to scan; where there are none, of the steps back; 0 where all stamps are equal. */
export function medianIntervalMs(sequence: readonly number[], timeMs: Float64Array): number {
  const forward: number[] = [];
  const back: number[] = [];
  for (let place = 1; place < sequence.length; place++) {
    const stepMs = timeMs[sequence[place]!]! - timeMs[sequence[place - 1]!]!;
    if (stepMs > 0) forward.push(stepMs);
    else if (stepMs < 0) back.push(-stepMs);
  }
  const steps = Float64Array.from(forward.length > 0 ? forward : back).sort();
  return steps[(steps.length - 1) >> 1] ?? 0;
}
