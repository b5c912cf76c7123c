import { celsiusFrom, isTemperatureUnit, round9 } from '../units.ts';
import { believableRange } from './channel-range.ts';
import type { ChannelLayout } from './layout.ts';
import { type Readings, scaledReading } from './readings.ts';
import { emfMillivolt, temperatureFromEmf } from './thermocouple/emf.ts';

/** A column of emf, the column of its cold junction (null where that was held), and the two as one temperature. */
interface EmfColumn {
  readonly column: number;
  readonly coldColumn: number | null;
  readonly temperatureC: (figure: number, coldFigure: number) => number;
}

/**
 * The readings of a log with temperatures in the place of recorded emf; the same readings where there is none.
 *
 * The emf of the cold junction is added to the one recorded, and the sum read as a temperature: temperatures
 * themselves do not add, the reference functions being no straight lines. A reading is absent where the cold junction
 * has none in the same scan, and where either lies outside the range of the type or of what a channel can believably
 * read.
 *
 * Source: ASTM E230/E230M, "reference junction compensation"; NIST Monograph 175 (1993), §2.
 */
export function temperaturesOfEmf(readings: Readings): Readings {
  const columns = emfColumns(readings.channels.map(({ channel }) => channel));
  if (columns.length === 0) return readings;
  const channels = readings.channels.map(({ channel, value }) => ({ channel: asTemperature(channel), value }));
  for (const { column, coldColumn, temperatureC } of columns) {
    const cold = coldColumn === null ? null : readings.channels[coldColumn]!.value;
    const { value } = readings.channels[column]!;
    channels[column]!.value = value.map((figure, scan) => temperatureC(figure, cold?.[scan] ?? Number.NaN));
  }
  return { timeMs: readings.timeMs, channels };
}

/** As {@link temperaturesOfEmf}, one scan at a time: a figure for each column, in and out. */
export function scanOfEmf(channels: readonly ChannelLayout[]): (figures: ArrayLike<number>) => ArrayLike<number> {
  const columns = emfColumns(channels);
  if (columns.length === 0) return (figures) => figures;
  return (figures) => {
    const seen = Float64Array.from(figures);
    for (const { column, coldColumn, temperatureC } of columns) {
      seen[column] = temperatureC(figures[column]!, coldColumn === null ? Number.NaN : figures[coldColumn]!);
    }
    return seen;
  };
}

/** A channel as it is judged and shown: one of emf reads °C, with nothing left to scale. */
export function asTemperature(channel: ChannelLayout): ChannelLayout {
  if (!isEmf(channel)) return channel;
  const { scale: _scale, offset: _offset, range: _range, ...rest } = channel;
  return { ...rest, unit: '°C' };
}

function isEmf({ unit, thermocouple }: ChannelLayout): boolean {
  return unit === 'mV' && thermocouple !== undefined;
}

function emfColumns(channels: readonly ChannelLayout[]): EmfColumn[] {
  return channels.flatMap((channel, column) => {
    const { thermocouple } = channel;
    if (thermocouple === undefined || !isEmf(channel)) return [];
    const { type, coldJunction } = thermocouple;
    const coldColumn =
      typeof coldJunction === 'string' ? channels.findIndex(({ name }) => name === coldJunction) : null;
    const coldEmf =
      typeof coldJunction === 'number' ? held(emfMillivolt(type, coldJunction)) : emfOf(channels[coldColumn!], type);
    const [leastC, greatestC] = believableRange(asTemperature(channel));
    const temperatureC = (figure: number, coldFigure: number) => {
      const hotC = round9(temperatureFromEmf(type, scaledReading(figure, channel) + coldEmf(coldFigure)));
      return hotC >= leastC && hotC <= greatestC ? hotC : Number.NaN;
    };
    return [{ column, coldColumn, temperatureC }];
  });
}

function held(emf: number): (figure: number) => number {
  return () => emf;
}

/** Emf at the temperature that a cold junction's channel reads; absent where there is no such channel. */
function emfOf(cold: ChannelLayout | undefined, type: Parameters<typeof emfMillivolt>[0]): (figure: number) => number {
  if (cold === undefined || !isTemperatureUnit(cold.unit)) return held(Number.NaN);
  const { unit } = cold;
  return (figure) => emfMillivolt(type, celsiusFrom(scaledReading(figure, cold), unit));
}
