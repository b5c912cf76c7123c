import { describe, expect, it } from 'vitest';
import { AUTOCLAVE_1 } from '../../../server/practice/plan-vessels.ts';
import { beginAir, heatTransferAt } from '../../../server/practice/simulator/air.ts';
import { beginBag } from '../../../server/practice/simulator/bag-line.ts';
import { beginProgramme } from '../../../server/practice/simulator/programme.ts';
import { beginPressure, type PressureProgramme } from '../../../server/practice/simulator/vessel-pressure.ts';

const STEP_S = 5;

describe('the air under its controller', () => {
  it('follows a ramp, overshoots by little and settles on the soak', () => {
    const programme = beginProgramme({ segments: [{ kind: 'ramp', toC: 180, cPerMin: 2 }] }, 20);
    const air = beginAir(AUTOCLAVE_1.physics, 20);
    let most = 0;
    for (let t = 0; t < 4 * 3600; t += STEP_S) {
      programme.advance(STEP_S, air.temperatureC, 20);
      air.advance(STEP_S, programme.setpointC, air.temperatureC, { powered: true, mayCool: false });
      most = Math.max(most, air.temperatureC);
    }
    expect(most).toBeLessThan(184);
    expect(air.temperatureC).toBeCloseTo(180, 1);
  });

  it('cools by its walls alone without power: exponentially, with their time constant', () => {
    const air = beginAir({ ...AUTOCLAVE_1.physics, loadMin: 1e12 }, 20);
    for (let t = 0; t < 7200; t += STEP_S) air.advance(STEP_S, 150, 20, { powered: true, mayCool: false });
    const fromC = air.temperatureC;
    for (let t = 0; t < 3600; t += STEP_S) air.advance(STEP_S, 150, 20, { powered: false, mayCool: false });
    const { lossMin } = AUTOCLAVE_1.physics;
    expect(air.temperatureC).toBeCloseTo(20 + (fromC - 20) * Math.exp(-60 / lossMin), 1);
  });

  it('passes heat as density to the 0.8: 5.3 times as much at 7 bar gauge', () => {
    // Turbulent forced convection at equal velocity, Nu ~ Re^0.8: Incropera et al., 6th ed., ch. 7 (from memory).
    const ratio = heatTransferAt(AUTOCLAVE_1.physics, 7 * 1.013, true) / heatTransferAt(AUTOCLAVE_1.physics, 0, true);
    expect(ratio).toBeCloseTo(8 ** 0.8, 10);
    expect(heatTransferAt(AUTOCLAVE_1.physics, 0, false)).toBeCloseTo(0.25 * AUTOCLAVE_1.physics.hWPerM2K, 10);
  });
});

describe('the programme', () => {
  it('waits with its ramp while the air is behind, and with a guaranteed soak for the lagging part', () => {
    const programme = beginProgramme(
      {
        segments: [
          { kind: 'ramp', toC: 100, cPerMin: 6 },
          { kind: 'soak', minutes: 10, onceLaggingC: 95 },
        ],
        holdBackC: 10,
      },
      20,
    );
    for (let t = 0; t < 3600; t += STEP_S) programme.advance(STEP_S, 20, 20);
    expect(programme.setpointC).toBeLessThan(31);
    for (let t = 0; t < 3600; t += STEP_S) programme.advance(STEP_S, 100, 94.9);
    expect(programme.hasEnded).toBe(false);
    for (let t = 0; t < 605; t += STEP_S) programme.advance(STEP_S, 100, 95);
    expect(programme.hasEnded).toBe(true);
  });
});

describe('a bag line', () => {
  const LINE = { name: 'V1', sourceBar: 0.9, pumpMin: 3, leakPerMin: 0 };
  const pumpFor = (line: typeof LINE, minutes: number, gaugeBar = 0, isVented = false): number => {
    const bag = beginBag(line);
    for (let t = 0; t < minutes * 60; t += STEP_S) {
      bag.advance(STEP_S, t / 60, { powered: true, isVented, leakPerMin: 0, gaugeBar });
    }
    return bag.vacuumBar;
  };

  // A volume pumped through a conductance: p falls as e^(−t/τ). Any vacuum text, e.g. O'Hanlon, A User's Guide to
  // Vacuum Technology (from memory).
  it('is drawn down exponentially', () => {
    expect(pumpFor(LINE, 6)).toBeCloseTo(0.9 * (1 - Math.exp(-6 / 3)), 9);
  });

  it('with a leak settles where the pump takes out what comes in', () => {
    expect(pumpFor({ ...LINE, leakPerMin: 0.1 }, 200)).toBeCloseTo(0.9 / (1 + 0.1 * 3), 9);
  });

  it('reads above atmosphere when vented, leaking and pressed from outside', () => {
    expect(pumpFor({ ...LINE, leakPerMin: 0.1 }, 60, 7, true)).toBeLessThan(-0.003);
    expect(pumpFor(LINE, 60, 7, true)).toBeCloseTo(0, 9);
  });
});

describe('the vessel under gas', () => {
  const PROGRAMME: PressureProgramme = {
    toBar: 7,
    barPerMin: 0.5,
    when: { at: 'lagging-reaches', temperatureC: 60 },
    release: { when: { at: 'hottest-cools-to', temperatureC: 58 }, barPerMin: 0.5 },
  };
  const quiet = { powered: true, lossBarPerMin: 0 };

  it('is filled when the lagging part is warm, at the compressor’s rate, and kept within the dead band', () => {
    const vessel = beginPressure(PROGRAMME);
    const at = (laggingC: number, minutes: number): number => {
      for (let t = 0; t < minutes * 60; t += STEP_S) {
        vessel.advance(STEP_S, { minute: 0, leadingC: 90, laggingC, isCooling: false }, quiet);
      }
      return vessel.gaugeBar;
    };
    expect(at(59.9, 10)).toBe(0);
    // Ten minutes at 0.5 bar/min, less 0.012 bar/min through the seals.
    expect(at(60, 10)).toBeCloseTo(4.88, 2);
    expect(at(120, 60)).toBeGreaterThan(6.93);
    expect(at(120, 60)).toBeLessThanOrEqual(7);
  });

  it('is let down only once the hottest part has cooled', () => {
    const vessel = beginPressure(PROGRAMME);
    const at = (hottestC: number, isCooling: boolean): void => {
      const seen = { minute: 0, leadingC: hottestC, laggingC: hottestC - 5, isCooling };
      for (let t = 0; t < 30 * 60; t += STEP_S) vessel.advance(STEP_S, seen, quiet);
    };
    at(120, false);
    at(58.1, true);
    expect(vessel.gaugeBar).toBeGreaterThan(6.9);
    at(58, true);
    expect(vessel.isReleased).toBe(true);
  });
});
