import { describe, expect, it } from 'vitest';
import { correctionAt } from '../../../models/run/channel.ts';
import { beginRandom } from '../../../server/practice/simulator/random.ts';
import { indicationOf, type SensorFault } from '../../../server/practice/simulator/sensor-faults.ts';

function indicated(fault: SensorFault, minute: number, junctionC: number, airC = 0): number {
  return indicationOf([fault], 'TC1', beginRandom(1))(minute, junctionC, airC);
}

describe('a thermocouple that lies', () => {
  it('says nothing while it is open, and the truth before', () => {
    const fault: SensorFault = { kind: 'open', channel: 'TC1', fromMin: 10, untilMin: 20 };
    expect(indicated(fault, 9.9, 80)).toBe(80);
    expect(indicated(fault, 10, 80)).toBeNaN();
    expect(indicated(fault, 20, 80)).toBe(80);
  });

  it('mirrors the temperature about its terminals where it is reversed', () => {
    const fault: SensorFault = { kind: 'reversed', channel: 'TC1' };
    expect(indicated(fault, 0, 23)).toBe(23);
    expect(indicated(fault, 0, 180)).toBe(23 - 157);
  });

  it('holds its last reading where it is stuck', () => {
    const read = indicationOf([{ kind: 'stuck', channel: 'TC1', fromMin: 5 }], 'TC1', beginRandom(1));
    expect([read(4, 60, 0), read(5, 61, 0), read(90, 170, 0)]).toEqual([60, 61, 61]);
  });

  it('shows the air once it has fallen off, and the other scale where its input is set wrong', () => {
    expect(indicated({ kind: 'in-the-air', channel: 'TC1', fromMin: 3 }, 3, 80, 131)).toBe(131);
    expect(indicated({ kind: 'wrong-unit', channel: 'TC1', written: '°F' }, 0, 100)).toBe(212);
    expect(indicated({ kind: 'wrong-unit', channel: 'TC1', written: '°C' }, 0, 212)).toBe(100);
  });

  it('jumps in one scan of about twelve, by 25 to 55 °C, and only while its strand is broken', () => {
    const read = indicationOf([{ kind: 'jumping', channel: 'TC1', fromMin: 0, untilMin: 1e9 }], 'TC1', beginRandom(3));
    const jumps = Array.from({ length: 5000 }, () => Math.abs(read(1, 100, 0) - 100)).filter((jump) => jump > 0);
    expect(jumps.length / 5000).toBeCloseTo(0.08, 1);
    expect(Math.min(...jumps)).toBeGreaterThan(25);
    expect(Math.max(...jumps)).toBeLessThan(55);
    expect(read(2e9, 100, 0)).toBe(100);
  });

  it('leaves its neighbours alone', () => {
    const read = indicationOf([{ kind: 'offset', channel: 'TC2', byC: -9 }], 'TC1', beginRandom(1));
    expect(read(0, 50, 0)).toBe(50);
  });
});

describe('correctionAt', () => {
  it('is straight between the points and held beyond the ends', () => {
    const points = [
      [100, -0.4],
      [180, -0.8],
    ] as const;
    expect([20, 100, 140, 180, 300].map((reading) => correctionAt(reading, points))).toEqual([
      -0.4,
      -0.4,
      expect.closeTo(-0.6, 12),
      -0.8,
      -0.8,
    ]);
    expect(correctionAt(50, [])).toBe(0);
  });
});
