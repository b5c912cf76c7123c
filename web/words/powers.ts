const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** Powers of ten from `low` to `high`, both above 0. */
export function powersWithin(low: number, high: number): number[] {
  const powers: number[] = [];
  for (let n = Math.ceil(Math.log10(low) - 1e-9); n <= Math.log10(high) + 1e-9; n += 1) powers.push(10 ** n);
  return powers;
}

/** `10⁻³`, and `0.1`, `1`, `10`, `100` as they are. */
export function powerText(value: number): string {
  const power = Math.round(Math.log10(value));
  if (power >= -1 && power <= 2) return String(Number(value.toPrecision(1)));
  const digits = [...String(Math.abs(power))].map((digit) => RAISED[Number(digit)]).join('');
  return `10${power < 0 ? '⁻' : ''}${digits}`;
}

/** Three digits, as `4.53 × 10⁻⁵` where that is shorter. */
export function scientific(value: number, digits = 3): string {
  if (value === 0 || (Math.abs(value) >= 0.001 && Math.abs(value) < 1e5)) {
    return String(Number(value.toPrecision(digits))).replace('-', '\u2212');
  }
  const power = Math.floor(Math.log10(Math.abs(value)));
  const mantissa = (value / 10 ** power).toPrecision(digits).replace('-', '\u2212');
  const raised = [...String(Math.abs(power))].map((digit) => RAISED[Number(digit)]).join('');
  return `${mantissa}\u00a0×\u00a010${power < 0 ? '⁻' : ''}${raised}`;
}
