import { number, object, oneOf, type Read, refuse, text } from '../document.ts';
import { DomainError } from '../errors.ts';
import { isTemperatureUnit } from '../units.ts';
import { type ChannelLayout, THERMOCOUPLE_TYPES, type Thermocouple } from './layout.ts';

/** Terminals of a recorder stand in a workshop: a cold junction beyond this is a figure in K, in °F or of the hot end. */
const coldJunctionC = number({ atLeast: -40, atMost: 100 });

/** Reads `thermocouple`. */
export const readThermocouple: Read<Thermocouple> = object((fields) => ({
  type: fields.required('type', oneOf(THERMOCOUPLE_TYPES)),
  coldJunction: fields.required('coldJunction', (value, path) =>
    typeof value === 'number' ? coldJunctionC(value, path) : text(value, path),
  ),
}));

/** Whether a channel recorded the emf of a thermocouple; refuses a unit, a role or a `thermocouple` that contradict it. */
export function checkThermocouple({ role, unit, thermocouple }: ChannelLayout, path: string): boolean {
  if (thermocouple !== undefined) {
    if (unit !== 'mV') refuse(`${path}.unit`, '"mV" for a channel with a thermocouple', unit);
    if (!READS_TEMPERATURE.has(role)) refuse(`${path}.role`, 'part, tool or air for a thermocouple', role);
    return true;
  }
  if (unit !== 'mV' || !READS_TEMPERATURE.has(role)) return false;
  throw new DomainError(
    'document-missing-key',
    `${path}.thermocouple is missing; mV are read as a temperature by its type and its coldJunction`,
    { key: `${path}.thermocouple` },
  );
}

const READS_TEMPERATURE: ReadonlySet<string> = new Set(['part', 'tool', 'air']);

/** Refuses cold junctions that are no channel of temperature in the same log. */
export function refuseStrangeColdJunctions(channels: readonly ChannelLayout[]): void {
  for (const [i, { thermocouple }] of channels.entries()) {
    const name = thermocouple?.coldJunction;
    if (typeof name !== 'string') continue;
    const cold = channels.find((channel) => channel.name === name);
    if (cold !== undefined && isTemperatureUnit(cold.unit)) continue;
    refuse(
      `channels[${i}].thermocouple.coldJunction`,
      'the name of a channel in °C or °F of this layout, or a temperature in °C',
      name,
    );
  }
}
