/**
 * What is left to react: 1 − α, and nothing once all has.
 *
 * A trial stage of the integrator may look past α = 1; a fractional power of a negative remainder would be NaN there.
 * Only the rate is continued (by zero): a degree above 1 is still refused where the step is accepted.
 */
export function unreacted(alpha: number): number {
  return alpha < 1 ? 1 - alpha : 0;
}
