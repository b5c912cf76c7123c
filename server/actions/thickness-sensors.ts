import type { ChannelRole } from '../../models/log/layout.ts';
import type { Readings } from '../../models/log/readings.ts';
import { judgedChannels } from '../../models/run/channel.ts';
import type { ReadingsInTime } from '../../models/run/common-history.ts';
import type { Load } from '../../models/run/load.ts';
import { type Side, sideOfPlace } from '../../models/run/side-of-place.ts';

/** A channel that may be put to a face of a part. */
export interface ThicknessSensor {
  readonly channel: string;
  readonly place: string | null;
  readonly role: ChannelRole;
  /** Null for air. */
  readonly side: Side | null;
  /** Whether the load puts it to this part. */
  readonly isOwn: boolean;
  /** Why it is not used unless somebody chooses it; null where nothing speaks against it. */
  readonly against: 'excluded' | 'of another part' | null;
  /** °C, corrected; readings from an exclusion on are absent. */
  readonly readings: ReadingsInTime;
  readonly meanC: number;
}

/** Temperature channels of a run as one part sees them; where none is its own, all part thermocouples of the load. */
export function thicknessSensors(
  { timeMs, channels }: Readings,
  load: Load,
  part: string,
  excludedFromMs: ReadonlyMap<string, number>,
): ThicknessSensor[] {
  const known = judgedChannels(
    channels.map(({ channel }) => channel),
    load,
  );
  const hasOwn = known.some((one) => one?.layout.role === 'part' && one.parts.includes(part));
  return channels.flatMap(({ channel: { name, role }, value }, n) => {
    const one = known[n];
    if (!one || one.pressureUnit !== null) return [];
    const untilMs = excludedFromMs.get(name) ?? Number.POSITIVE_INFINITY;
    const readings = {
      timeMs,
      value: value.map((figure, scan) => ((timeMs[scan] ?? 0) < untilMs ? one.judgedReading(figure) : Number.NaN)),
    };
    const isOwn = one.parts.includes(part);
    const isOther = role !== 'air' && (hasOwn || role === 'tool') && !isOwn;
    return {
      channel: name,
      place: one.place,
      role,
      side: role === 'air' ? null : sideOfPlace(one.place, role),
      isOwn,
      against: excludedFromMs.has(name) ? ('excluded' as const) : isOther ? ('of another part' as const) : null,
      readings,
      meanC: meanOf(readings.value),
    };
  });
}

function meanOf(values: Float64Array): number {
  let sum = 0;
  let n = 0;
  for (const value of values) {
    if (Number.isNaN(value)) continue;
    sum += value;
    n += 1;
  }
  return sum / n;
}
