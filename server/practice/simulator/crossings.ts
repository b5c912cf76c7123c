/** Values at equal steps from minute 0. */
export interface Row {
  readonly values: Float64Array;
  readonly stepMin: number;
}

/** First minute at or after `fromMin` at which the row rises to a level; null where it never does. */
export function nextUp(row: Row, to: number, fromMin: number): number | null {
  return next(row, fromMin, (before, after) => before < to && after >= to, to);
}

/** First minute at or after `fromMin` at which the row falls below a level. */
export function nextDown(row: Row, to: number, fromMin: number): number | null {
  return next(row, fromMin, (before, after) => before >= to && after < to, to);
}

/** Last minute between the two at which the row rises to a level. */
export function lastUp(row: Row, to: number, fromMin: number, untilMin: number): number | null {
  let found: number | null = null;
  for (let at = nextUp(row, to, fromMin); at !== null && at <= untilMin; at = nextUp(row, to, at + row.stepMin)) {
    found = at;
  }
  return found;
}

/** Straight between the steps. */
export function level({ values, stepMin }: Row, minute: number): number {
  const at = Math.min(values.length - 1, Math.max(0, minute / stepMin));
  const below = Math.min(values.length - 2, Math.floor(at));
  return values[below]! + (values[below + 1]! - values[below]!) * (at - below);
}

function next(
  { values, stepMin }: Row,
  fromMin: number,
  crosses: (before: number, after: number) => boolean,
  to: number,
): number | null {
  for (let n = Math.max(1, Math.ceil(fromMin / stepMin)); n < values.length; n++) {
    const before = values[n - 1]!;
    const after = values[n]!;
    if (crosses(before, after)) return (n - 1 + (to - before) / (after - before)) * stepMin;
  }
  return null;
}
