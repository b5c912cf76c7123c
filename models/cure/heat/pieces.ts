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
 * Over a piece of several readings the line keeps the mean and the first moment of the readings' own polygon, so the
 * heat that came in, and when, is kept while the noise is not.
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
  const pieces: Piece[] = [];
  const last = timeS.length - 1;
  let wanted = 0;
  for (let from = 0; from < last; ) {
    let to = from + 1;
    while (to < last && timeS[to]! - timeS[from]! < resolveS) to += 1;
    let startS = timeS[from]!;
    const endS = timeS[to]!;
    while (wanted < atS.length && atS[wanted]! <= startS) wanted += 1;
    const ends: number[] = [];
    for (; wanted < atS.length && atS[wanted]! < endS; wanted += 1) ends.push(atS[wanted]!);
    const lines = faces.map((temperatureK) => straightLine(timeS, temperatureK, from, to));
    for (const end of [...ends, endS]) {
      pieces.push({
        startS,
        endS: end,
        faces: lines.map(({ startK, slopeKPerS }) => ({
          startK: startK + slopeKPerS * (startS - timeS[from]!),
          slopeKPerS,
        })),
      });
      startS = end;
    }
    from = to;
  }
  return pieces;
}

/** The line with the mean and the first moment of a polygon's vertices from one index to another. */
function straightLine(timeS: Float64Array, temperatureK: Float64Array, from: number, to: number) {
  if (temperatureK.length === 0) return { startK: 0, slopeKPerS: 0 };
  const spanS = timeS[to]! - timeS[from]!;
  const middleS = (timeS[to]! + timeS[from]!) / 2;
  let integral = 0;
  let moment = 0;
  for (let i = from; i < to; i += 1) {
    const h = timeS[i + 1]! - timeS[i]!;
    const [k0, k1] = [temperatureK[i]!, temperatureK[i + 1]!];
    const [x0, x1] = [timeS[i]! - middleS, timeS[i + 1]! - middleS];
    integral += (h * (k0 + k1)) / 2;
    moment += (h * (k0 * (2 * x0 + x1) + k1 * (x0 + 2 * x1))) / 6;
  }
  const slopeKPerS = (12 * moment) / spanS ** 3;
  return { startK: integral / spanS - (slopeKPerS * spanS) / 2, slopeKPerS };
}
