/** What goes wrong in a recorder, by the minute of the run. */
export type RecorderMishap =
  | { readonly kind: 'gap'; readonly fromMin: number; readonly untilMin: number }
  | { readonly kind: 'stops'; readonly atMin: number }
  | { readonly kind: 'clock-set-back'; readonly atMin: number; readonly byMin: number }
  /** The record comes in two files that share some minutes. */
  | { readonly kind: 'two-files'; readonly atMin: number; readonly overlapMin: number }
  /** One file, its later piece written first. */
  | { readonly kind: 'pieces-swapped'; readonly atMin: number }
  | { readonly kind: 'heading-again'; readonly atMin: number }
  | { readonly kind: 'last-line-cut' };

/** The scans that were written, in the order and with the stamps they were written with. */
export interface WrittenScans {
  /** Index of each scan in the history's recording instants. */
  readonly order: readonly number[];
  readonly stampMs: readonly number[];
  /** Positions in `order` at which a heading is written again. */
  readonly headingsBefore: readonly number[];
}

/** One list of scans for each file. */
export function writtenScans(
  instantsMs: readonly number[],
  startMs: number,
  mishaps: readonly RecorderMishap[],
): WrittenScans[] {
  const minuteOf = (n: number) => (instantsMs[n]! - startMs) / 60_000;
  const back = mishaps.find((mishap) => mishap.kind === 'clock-set-back');
  const stampOf = (n: number) =>
    instantsMs[n]! - (back !== undefined && minuteOf(n) >= back.atMin ? back.byMin * 60_000 : 0);
  const kept = instantsMs.map((_, n) => n).filter((n) => !mishaps.some((mishap) => isLost(mishap, minuteOf(n))));
  return inFiles(kept, minuteOf, mishaps).map((order) => ({
    order,
    stampMs: order.map(stampOf),
    headingsBefore: mishaps
      .filter((mishap) => mishap.kind === 'heading-again')
      .map(({ atMin }) => order.findIndex((n) => minuteOf(n) >= atMin)),
  }));
}

function isLost(mishap: RecorderMishap, minute: number): boolean {
  if (mishap.kind === 'gap') return minute > mishap.fromMin && minute < mishap.untilMin;
  return mishap.kind === 'stops' && minute > mishap.atMin;
}

function inFiles(kept: number[], minuteOf: (n: number) => number, mishaps: readonly RecorderMishap[]): number[][] {
  for (const mishap of mishaps) {
    if (mishap.kind === 'two-files') {
      return [
        kept.filter((n) => minuteOf(n) <= mishap.atMin + mishap.overlapMin),
        kept.filter((n) => minuteOf(n) >= mishap.atMin),
      ];
    }
    if (mishap.kind === 'pieces-swapped') {
      return [[...kept.filter((n) => minuteOf(n) >= mishap.atMin), ...kept.filter((n) => minuteOf(n) < mishap.atMin)]];
    }
  }
  return [kept];
}
