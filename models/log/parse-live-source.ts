import { format, number, object, type Read, refuse, text } from '../document.ts';
import { DomainError } from '../errors.ts';
import type { ChannelLayout } from './layout.ts';
import { type LiveSource, SOURCE_KINDS, type SourceReads } from './live-source.ts';
import { parseChannels, parseLayout } from './parse-layout.ts';
import { readModbusRtu, readModbusTcp } from './parse-modbus-reads.ts';
import { readMqtt } from './parse-mqtt-reads.ts';
import { only, recordOf } from './source-fields.ts';

/** Longest and shortest time between scans that is listened for, s. */
const INTERVAL_S = { atLeast: 0.1, atMost: 3600 };

/** The source document as typed; every wrong, unknown or missing key is refused by its path. */
export function parseLiveSource(document: unknown): LiveSource {
  const source = readSource(document, '');
  const names = source.channels.map(({ name }) => name);
  const { reads } = source;
  if (reads.kind === 'modbus-tcp' || reads.kind === 'modbus-rtu') oneForEach(names, reads.registers, 'registers');
  if (reads.kind === 'mqtt') oneForEach(names, reads.topics, 'topics');
  if (reads.kind === 'gauge') oneForEach(names, reads.readingError, 'readingError');
  if (reads.kind === 'growing-files') sameChannels(source.channels, reads.layout.channels);
  return source;
}

const readSource = object<LiveSource>((fields) => ({
  format: fields.required('format', format('dwellbook-source/1')),
  name: fields.required('name', text),
  intervalS: fields.required('intervalS', number(INTERVAL_S)),
  reads: fields.required('reads', readReads),
  channels: fields.required('channels', readChannels),
}));

/** The load of a run says which parts a channel belongs to. */
function readChannels(value: unknown): readonly ChannelLayout[] {
  return parseChannels(value).map((channel, i) =>
    channel.parts === undefined ? channel : refuse(`channels[${i}].parts`, 'no such key', channel.parts),
  );
}

function readReads(value: unknown, path: string): SourceReads {
  const kind = (value as { readonly kind?: unknown } | null)?.kind;
  const read = typeof kind === 'string' && Object.hasOwn(READ_BY_KIND, kind) ? READ_BY_KIND[kind] : undefined;
  return read ? read(value, path) : refuse(`${path}.kind`, `one of ${SOURCE_KINDS.join(', ')}`, kind ?? null);
}

const readPush = object<SourceReads>((fields) => ({ kind: fields.required('kind', only('push')) }));

const readGrowingFiles = object<SourceReads>((fields) => ({
  kind: fields.required('kind', only('growing-files')),
  folder: fields.required('folder', text),
  layout: fields.required('layout', readLogLayout),
}));

const readGauge = object<SourceReads>((fields) => ({
  kind: fields.required('kind', only('gauge')),
  readingError: fields.required('readingError', recordOf(number({ above: 0 }))),
}));

const readPractice = object<SourceReads>((fields) => ({
  kind: fields.required('kind', only('practice')),
  speed: fields.required('speed', number({ atLeast: 1, atMost: 600 })),
  cycle: fields.required(
    'cycle',
    object((cycle) => ({ code: cycle.required('code', text), issue: cycle.required('issue', text) })),
  ),
}));

const READ_BY_KIND: Readonly<Record<string, Read<SourceReads>>> = {
  push: readPush,
  'modbus-tcp': readModbusTcp,
  'modbus-rtu': readModbusRtu,
  mqtt: readMqtt,
  'growing-files': readGrowingFiles,
  gauge: readGauge,
  practice: readPractice,
};

function readLogLayout(value: unknown, path: string) {
  try {
    const layout = parseLayout(value);
    return 'elapsed' in layout.time
      ? refuse('time', 'stamps with date and time: a file that counts from its own start does not say when', 'elapsed')
      : layout;
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const key = `${path}.${error.facts.key ?? ''}`;
    throw new DomainError(error.code, `${path}.${error.message}`, { ...error.facts, key });
  }
}

/** A key for each channel, and none besides. */
function oneForEach(names: readonly string[], by: Readonly<Record<string, unknown>>, key: string): void {
  for (const name of names) {
    if (Object.hasOwn(by, name)) continue;
    const path = `reads.${key}.${name}`;
    throw new DomainError('document-missing-key', `${path} is missing; every channel has one`, { key: path });
  }
  for (const name of Object.keys(by)) {
    if (names.includes(name)) continue;
    const path = `reads.${key}.${name}`;
    throw new DomainError('channel-unknown', `${path}: no channel has that name; there are ${names.join(', ')}`, {
      key: path,
      channel: name,
    });
  }
}

function sameChannels(channels: readonly ChannelLayout[], inLayout: readonly ChannelLayout[]): void {
  const written = (channel: ChannelLayout | undefined) =>
    JSON.stringify(Object.entries(channel ?? {}).sort(([a], [b]) => (a < b ? -1 : 1)));
  for (let i = 0; i < Math.max(channels.length, inLayout.length); i++) {
    if (written(channels[i]) === written(inLayout[i])) continue;
    refuse(`channels[${i}]`, `the channel of reads.layout.channels[${i}], word for word`, channels[i] ?? null);
  }
}
