import { DomainError } from '../errors.ts';
import type { ChannelLayout } from '../log/layout.ts';
import { scaledReading } from '../log/readings.ts';
import {
  celsiusDifferenceFrom,
  celsiusFrom,
  isTemperatureUnit,
  type PressureUnit,
  parsePressureUnit,
  pascalFrom,
  round9,
} from '../units.ts';
import type { Load, LoadSensor } from './load.ts';
import { Track } from './track.ts';

/** One channel of a run: its track, and what is known of the sensor behind it. */
export interface RunChannel {
  readonly layout: ChannelLayout;
  readonly track: Track;
  /** The unit of a pressure or vacuum channel; null for temperatures. */
  readonly pressureUnit: PressureUnit | null;
  /** Expanded uncertainty U (k = 2) in °C or Pa; null where unknown. */
  readonly uncertainty: number | null;
  /** Parts the channel belongs to; empty: none in particular. */
  readonly parts: readonly string[];
  readonly place: string | null;
  /** °C or Pa, corrected, from the figure in the file. */
  readonly judgedReading: (figure: number) => number;
}

const TEMPERATURE_ROLES: ReadonlySet<string> = new Set(['part', 'tool', 'air']);
const PRESSURE_ROLES: ReadonlySet<string> = new Set(['pressure', 'vacuum']);

/** The channels of a log that can be judged, each with what the load says of it; null for the others. */
export function judgedChannels(layouts: readonly ChannelLayout[], load: Load | null): (RunChannel | null)[] {
  const names = new Set(layouts.map((layout) => layout.name));
  for (const { channel } of load?.sensors ?? []) {
    if (!names.has(channel)) {
      throw new DomainError(
        'channel-unknown',
        `The load names the channel "${channel}"; the log has ${[...names].join(', ')}`,
        { channel },
      );
    }
  }
  refuseCorrectedColdJunctions(layouts, load);
  const loadNamesParts = (load?.parts.length ?? 0) > 0;
  return layouts.map((layout) => {
    const sensor = load?.sensors.find(({ channel }) => channel === layout.name);
    const parts = bagPartsOf(layout, load) ?? sensor?.parts ?? (loadNamesParts ? [] : (layout.parts ?? []));
    return runChannel(layout, sensor, parts);
  });
}

/** A correction of a cold junction would come too late: the temperatures that rest on it are read already. */
function refuseCorrectedColdJunctions(layouts: readonly ChannelLayout[], load: Load | null): void {
  for (const { channel, corrections } of load?.sensors ?? []) {
    const layout = layouts.find(({ thermocouple }) => thermocouple?.coldJunction === channel);
    if (corrections === undefined || layout === undefined) continue;
    throw new DomainError(
      'document-wrong-value',
      `The load corrects "${channel}", the cold junction of "${layout.name}"; give it an offset in the layout instead`,
      { channel, coldJunctionOf: layout.name },
    );
  }
}

/** Parts whose bag hangs on this vacuum line; null where none does. */
function bagPartsOf(layout: ChannelLayout, load: Load | null): string[] | null {
  const parts = load?.parts.filter(({ bagLine }) => bagLine === layout.name).map(({ part }) => part) ?? [];
  return layout.role === 'vacuum' && parts.length > 0 ? parts : null;
}

function runChannel(
  layout: ChannelLayout,
  sensor: LoadSensor | undefined,
  parts: readonly string[],
): RunChannel | null {
  const { role, unit } = layout;
  const uncertainty = sensor?.uncertainty ?? layout.uncertainty ?? null;
  const corrected = (figure: number): number => {
    const reading = scaledReading(figure, layout);
    return sensor?.corrections === undefined ? reading : round9(reading + correctionAt(reading, sensor.corrections));
  };
  const known = { layout, track: new Track(layout.name), parts, place: sensor?.place ?? null };
  if (TEMPERATURE_ROLES.has(role)) {
    if (!isTemperatureUnit(unit)) {
      throw new DomainError('unit-unknown', `Channel "${layout.name}" is a temperature; "${unit}" is not °C or °F`, {
        channel: layout.name,
        unit,
      });
    }
    return {
      ...known,
      pressureUnit: null,
      uncertainty: uncertainty === null ? null : celsiusDifferenceFrom(uncertainty, unit),
      judgedReading: unit === '°C' ? corrected : (figure) => celsiusFrom(corrected(figure), unit),
    };
  }
  if (!PRESSURE_ROLES.has(role)) return null;
  const pressureUnit = parsePressureUnit(unit);
  return {
    ...known,
    pressureUnit,
    uncertainty: uncertainty === null ? null : uncertainty * pressureUnit.paPerUnit,
    judgedReading: (figure) => pascalFrom(corrected(figure), pressureUnit),
  };
}

/** Correction at a reading: linear between points, held beyond the ends. */
export function correctionAt(reading: number, points: readonly (readonly [number, number])[]): number {
  const first = points[0];
  const last = points.at(-1);
  if (first === undefined || last === undefined) return 0;
  if (reading <= first[0]) return first[1];
  if (reading >= last[0]) return last[1];
  const after = points.findIndex(([at]) => at >= reading);
  const [x0, y0] = points[after - 1]!;
  const [x1, y1] = points[after]!;
  return y0 + ((y1 - y0) * (reading - x0)) / (x1 - x0);
}
