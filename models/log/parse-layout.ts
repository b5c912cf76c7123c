import {
  flag,
  format,
  type ListLength,
  listOf,
  number,
  object,
  oneOf,
  pairOf,
  type Read,
  refuse,
  refuseNamedTwice,
  text,
} from '../document.ts';
import { DomainError } from '../errors.ts';
import { isTemperatureUnit, PA_PER_UNIT } from '../units.ts';
import {
  CHANNEL_ROLES,
  type ChannelLayout,
  type ChannelRole,
  ENCODINGS,
  type Layout,
  type TimeLayout,
} from './layout.ts';
import { checkThermocouple, readThermocouple, refuseStrangeColdJunctions } from './parse-thermocouple.ts';
import { parsePattern } from './stamp-pattern.ts';
import { findZone } from './time-zone.ts';

/** The layout document as typed; every wrong, unknown or missing key is refused by its path. */
export function parseLayout(document: unknown): Layout {
  const layout = readLayout(document, '');
  checkChannels(layout.channels, layout.time.columns);
  checkLines(layout);
  return layout;
}

/** A list of channels that stands outside a layout, under the key `channels`. */
export function parseChannels(value: unknown): readonly ChannelLayout[] {
  const channels = readChannels(value, 'channels');
  checkChannels(channels, []);
  return channels;
}

function checkChannels(channels: readonly ChannelLayout[], timeColumns: readonly string[]): void {
  refuseNamedTwice(
    channels.map(({ name }) => name),
    (i) => `channels[${i}].name`,
  );
  refuseNamedTwice([...timeColumns, ...channels.map(({ column }) => column.trim())], (i) =>
    i < timeColumns.length ? `time.columns[${i}]` : `channels[${i - timeColumns.length}].column`,
  );
  refuseStrangeColdJunctions(channels);
}

const line = number({ atLeast: 1, whole: true });

const readLayout = object<Layout>((fields) => ({
  format: fields.required('format', format('dwellbook-layout/1')),
  name: fields.required('name', text),
  ...fields.optional('encoding', oneOf(ENCODINGS)),
  ...fields.optional('delimiter', readDelimiter),
  ...fields.optional('decimal', oneOf(['.', ','])),
  header: fields.required('header', line),
  ...fields.optional('units', line),
  ...fields.optional('firstReading', line),
  time: fields.required('time', readTime),
  channels: fields.required('channels', readChannels),
  ...fields.optional('missing', listOf(text)),
}));

/** One ASCII character that cannot be part of a number, a quoted cell or a line end. */
function readDelimiter(value: unknown, path: string): string {
  return typeof value === 'string' && /^[\t -~]$/.test(value) && !/[\w"+.-]/.test(value)
    ? value
    : refuse(path, 'one character, such as "," or ";" or a tab, that no number can hold', value);
}

function readTime(value: unknown, path: string): TimeLayout {
  return object<TimeLayout>((fields) => {
    if (fields.has('elapsed')) {
      return {
        columns: fields.required('columns', columns({ atLeast: 1, atMost: 1 })),
        elapsed: fields.required('elapsed', oneOf(['s', 'min', 'h'])),
        startsAt: fields.required('startsAt', readInstant),
      };
    }
    if (fields.has('serialDays')) {
      return {
        columns: fields.required('columns', columns({ atLeast: 1, atMost: 2 })),
        serialDays: fields.required('serialDays', readTrue),
        zone: fields.required('zone', readZone),
      };
    }
    return {
      columns: fields.required('columns', columns({ atLeast: 1 })),
      pattern: fields.required('pattern', readPattern),
      zone: fields.required('zone', readZone),
    };
  })(value, path);
}

function columns(length: ListLength): Read<readonly string[]> {
  return listOf(text, length);
}

function readPattern(value: unknown, path: string): string {
  const pattern = text(value, path);
  parsePattern(pattern, path);
  return pattern;
}

function readTrue(value: unknown, path: string): true {
  return flag(value, path) || refuse(path, 'true, or no such key', value);
}

/** A zone's name, once it is known to exist. */
function readZone(value: unknown, path: string): string {
  const zone = text(value, path);
  try {
    findZone(zone);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw new DomainError(error.code, `${path}: ${error.message}`, { ...error.facts, key: path });
  }
  return zone;
}

/** An ISO 8601 instant with its offset, as text. */
function readInstant(value: unknown, path: string): string {
  const instant = text(value, path);
  const isWritten = /^\d{4}-\d\d-\d\dT\d\d:\d\d(?::\d\d(?:\.\d{1,3})?)?(?:Z|[+-]\d\d:\d\d)$/.test(instant);
  return isWritten && Number.isFinite(Date.parse(instant))
    ? instant
    : refuse(path, 'an instant with its offset, such as "2026-03-02T08:14:00Z"', value);
}

const readChannelKeys = object<ChannelLayout>((fields) => ({
  column: fields.required('column', text),
  name: fields.required('name', text),
  role: fields.required('role', oneOf(CHANNEL_ROLES)),
  unit: fields.required('unit', text),
  ...fields.optional('scale', number()),
  ...fields.optional('offset', number()),
  ...fields.optional('range', pairOf(number())),
  ...fields.optional('uncertainty', number({ atLeast: 0 })),
  ...fields.optional('thermocouple', readThermocouple),
  ...fields.optional('parts', listOf(text, { atLeast: 1 })),
}));

function readChannel(value: unknown, path: string): ChannelLayout {
  const channel = readChannelKeys(value, path);
  if (!checkThermocouple(channel, path)) checkUnit(channel.role, channel.unit, `${path}.unit`);
  if (channel.scale === 0) refuse(`${path}.scale`, 'a number other than 0', 0);
  if (channel.range && channel.range[0] >= channel.range[1]) {
    refuse(`${path}.range`, 'the least believable value, then a greater one', channel.range);
  }
  return channel;
}

function readChannels(value: unknown, path: string): readonly ChannelLayout[] {
  return listOf(readChannel, { atLeast: 1 })(value, path);
}

/** The quantity each role reads. A set point may be either; what is `other` is never judged and may have any unit. */
function checkUnit(role: ChannelRole, unit: string, path: string): void {
  if (role === 'other') return;
  const isTemperature = isTemperatureUnit(unit);
  const isPressure = Object.hasOwn(PA_PER_UNIT, unit.replace(/ abs$/, ''));
  if (!isTemperature && !isPressure) {
    const known = ['°C', '°F', ...Object.keys(PA_PER_UNIT)].join(', ');
    throw new DomainError(
      'unit-unknown',
      `${path} is "${unit}"; expected one of ${known}, absolute ones with " abs", or mV with a thermocouple`,
      { key: path, unit },
    );
  }
  const isPressureRole = role === 'pressure' || role === 'vacuum' || role === 'vacuum-source';
  if (isPressureRole && !isPressure) refuse(path, `a unit of pressure for the role "${role}"`, unit);
  if (!isPressureRole && role !== 'setpoint' && !isTemperature) refuse(path, `°C or °F for the role "${role}"`, unit);
}

function checkLines({ header, units, firstReading }: Layout): void {
  if (units === header) refuse('units', 'another line than the headings', units);
  const last = Math.max(header, units ?? 0);
  if (firstReading !== undefined && firstReading <= last) {
    refuse('firstReading', `a line after the headings and units, so ${last + 1} or later`, firstReading);
  }
}
