/** What is to be drawn of a resin set: strips above each other over one axis. Two sets are told apart by weight and dash. */

/** The set of the page is strong, the one beside it dashed; `given` is what both share; `light` one curve of several. */
export type Weight = 'first' | 'second' | 'given' | 'light';

export interface PlotStrip {
  readonly id: string;
  readonly title: string;
  /** px. */
  readonly height: number;
  readonly scale: 'linear' | 'logarithmic';
  readonly low: number;
  readonly high: number;
  readonly ticks: readonly number[];
  readonly tickText: (value: number) => string;
}

export interface PlotCourse {
  readonly strip: string;
  readonly weight: Weight;
  /** At the course's end; empty where a mark names it. */
  readonly name: string;
  /** In the readout and the table, where the strip is not seen. */
  readonly longName: string;
  readonly x: ArrayLike<number>;
  /** NaN where the course breaks. */
  readonly y: ArrayLike<number>;
  readonly text: (value: number) => string;
}

export interface PlotMark {
  readonly strip: string;
  readonly weight: Weight;
  /** `none`: only its words. */
  readonly shape: 'dot' | 'diamond' | 'square' | 'triangle' | 'cross' | 'none';
  readonly x: number;
  readonly y: number;
  readonly text: string;
  /** Where its words stand; over a mark of shape `none`. */
  readonly side: 'left' | 'right';
}

/** A stretch along the foot of a strip, hatched; each set has its own row. */
export interface PlotRail {
  readonly strip: string;
  readonly row: number;
  readonly fromX: number;
  readonly untilX: number;
}

export interface ResinPlot {
  readonly low: number;
  readonly high: number;
  /** Under the axis, at its end. */
  readonly title: string;
  /** The greatest number of ticks is given by the room. */
  readonly ticks: (most: number) => readonly { readonly value: number; readonly text: string }[];
  /** Where the cursor stands, in words. */
  readonly textAt: (x: number) => string;
  readonly strips: readonly PlotStrip[];
  readonly courses: readonly PlotCourse[];
  readonly marks: readonly PlotMark[];
  readonly rails: readonly PlotRail[];
  /** The picture in words. */
  readonly words: string;
}

/** What a course shows at a place, straight between its points; null where it is broken or not there. */
export function courseAt({ x, y }: Pick<PlotCourse, 'x' | 'y'>, at: number): number | null {
  let low = 0;
  let high = x.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((x[middle] ?? 0) < at) low = middle + 1;
    else high = middle;
  }
  const [x1, y1] = [x[low], y[low]];
  if (x1 === at && y1 !== undefined && Number.isFinite(y1)) return y1;
  const [x0, y0] = [x[low - 1], y[low - 1]];
  if (x0 === undefined || x1 === undefined || y0 === undefined || y1 === undefined) return null;
  const value = y0 + ((y1 - y0) * (at - x0)) / (x1 - x0);
  return Number.isFinite(value) ? value : null;
}
