import { describe, expect, it } from 'vitest';
import { cutPieces } from '../../../../models/cure/heat/pieces.ts';

const none = new Float64Array(0);

describe('cutPieces', () => {
  it('keeps a coarse history as it is, and ends where it is asked to', () => {
    const timeS = Float64Array.of(0, 100, 400);
    const pieces = cutPieces(timeS, [Float64Array.of(300, 350, 320), none], Float64Array.of(0, 50, 100, 250), 30);
    expect(pieces.map(({ startS, endS }) => [startS, endS])).toEqual([
      [0, 50],
      [50, 100],
      [100, 250],
      [250, 400],
    ]);
    expect(pieces.map(({ faces }) => faces[0])).toEqual([
      { startK: 300, slopeKPerS: 0.5 },
      { startK: 325, slopeKPerS: 0.5 },
      { startK: 350, slopeKPerS: -0.1 },
      { startK: 335, slopeKPerS: -0.1 },
    ]);
  });

  it('leaves a ramp where it is and evens out what alternates', () => {
    const timeS = Float64Array.from({ length: 301 }, (_, i) => i);
    const ramp = timeS.map((s) => 300 + 0.03 * s);
    const noisy = ramp.map((k, i) => k + (i % 2 === 0 ? 1 : -1));
    const pieces = cutPieces(timeS, [ramp, noisy], none, 30);
    expect(pieces).toHaveLength(10);
    for (const [k, { startS, faces }] of pieces.entries()) {
      expect(faces[0]!.startK).toBeCloseTo(300 + 0.03 * startS, 10);
      expect(faces[0]!.slopeKPerS).toBeCloseTo(0.03, 10);
      if (k > 0) expect(Math.abs(faces[1]!.startK - faces[0]!.startK)).toBeLessThan(0.04);
    }
  });

  it('hands on without a jump', () => {
    const timeS = Float64Array.from({ length: 1001 }, (_, i) => i * (1 + (i % 3)));
    const rising = timeS.toSorted();
    const strictly = rising.map((s, i) => s + i * 1e-3);
    const pieces = cutPieces(strictly, [strictly.map((s) => 400 + 20 * Math.sin(s / 90))], none, 20);
    for (let k = 1; k < pieces.length; k += 1) {
      const before = pieces[k - 1]!;
      const line = before.faces[0]!;
      expect(pieces[k]!.startS).toBe(before.endS);
      expect(line.startK + line.slopeKPerS * (before.endS - before.startS)).toBeCloseTo(pieces[k]!.faces[0]!.startK, 9);
    }
  });
});
