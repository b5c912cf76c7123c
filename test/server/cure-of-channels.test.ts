import { describe, expect, it } from 'vitest';
import type { ChannelLayout } from '../../models/log/layout.ts';
import { cureOfChannels } from '../../server/command/cure-of-channels.ts';
import { historyOf, readReference, recalledResin } from '../reference/cure/reference-sets.ts';

// Source: test/reference/cure/temperature-offset.json (SciPy): the two-dwell cycle shifted by ±1.1 °C.
const { rows } = readReference<{ rows: { set: string; offset_C: number; alpha_18000: number; gel_s: number }[] }>(
  'temperature-offset.json',
);
const SET = 'dusi_976';
const offset = (by: number) => rows.find((row) => row.set === SET && row.offset_C === by)!;

function cureOf(layout: Partial<ChannelLayout>, resin = recalledResin(SET)) {
  const [timeS, temperatureK] = historyOf(SET, 'two_dwell');
  const channel = { column: 'T1', name: 'TC1', role: 'part', unit: '°C', ...layout } as const;
  const inUnit = (celsius: number) => (channel.unit === '°F' ? celsius * 1.8 + 32 : celsius);
  const value = temperatureK.map((kelvin) => inUnit(kelvin - 273.15));
  return cureOfChannels({ timeMs: timeS.map((s) => 1000 * s), channels: [{ channel, value }] }, resin, null)[0]!;
}

describe('the intervals of a channel', () => {
  it.each([
    { unit: '°C', uncertainty: 2.2 },
    { unit: '°F', uncertainty: 3.96 },
  ] as const)('spread what SciPy has where $uncertainty $unit are on record', (layout) => {
    const { degreeInterval, gelInterval, intervalBecause } = cureOf(layout);
    const spread = offset(1.1).alpha_18000 - offset(-1.1).alpha_18000;
    expect((degreeInterval![1] - degreeInterval![0]) / 2).toBeCloseTo(spread, 6);
    const [early, late] = gelInterval!.map((instant) => Date.parse(instant) / 1000);
    expect((late! - early!) / 2).toBeCloseTo(offset(-1.1).gel_s - offset(1.1).gel_s, 2);
    expect(intervalBecause).toBe(
      `k = 2, from U ${layout.uncertainty} ${layout.unit} of TC1; the set gives no covariance of its constants`,
    );
  });

  it('are wider, and say so, where the set gives a covariance', () => {
    const covariance = {
      parameters: ['lnA1', 'lnA2'],
      matrix: [
        [0.0025, 0],
        [0, 0.0025],
      ],
    };
    const fitted = cureOf({ uncertainty: 2.2 }, { ...recalledResin(SET), covariance });
    const width = ([low, high]: readonly [number, number]) => high - low;
    expect(width(fitted.degreeInterval!)).toBeGreaterThan(width(cureOf({ uncertainty: 2.2 }).degreeInterval!));
    expect(fitted.intervalBecause).toBe('k = 2, from U 2.2 °C of TC1 and the covariance of the constants');
  });

  it('are not there, and it says why, where no uncertainty is on record', () => {
    expect(cureOf({})).toMatchObject({
      degreeInterval: null,
      tgIntervalC: null,
      gelInterval: null,
      intervalBecause: 'no uncertainty of TC1 is on record',
    });
  });
});
