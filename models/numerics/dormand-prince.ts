/** What one step gave: the fifth-order value, an estimate of its error, and the slope there (the next step's first). */
export interface EmbeddedStep {
  value: number;
  error: number;
  slope: number;
}

/**
 * One step of the Dormand–Prince 5(4) pair for a scalar equation dy/dx = f(x, y).
 *
 * Seven stages, the last of which is the first of the next step. The fifth-order value is kept; its distance from the
 * embedded fourth-order value is the error estimate, so the estimate is of the coarser of the two.
 *
 * @param f      Right-hand side.
 * @param x      Start of the step.
 * @param y      Value at `x`.
 * @param h      Length of the step, in the unit of `x`.
 * @param slope  f(x, y), known from the step before.
 * @param into   Filled with the result; nothing is allocated.
 *
 * Accuracy: global order 5, measured in test/models/numerics/dormand-prince.test.ts.
 * Limits: explicit, stable while |h ∂f/∂y| < 3.3 on the negative axis; a non-finite stage shows as a non-finite value.
 * Source: Dormand & Prince, J Comput Appl Math 6 (1980) 19–26; tableau as in Hairer, Nørsett & Wanner, Solving
 *   Ordinary Differential Equations I, 2nd ed., table II.5.2.
 */
export function dormandPrinceStep(
  f: (x: number, y: number) => number,
  x: number,
  y: number,
  h: number,
  slope: number,
  into: EmbeddedStep,
): void {
  const k1 = slope;
  const k2 = f(x + h / 5, y + (h / 5) * k1);
  const k3 = f(x + (3 * h) / 10, y + h * ((3 / 40) * k1 + (9 / 40) * k2));
  const k4 = f(x + (4 * h) / 5, y + h * ((44 / 45) * k1 - (56 / 15) * k2 + (32 / 9) * k3));
  const k5 = f(
    x + (8 * h) / 9,
    y + h * ((19372 / 6561) * k1 - (25360 / 2187) * k2 + (64448 / 6561) * k3 - (212 / 729) * k4),
  );
  const k6 = f(
    x + h,
    y + h * ((9017 / 3168) * k1 - (355 / 33) * k2 + (46732 / 5247) * k3 + (49 / 176) * k4 - (5103 / 18656) * k5),
  );
  into.value = y + h * ((35 / 384) * k1 + (500 / 1113) * k3 + (125 / 192) * k4 - (2187 / 6784) * k5 + (11 / 84) * k6);
  into.slope = f(x + h, into.value);
  into.error =
    h *
    ((71 / 57600) * k1 -
      (71 / 16695) * k3 +
      (71 / 1920) * k4 -
      (17253 / 339200) * k5 +
      (22 / 525) * k6 -
      (1 / 40) * into.slope);
}
