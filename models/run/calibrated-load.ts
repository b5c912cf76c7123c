import type { ChannelLayout } from '../log/layout.ts';
import { calibrationIn, type InChannelUnit } from './calibration-in.ts';
import type { InstrumentOfChannel, InstrumentRecords } from './instrument-records.ts';
import type { Load, LoadSensor } from './load.ts';

/**
 * The load a run is judged by: what the load document says of a sensor, and where it gives no correction or no
 * uncertainty of its own, those of the calibration on record.
 *
 * The load as it was written stays as it is. A calibration that had run out, or whose unit is none of the channel's,
 * changes nothing here; `instruments/calibration` says so.
 *
 * @param layouts  The channels as they are judged: emf read as °C already.
 */
export function calibratedLoad(load: Load, records: InstrumentRecords | null, layouts: readonly ChannelLayout[]): Load {
  if (records === null) return load;
  const changed = new Map<string, LoadSensor>();
  for (const record of records.channels) {
    const layout = layouts.find(({ name }) => name === record.channel);
    const known = layout === undefined ? null : figuresFor(record, layout, layouts);
    if (known === null) continue;
    const own = load.sensors.find(({ channel }) => channel === record.channel);
    const sensor = { channel: record.channel, ...known, ...own };
    if (Object.keys(sensor).length > Object.keys(own ?? { channel: '' }).length) changed.set(record.channel, sensor);
  }
  if (changed.size === 0) return load;
  const kept = load.sensors.map((sensor) => changed.get(sensor.channel) ?? sensor);
  const named = new Set(load.sensors.map(({ channel }) => channel));
  return { ...load, sensors: [...kept, ...[...changed.values()].filter(({ channel }) => !named.has(channel))] };
}

/** What the calibration of a channel's instrument comes to for it; null where none can be applied. */
export function figuresFor(
  { channel, calibration, replacedBy }: InstrumentOfChannel,
  layout: ChannelLayout,
  layouts: readonly ChannelLayout[],
): InChannelUnit | null {
  if (calibration === null || replacedBy !== null) return null;
  const figures = calibrationIn(calibration, layout.unit);
  // A correction of a cold junction would come too late: the temperatures that rest on it are read already.
  const isColdJunction = layouts.some(({ thermocouple }) => thermocouple?.coldJunction === channel);
  if (figures === null || !isColdJunction) return figures;
  if (figures.corrections?.some(([, by]) => by !== 0)) return null;
  return figures.uncertainty === undefined ? {} : { uncertainty: figures.uncertainty };
}
