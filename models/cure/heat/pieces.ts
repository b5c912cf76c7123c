/** A stretch of time over which the temperatures outside run straight. */
export interface Piece {
  readonly startS: number;
  readonly endS: number;
  /** One for each face: temperature at the start in K and its slope in K/s. */
  readonly faces: readonly { readonly startK: number; readonly slopeKPerS: number }[];
}

/**
 * A history cut into straight pieces of at least `resolveS` (or one interval, where the history is coarser).
 *
 * Where several readings make a piece, its ends are the means of the readings' polygon over half a piece to either side:
 * a ramp stays where it is and the noise of the recorder is evened out. Ends beside a piece of one interval, and those of
 * the history, are as read.
 *
 * @param timeS    Times of the history: [n] in s, rising.
 * @param faces    Temperatures: [n] in K for each face; empty where a face meets none.
 * @param atS      Moments at which a piece must end, rising.
 * @param resolveS Length that need not be resolved, s.
 */
export function cutPieces(
  timeS: Float64Array,
  faces: readonly Float64Array[],
  atS: Float64Array,
  resolveS: number,
): Piece[] {
  const ends = pieceEnds(timeS, resolveS);
  const endsK = faces.map((temperatureK) =>
    ends.map((_, k) => (temperatureK.length === 0 ? 0 : evenedOut(timeS, temperatureK, ends, k))),
  );
  const pieces: Piece[] = [];
  let wanted = 0;
  for (let k = 1; k < ends.length; k += 1) {
    const fromS = timeS[ends[k - 1]!]!;
    const toS = timeS[ends[k]!]!;
    const lines = endsK.map((at) => ({ startK: at[k - 1]!, slopeKPerS: (at[k]! - at[k - 1]!) / (toS - fromS) }));
    while (wanted < atS.length && atS[wanted]! <= fromS) wanted += 1;
    let startS = fromS;
    for (; startS < toS; ) {
      const endS = wanted < atS.length && atS[wanted]! < toS ? atS[wanted]! : toS;
      if (endS < toS) wanted += 1;
      const sinceS = startS - fromS;
      pieces.push({
        startS,
        endS,
        faces: lines.map(({ startK, slopeKPerS }) => ({ startK: startK + slopeKPerS * sinceS, slopeKPerS })),
      });
      startS = endS;
    }
  }
  return pieces;
}

/** Indices of the readings at which pieces end, the first and the last among them. */
function pieceEnds(timeS: Float64Array, resolveS: number): number[] {
  const ends = [0];
  const last = timeS.length - 1;
  for (let from = 0; from < last; ) {
    let to = from + 1;
    while (to < last && timeS[to]! - timeS[from]! < resolveS) to += 1;
    ends.push(to);
    from = to;
  }
  return ends;
}

/** Temperature at the k-th end of a piece. */
function evenedOut(timeS: Float64Array, temperatureK: Float64Array, ends: readonly number[], k: number): number {
  const end = ends[k]!;
  if (k === 0 || k === ends.length - 1) return temperatureK[end]!;
  const [before, after] = [ends[k - 1]!, ends[k + 1]!];
  if (end - before === 1 || after - end === 1) return temperatureK[end]!;
  const halfS = Math.min(timeS[end]! - timeS[before]!, timeS[after]! - timeS[end]!) / 2;
  const [fromS, toS] = [timeS[end]! - halfS, timeS[end]! + halfS];
  let integral = 0;
  for (let i = before; i < after; i += 1) {
    const [s0, s1] = [Math.max(fromS, timeS[i]!), Math.min(toS, timeS[i + 1]!)];
    if (s1 <= s0) continue;
    const at = (s: number) =>
      temperatureK[i]! + ((temperatureK[i + 1]! - temperatureK[i]!) * (s - timeS[i]!)) / (timeS[i + 1]! - timeS[i]!);
    integral += ((s1 - s0) * (at(s0) + at(s1))) / 2;
  }
  return integral / (2 * halfS);
}
