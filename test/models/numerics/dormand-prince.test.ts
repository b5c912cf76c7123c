import { describe, expect, it } from 'vitest';
import { dormandPrinceStep, type EmbeddedStep } from '../../../models/numerics/dormand-prince.ts';

const falling = (x: number, y: number) => -y * Math.cos(x);

function integrate(f: (x: number, y: number) => number, y0: number, toX: number, steps: number): number {
  const step: EmbeddedStep = { value: y0, error: 0, slope: f(0, y0) };
  const h = toX / steps;
  for (let i = 0; i < steps; i += 1) dormandPrinceStep(f, i * h, step.value, h, step.slope, step);
  return step.value;
}

describe('dormandPrinceStep', () => {
  it('converges with order five', () => {
    // y' = −y cos x, y(0) = 1: y = exp(−sin x).
    const errorAt = (steps: number) => Math.abs(integrate(falling, 1, 3, steps) - Math.exp(-Math.sin(3)));
    expect(Math.log2(errorAt(20) / errorAt(40))).toBeGreaterThan(4.8);
    expect(errorAt(160)).toBeLessThan(1e-10);
  });

  it('is exact for a polynomial of degree five, and its estimate for one of degree four', () => {
    const step: EmbeddedStep = { value: 0, error: 1, slope: 0 };
    dormandPrinceStep((x) => 5 * x ** 4, 0, 0, 2, 0, step);
    expect(step.value).toBeCloseTo(32, 12);
    dormandPrinceStep((x) => 4 * x ** 3, 0, 0, 2, 0, step);
    expect(step.error).toBeCloseTo(0, 12);
  });

  it('estimates an error that falls with the fifth power of the step', () => {
    const errorOf = (h: number) => {
      const step: EmbeddedStep = { value: 0, error: 0, slope: 0 };
      dormandPrinceStep(falling, 0, 1, h, falling(0, 1), step);
      return Math.abs(step.error);
    };
    expect(Math.log2(errorOf(0.2) / errorOf(0.1))).toBeGreaterThan(4.7);
  });

  it('hands the slope at the end on to the next step', () => {
    const step: EmbeddedStep = { value: 0, error: 0, slope: 0 };
    dormandPrinceStep(falling, 0, 1, 0.3, -1, step);
    expect(step.slope).toBe(falling(0.3, step.value));
  });
});
