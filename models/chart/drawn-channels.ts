import type { ChannelLayout, ChannelRole } from '../log/layout.ts';
import type { ChannelReadings, Readings } from '../log/readings.ts';
import type { Load } from '../run/load.ts';
import { isTemperatureUnit } from '../units.ts';
import type { Strip } from './chart.ts';
import { type DrawnChannel, drawnChannel } from './drawn-channel.ts';
import { type Conversion, pressureConversion, temperatureConversion } from './shown-unit.ts';

/** Units of a cycle, or what stands in for them where there is none. */
export interface WrittenUnits {
  readonly temperature?: string;
  readonly pressure?: string;
  readonly vacuum?: string;
}

export interface DrawnChannels {
  readonly channels: readonly DrawnChannel[];
  /** Unit of each strip that is drawn. */
  readonly units: ReadonlyMap<Strip, string>;
  /** Strips in the cycle's own unit: its limits have a level there. The others need a barometer nobody recorded. */
  readonly inWritten: ReadonlySet<Strip>;
  readonly notDrawn: readonly { readonly channel: string; readonly because: string }[];
}

type Physical = 'temperature' | 'pressure' | 'vacuum';

const STRIP_OF_ROLE: Readonly<Record<ChannelRole, Physical | null>> = {
  part: 'temperature',
  tool: 'temperature',
  air: 'temperature',
  setpoint: 'temperature',
  pressure: 'pressure',
  vacuum: 'vacuum',
  'vacuum-source': 'vacuum',
  other: null,
};

/** The channels that can be drawn, each on its strip and in the cycle's unit. */
export function drawnChannels(
  readings: Readings,
  written: WrittenUnits,
  load: Load | null,
  barometerPa: number | null,
): DrawnChannels {
  const channels: DrawnChannel[] = [];
  const units = new Map<Strip, string>();
  const inWritten = new Set<Strip>();
  const notDrawn: { channel: string; because: string }[] = [];
  for (const strip of ['temperature', 'pressure', 'vacuum'] as const) {
    const own = readings.channels.filter(({ channel }) => stripOf(channel) === strip);
    const unit = unitOfStrip(strip, own, written[strip], barometerPa);
    if (unit === null) continue;
    units.set(strip, unit);
    if (unit === written[strip]) inWritten.add(strip);
    for (const { channel, value } of own) {
      const conversion = between(strip, channel.unit, unit, barometerPa);
      if (conversion === null) {
        notDrawn.push({ channel: channel.name, because: whyNot(strip, channel.unit, unit) });
        continue;
      }
      const sensor = load?.sensors.find((one) => one.channel === channel.name);
      channels.push(drawnChannel(channel, strip, readings.timeMs, value, conversion, sensor));
    }
  }
  return { channels, units, inWritten, notDrawn };
}

function stripOf({ role, unit }: ChannelLayout): Physical | null {
  return role === 'other' && isTemperatureUnit(unit) ? 'temperature' : STRIP_OF_ROLE[role];
}

/** The cycle's unit where every channel can be shown in it, else the first channel's own; null without a channel. */
function unitOfStrip(
  strip: Physical,
  own: readonly ChannelReadings[],
  written: string | undefined,
  barometerPa: number | null,
): string | null {
  const first = own[0];
  if (first === undefined) return null;
  if (written === undefined) return first.channel.unit;
  const allFit = own.every(({ channel }) => between(strip, channel.unit, written, barometerPa) !== null);
  return allFit || strip === 'temperature' ? written : first.channel.unit;
}

function between(strip: Physical, from: string, to: string, barometerPa: number | null): Conversion | null {
  return strip === 'temperature' ? temperatureConversion(from, to) : pressureConversion(strip, from, to, barometerPa);
}

function whyNot(strip: Physical, from: string, to: string): string {
  return strip === 'temperature'
    ? `${from} is no unit of temperature.`
    : `${from} cannot be shown in ${to} without the barometer of the day.`;
}
