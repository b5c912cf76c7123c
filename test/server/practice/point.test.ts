import { describe, expect, it } from 'vitest';
import { beginPoint, type Point } from '../../../server/practice/simulator/point.ts';

const COLUMN: Point = {
  toolJPerM2K: 60_000,
  laminateM: 0.001,
  nodes: 1,
  junction: 0,
  position: 1,
  bagM2KPerW: 1e9,
  startDegree: 0,
};
const STARTS_C = 20;
const noReaction = () => 0;

/** Laminate of 1 mm at 1570 kg/m³ and 1000 J/(kg K). */
const LAMINATE_J_PER_M2_K = 1570;

function heatOnRamp(point: Point, h: number, cPerS: number, untilS: number): number {
  const state = beginPoint(point, STARTS_C, noReaction, 0);
  for (let t = 0; t < untilS; t++) state.advance(1, STARTS_C + cPerS * t, STARTS_C + cPerS * (t + 1), h, STARTS_C);
  return state.junctionC;
}

describe('a column heated by air', () => {
  // Lumped capacity on a ramp, T = T0 + r (t − τ (1 − e^(−t/τ))), τ = ρcL/h: Incropera et al., Fundamentals of Heat and
  // Mass Transfer, 6th ed., ch. 5 (the lumped equation, solved for air that rises in a straight line).
  it('lags a ramp by r τ (1 − e^(−t/τ)), as a lump does', () => {
    const h = 40;
    const cPerS = 2 / 60;
    const tauS = (COLUMN.toolJPerM2K + LAMINATE_J_PER_M2_K) / h;
    for (const t of [600, 1500, 4000]) {
      const lagC = cPerS * tauS * (1 - Math.exp(-t / tauS));
      const airC = STARTS_C + cPerS * t;
      expect(Math.abs(heatOnRamp(COLUMN, h, cPerS, t) - (airC - lagC))).toBeLessThan(0.005 * lagC + 0.15);
    }
  });

  it('lags a long ramp by what it must take up each second', () => {
    // In the steady state each body rises at r, so the film passes r (C_tool + C_laminate) and the contact r C_laminate.
    const h = 55;
    const cPerS = 0.02;
    const contact = 8e-4 + 0.0005 / 0.62;
    const lagC = cPerS * ((COLUMN.toolJPerM2K + LAMINATE_J_PER_M2_K) / h + LAMINATE_J_PER_M2_K * contact);
    const t = 30_000;
    expect(heatOnRamp(COLUMN, h, cPerS, t)).toBeCloseTo(STARTS_C + cPerS * t - lagC, 6);
  });

  it('comes to the temperature of the air and stays there', () => {
    const state = beginPoint({ ...COLUMN, laminateM: 0.02, nodes: 4, junction: 3 }, STARTS_C, noReaction, 0);
    for (let t = 0; t < 60_000; t += 5) state.advance(5, 120, 120, 60, STARTS_C);
    expect(state.junctionC).toBeCloseTo(120, 6);
    expect(state.surfaceC).toBeCloseTo(120, 6);
  });

  it('converges with order two in the step', () => {
    const rampedBy = (stepS: number): number => {
      const state = beginPoint({ ...COLUMN, toolJPerM2K: 8000, bagM2KPerW: 0.02 }, STARTS_C, noReaction, 0);
      for (let t = 0; t < 240; t += stepS)
        state.advance(stepS, STARTS_C + 0.1 * t, STARTS_C + 0.1 * (t + stepS), 50, STARTS_C);
      return state.junctionC;
    };
    const exact = rampedBy(0.0625);
    expect(Math.log2((rampedBy(2) - exact) / (rampedBy(1) - exact))).toBeGreaterThan(1.8);
  });

  it('refuses a step too long for its nodes', () => {
    const state = beginPoint({ ...COLUMN, laminateM: 0.004, nodes: 4 }, STARTS_C, noReaction, 0);
    expect(() => state.advance(10, 20, 20, 40, STARTS_C)).toThrow(/too long/);
  });
});

describe('a column that reacts', () => {
  it('keeps all of the heat of reaction where nothing is let out', () => {
    // First law for a closed, adiabatic column: what warms it is what the reaction set free.
    const heatJPerM3 = 2.4e8;
    const point = { ...COLUMN, laminateM: 0.01, toolJPerM2K: 20_000, position: 1e-12, startDegree: 0.05 };
    const state = beginPoint(point, 100, (_, alpha) => 2e-4 * (1 - alpha), heatJPerM3);
    for (let t = 0; t < 20_000; t += 2) state.advance(2, 100, 100, 40, 100);
    const toolC = 2 * state.surfaceC - state.junctionC;
    const takenUp = 20_000 * (toolC - 100) + 1570 * 1000 * 0.01 * (state.junctionC - 100);
    const setFree = heatJPerM3 * 0.01 * (state.degree - 0.05);
    expect(takenUp / setFree).toBeCloseTo(1, 9);
    // First order at a fixed rate: α = 1 − (1 − α0) e^(−kt).
    expect(state.degree).toBeCloseTo(1 - 0.95 * Math.exp(-2e-4 * 20_000), 7);
  });

  it('runs hotter in the middle of a thick column than at its faces', () => {
    const peak = (junction: number): number => {
      const point = { ...COLUMN, laminateM: 0.03, nodes: 5, junction, bagM2KPerW: 0.02, toolJPerM2K: 29_000 };
      const state = beginPoint(point, 120, (_, alpha) => 1e-3 * (1 - alpha), 2.4e8);
      let most = 0;
      for (let t = 0; t < 4000; t += 5) {
        state.advance(5, 120, 120, 80, 20);
        most = Math.max(most, state.junctionC);
      }
      return most;
    };
    expect(peak(2)).toBeGreaterThan(peak(0) + 5);
    expect(peak(2)).toBeGreaterThan(peak(4));
  });
});
