import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Readings } from '../../models/log/readings.ts';
import { packColumn, unpackColumn } from '../../server/store/pack-column.ts';
import { insertReadings, readReadings } from '../../server/store/reading-blocks.ts';
import { chainOfReadings } from '../../server/store/reading-chain.ts';
import { freshDatabase } from './fresh-database.ts';

const SEED = { seed: 20260302 };

/** Figures as recorders write them: few decimals, sometimes none at all. */
const figure = fc.oneof(
  fc.integer({ min: -99_999, max: 99_999 }).map((tenths) => tenths / 10),
  fc.integer({ min: -9_999_999, max: 9_999_999 }).map((micro) => micro / 1e6),
  fc.constant(Number.NaN),
);

function readingsOf(columns: readonly (readonly number[])[]): Readings {
  const [time = [], ...channels] = columns;
  return {
    timeMs: Float64Array.from(time, (_, scan) => 1_772_438_400_000 + scan * 30_000),
    channels: channels.map((value, n) => ({
      channel: { column: `T${n}`, name: `TC${n}`, role: 'part', unit: '°C' },
      value: Float64Array.from(value),
    })),
  };
}

const logs = fc
  .integer({ min: 1, max: 200 })
  .chain((scans) => fc.array(fc.array(figure, { minLength: scans, maxLength: scans }), { minLength: 2, maxLength: 5 }))
  .map(readingsOf);

describe('packColumn', () => {
  it('gives back every figure exactly, absent ones absent', () => {
    fc.assert(
      fc.property(fc.array(fc.oneof(figure, fc.double({ noNaN: true }))), fc.constantFrom(1, 2), (figures, order) => {
        // Minus zero is zero: no reading tells them apart.
        const value = Float64Array.from(figures, (one) => one + 0);
        const packed = packColumn(value, order as 1 | 2);
        expect([...unpackColumn(packed, value.length)].map((one) => one + 0)).toEqual([...value]);
      }),
      SEED,
    );
  });

  it('takes less than one byte a reading of 0.1 °C data with noise', () => {
    let state = 12345;
    const noise = () => {
      state = (state * 1103515245 + 12345) % 2147483648;
      return state / 2147483648 - 0.5;
    };
    const value = Float64Array.from({ length: 8192 }, (_, scan) => Math.round((20 + scan / 60 + noise()) * 10) / 10);
    expect(packColumn(value, 1).length / value.length).toBeLessThan(1);
  });

  it('takes next to nothing of instants that come evenly', () => {
    const timeMs = Float64Array.from({ length: 8192 }, (_, scan) => 1_772_438_400_000 + scan * 1000);
    expect(packColumn(timeMs, 2).length / timeMs.length).toBeLessThan(0.2);
  });
});

describe('reading blocks', () => {
  it('give back a log as it was written, however it is cut, with the same hash', () => {
    const db = freshDatabase();
    db.pragma('foreign_keys = OFF');
    let source = 0;
    fc.assert(
      fc.property(logs, fc.integer({ min: 1, max: 97 }), (readings, scansInBlock) => {
        source += 1;
        insertReadings(db, source, readings, scansInBlock);
        const scans = readings.timeMs.length;
        const back = readReadings(
          db,
          source,
          scans,
          readings.channels.map(({ channel }) => channel),
        );
        expect(back).toEqual(readings);
        expect(chainOfReadings(back)).toBe(chainOfReadings(readings));
      }),
      { ...SEED, numRuns: 50 },
    );
  });

  it('refuse to be read where one is gone', () => {
    const db = freshDatabase();
    db.pragma('foreign_keys = OFF');
    const readings = readingsOf([
      [0, 0, 0],
      [1, 2, 3],
    ]);
    insertReadings(db, 1, readings, 2);
    db.exec('DROP TRIGGER reading_blocks_are_never_deleted; DELETE FROM reading_blocks WHERE id = 2');
    const channels = readings.channels.map(({ channel }) => channel);
    expect(() => readReadings(db, 1, 3, channels)).toThrow(expect.objectContaining({ code: 'database-damaged' }));
  });
});

describe('chainOfReadings', () => {
  it('is the SHA-256 of the names, then of every scan as little-endian doubles', () => {
    const readings = readingsOf([
      [0, 0],
      [20.5, Number.NaN],
    ]);
    // Written out byte by byte, independently of the code: 1772438400000 is 0x4279CAD4BB400000 … as a double.
    const scan = (at: number, reading: string) => {
      const bytes = Buffer.alloc(8);
      bytes.writeDoubleLE(at);
      return Buffer.concat([bytes, Buffer.from(reading, 'hex')]);
    };
    const expected = createHash('sha256')
      .update('["TC0"]\n')
      .update(scan(1_772_438_400_000, '0000000000803440')) // 20.5
      .update(scan(1_772_438_430_000, '000000000000f87f')) // the quiet NaN
      .digest('hex');
    expect(chainOfReadings(readings)).toBe(expected);
  });

  it('changes with any figure, any instant and any name', () => {
    fc.assert(
      fc.property(logs, fc.nat(), fc.nat(), (readings, column, scan) => {
        const before = chainOfReadings(readings);
        const channels = readings.channels.map(({ channel, value }) => ({ channel, value: value.slice() }));
        const touched = channels[column % channels.length]!;
        const at = scan % readings.timeMs.length;
        touched.value[at] = Number.isNaN(touched.value[at]) ? 1 : touched.value[at]! + 0.5;
        expect(chainOfReadings({ ...readings, channels })).not.toBe(before);
        const later = readings.timeMs.slice();
        later[at] = later[at]! + 1;
        expect(chainOfReadings({ ...readings, timeMs: later })).not.toBe(before);
      }),
      { ...SEED, numRuns: 40 },
    );
    const [one, other] = ['TC1', 'TC2'].map((name) => {
      const readings = readingsOf([[0], [1]]);
      return chainOfReadings({
        ...readings,
        channels: readings.channels.map(({ channel, value }) => ({ channel: { ...channel, name }, value })),
      });
    });
    expect(one).not.toBe(other);
  });
});
