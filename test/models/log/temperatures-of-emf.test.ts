import { describe, expect, it } from 'vitest';
import { type ChannelLayout, THERMOCOUPLE_TYPES, type ThermocoupleType } from '../../../models/log/layout.ts';
import { readLog } from '../../../models/log/read-log.ts';
import { asTemperature, scanOfEmf, temperaturesOfEmf } from '../../../models/log/temperatures-of-emf.ts';
import { emfMillivolt } from '../../../models/log/thermocouple/emf.ts';
import { foldReadings } from '../../../models/run/digest.ts';
import { parseLoad } from '../../../models/run/parse-load.ts';
import { fileOf, refusalOf } from './logs.ts';

const cold: ChannelLayout = { column: 'CJ', name: 'CJ', role: 'other', unit: '°C' };
const hot = (thermocouple: ChannelLayout['thermocouple'], more: Partial<ChannelLayout> = {}): ChannelLayout => ({
  column: 'E1',
  name: 'TC1',
  role: 'part',
  unit: 'mV',
  ...(thermocouple === undefined ? {} : { thermocouple }),
  ...more,
});
const readingsOf = (channels: ChannelLayout[], rows: number[][]) => ({
  timeMs: Float64Array.from(rows, (_, i) => 60000 * i),
  channels: channels.map((channel, k) => ({ channel, value: Float64Array.from(rows, (row) => row[k]!) })),
});
const firstOf = (channels: ChannelLayout[], rows: number[][]) =>
  temperaturesOfEmf(readingsOf(channels, rows)).channels[0]!;

describe('temperaturesOfEmf', () => {
  it.each(THERMOCOUPLE_TYPES)('type %s: gives back the temperature whatever the cold junction was', (type) => {
    const rows = [-40, 0, 21.37, 55, 100].flatMap((coldC) =>
      [-150, 0, 20, 180, 350].map((hotC) => ({
        hotC,
        coldC,
        emf: emfMillivolt(type, hotC) - emfMillivolt(type, coldC),
      })),
    );
    const channels = [hot({ type, coldJunction: 'CJ' }), cold];
    const { channel, value } = firstOf(
      channels,
      rows.map(({ emf, coldC }) => [emf, coldC]),
    );
    expect(channel.unit).toBe('°C');
    for (const [i, { hotC }] of rows.entries()) expect(Math.abs(value[i]! - hotC)).toBeLessThan(1e-6);
    const held = firstOf([hot({ type, coldJunction: 55 })], [[emfMillivolt(type, 180) - emfMillivolt(type, 55)]]);
    expect(held.value[0]).toBeCloseTo(180, 6);
  });

  it('adds emf and never temperatures: 10.759 mV of type E against 20 °C is 180 °C', () => {
    // Source: NIST ITS-90 table of type E: 180 °C 11.951 mV, 20 °C 1.192 mV, each to 0.5 µV (0.007 °C).
    const read = (coldC: number) => firstOf([hot({ type: 'E', coldJunction: coldC })], [[11.951 - 1.192]]).value[0]!;
    expect(Math.abs(read(20) - 180)).toBeLessThan(0.015);
    expect(read(0) + 20 - 180).toBeGreaterThan(3);
  });

  it('takes scale and offset of either channel into account, and a cold junction in °F', () => {
    const emf = emfMillivolt('J', 150) - emfMillivolt('J', 25);
    const inMicrovolt = hot({ type: 'J', coldJunction: 'CJ' }, { scale: 0.001, offset: -0.002, uncertainty: 2.2 });
    const { channel, value } = firstOf(
      [inMicrovolt, { ...cold, unit: '°F', scale: 0.1 }],
      [[(emf + 0.002) * 1000, 770]],
    );
    expect(value[0]).toBeCloseTo(150, 6);
    expect(channel).toEqual({
      column: 'E1',
      name: 'TC1',
      role: 'part',
      unit: '°C',
      uncertainty: 2.2,
      thermocouple: { type: 'J', coldJunction: 'CJ' },
    });
  });

  it('has no reading without a cold junction, outside the type, or below −200 °C', () => {
    const type: ThermocoupleType = 'T';
    const rows = [
      [Number.NaN, 20],
      [4, Number.NaN],
      [30, 20],
      [emfMillivolt('T', -210) - emfMillivolt('T', 20), 20],
      [4, 500],
      [4, 20],
    ];
    const { value } = firstOf([hot({ type, coldJunction: 'CJ' }), cold], rows);
    expect([...value].map(Number.isNaN)).toEqual([true, true, true, true, true, false]);
  });

  it('leaves other logs as they are, and what it has read already', () => {
    const plain = readingsOf([cold], [[20]]);
    expect(temperaturesOfEmf(plain)).toBe(plain);
    const once = temperaturesOfEmf(readingsOf([hot({ type: 'K', coldJunction: 20 })], [[4]]));
    expect(temperaturesOfEmf(once)).toBe(once);
    expect(asTemperature(cold)).toBe(cold);
  });

  it('reads a scan as it reads the whole', () => {
    const channels = [hot({ type: 'N', coldJunction: 'CJ' }), cold];
    const rows = [
      [2, 21],
      [3, 22],
    ];
    const { value } = firstOf(channels, rows);
    const scan = scanOfEmf(channels);
    expect(rows.map((row) => [...Array.from(scan(row))])).toEqual([
      [value[0], 21],
      [value[1], 22],
    ]);
  });
});

describe('a run recorded as emf', () => {
  const text = `Stamp,E1,CJ\n,mV,°C\n2026-03-03 08:14,${(7.34 - 0.798).toFixed(3)},20\n2026-03-03 08:15,OPEN,20\n`;
  const layout = {
    format: 'dwellbook-layout/1',
    name: 'emf',
    header: 1,
    units: 2,
    time: { columns: ['Stamp'], pattern: 'yyyy-MM-dd HH:mm', zone: 'UTC' },
    channels: [hot({ type: 'K', coldJunction: 'CJ' }), cold],
    missing: ['OPEN'],
  } as const;

  it('keeps the figures of the file and is judged in °C', () => {
    const { readings } = readLog([fileOf(text)], layout);
    expect([...readings.channels[0]!.value]).toEqual([6.542, Number.NaN]);
    const digest = foldReadings(readings, null);
    const { track, layout: judged } = digest.channels[0]!;
    expect(judged.unit).toBe('°C');
    expect(track.length).toBe(1);
    expect(Math.abs(track.reading(0) - 180)).toBeLessThan(0.025);
  });

  it('is not judged with a cold junction that the load corrects too late', () => {
    const load = parseLoad({
      format: 'dwellbook-load/1',
      parts: [],
      sensors: [{ channel: 'CJ', corrections: [[20, 0.5]] }],
    });
    const { readings } = readLog([fileOf(text)], layout);
    expect(refusalOf(() => foldReadings(readings, load)).message).toContain('the cold junction of "TC1"');
  });
});
