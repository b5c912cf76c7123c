import type { ChannelLayout, ChannelRole, Layout } from '../../models/log/layout.ts';
import type { LiveSource, ModbusRegister, SourceKind, SourceReads } from '../../models/log/live-source.ts';
import { numberIn } from './typed.ts';

/** A live source as it stands in a form: text everywhere, every kind's places side by side so that none is lost. */
export interface SourceForm {
  readonly kind: SourceKind;
  readonly name: string;
  readonly intervalS: string;
  readonly channels: readonly SourceChannelForm[];
  readonly host: string;
  readonly port: string;
  readonly serialPort: string;
  readonly baud: string;
  readonly parity: string;
  readonly stopBits: string;
  readonly broker: string;
  readonly user: string;
  readonly password: string;
  readonly timePointer: string;
  readonly sequencePointer: string;
  readonly folder: string;
  readonly layout: Layout | null;
  readonly cycle: string;
  readonly speed: string;
}

export interface SourceChannelForm {
  readonly id: number;
  readonly column: string;
  readonly name: string;
  readonly role: ChannelRole;
  readonly unit: string;
  readonly scale: string;
  readonly offset: string;
  readonly low: string;
  readonly high: string;
  readonly unitId: string;
  readonly table: string;
  readonly address: string;
  readonly type: string;
  readonly words: string;
  readonly notAvailable: string;
  readonly topic: string;
  readonly pointer: string;
  readonly readingError: string;
  /** What a form cannot say of a channel, kept as it was. */
  readonly rest: Partial<ChannelLayout>;
}

export const NEW_SOURCE: SourceForm = {
  kind: 'push',
  name: '',
  intervalS: '1',
  channels: [],
  host: '',
  port: '502',
  serialPort: '',
  baud: '9600',
  parity: 'none',
  stopBits: '1',
  broker: '',
  user: '',
  password: '',
  timePointer: '',
  sequencePointer: '',
  folder: '',
  layout: null,
  cycle: '',
  speed: '60',
};

/** A further channel, named and placed after the ones there are. */
export function newChannel(before: readonly SourceChannelForm[]): SourceChannelForm {
  const id = Math.max(0, ...before.map((channel) => channel.id)) + 1;
  const last = before.at(-1);
  const name = last === undefined ? 'TC1' : followed(last.name);
  return {
    id,
    column: last === undefined ? name : followed(last.column),
    name,
    role: last?.role ?? 'part',
    unit: last?.unit ?? '°C',
    scale: last?.scale ?? '',
    offset: '',
    low: '',
    high: '',
    unitId: last?.unitId ?? '1',
    table: last?.table ?? 'input',
    address: last === undefined ? '0' : String(Number(last.address) + (/32/.test(last.type) ? 2 : 1)),
    type: last?.type ?? 'int16',
    words: last?.words ?? 'high-first',
    notAvailable: last?.notAvailable ?? '',
    topic: last === undefined ? '' : followed(last.topic),
    pointer: last?.pointer ?? '',
    readingError: last?.readingError ?? '',
    rest: {},
  };
}

/** `TC1` → `TC2`; a name without a number stays. */
function followed(name: string): string {
  return name.replace(/\d+$/, (digits) => String(Number(digits) + 1).padStart(digits.length, '0'));
}

/** Channels most vessels have, to begin from. */
export function usualChannels(): readonly SourceChannelForm[] {
  const made: SourceChannelForm[] = [];
  for (const [name, role, unit] of USUAL) made.push({ ...newChannel(made), name, column: name, role, unit });
  return made;
}

const USUAL = [
  ['TC1', 'part', '°C'],
  ['TC2', 'part', '°C'],
  ['TC3', 'part', '°C'],
  ['TC4', 'part', '°C'],
  ['air', 'air', '°C'],
  ['pressure', 'pressure', 'bar'],
  ['vacuum 1', 'vacuum', 'bar'],
] as const;

export function formOfSource({ name, intervalS, reads, channels }: LiveSource): SourceForm {
  return {
    ...NEW_SOURCE,
    kind: reads.kind,
    name,
    intervalS: String(intervalS),
    channels: channels.map((channel, n) => channelForm(n + 1, channel, reads)),
    ...placesOf(reads),
  };
}

function placesOf(reads: SourceReads): Partial<SourceForm> {
  switch (reads.kind) {
    case 'modbus-tcp':
      return { host: reads.host, port: String(reads.port) };
    case 'modbus-rtu': {
      const { port, baud, parity, stopBits } = reads;
      return { serialPort: port, baud: String(baud), parity, stopBits: String(stopBits) };
    }
    case 'mqtt': {
      const { broker, user = '', timePointer = '', sequencePointer = '' } = reads;
      return { broker, user, timePointer, sequencePointer };
    }
    case 'growing-files':
      return { folder: reads.folder, layout: reads.layout };
    case 'practice':
      return { speed: String(reads.speed), cycle: `${reads.cycle.code}\t${reads.cycle.issue}` };
    default:
      return {};
  }
}

function channelForm(id: number, channel: ChannelLayout, reads: SourceReads): SourceChannelForm {
  const { column, name, role, unit, scale, offset, range, ...rest } = channel;
  const register = 'registers' in reads ? reads.registers[name] : undefined;
  const topic = reads.kind === 'mqtt' ? reads.topics[name] : undefined;
  const error = reads.kind === 'gauge' ? reads.readingError[name] : undefined;
  return {
    ...newChannel([]),
    id,
    column,
    name,
    role,
    unit,
    scale: text(scale),
    offset: text(offset),
    low: text(range?.[0]),
    high: text(range?.[1]),
    ...(register && {
      unitId: String(register.unitId),
      table: register.table,
      address: String(register.address),
      type: register.type,
      words: register.words ?? 'high-first',
      notAvailable: (register.notAvailable ?? []).join(', '),
    }),
    topic: topic?.topic ?? '',
    pointer: topic?.pointer ?? '',
    readingError: text(error),
    rest,
  };
}

/** The document of a form; what is wrong with it the server says, place by place. */
export function documentOfForm(form: SourceForm): LiveSource {
  const { kind, layout } = form;
  const channels = kind === 'growing-files' ? (layout?.channels ?? []) : form.channels.map(channelLayout);
  return {
    format: 'dwellbook-source/1',
    name: form.name.trim(),
    intervalS: numberIn(form.intervalS) ?? Number.NaN,
    reads: readsOf(form),
    channels,
  };
}

function channelLayout(form: SourceChannelForm): ChannelLayout {
  const [low, high] = [numberIn(form.low), numberIn(form.high)];
  return {
    column: form.column.trim() || form.name.trim(),
    name: form.name.trim(),
    role: form.role,
    unit: form.unit.trim(),
    ...given('scale', numberIn(form.scale)),
    ...given('offset', numberIn(form.offset)),
    ...(low === null || high === null ? {} : { range: [low, high] as const }),
    ...form.rest,
  };
}

function readsOf(form: SourceForm): SourceReads {
  const { kind } = form;
  const byChannel = <T>(of: (channel: SourceChannelForm) => T) =>
    Object.fromEntries(form.channels.map((channel) => [channel.name.trim(), of(channel)]));
  switch (kind) {
    case 'push':
      return { kind };
    case 'modbus-tcp':
      return { kind, host: form.host.trim(), port: Number(form.port), registers: byChannel(registerOf) };
    case 'modbus-rtu': {
      const line = { baud: Number(form.baud), parity: form.parity as 'none', stopBits: Number(form.stopBits) as 1 };
      return { kind, port: form.serialPort.trim(), ...line, registers: byChannel(registerOf) };
    }
    case 'mqtt':
      return {
        kind,
        broker: form.broker.trim(),
        ...given('user', form.user.trim() || null),
        ...(form.password === '' ? {} : { hasPassword: true }),
        topics: byChannel(({ topic, pointer }) => ({
          topic: topic.trim(),
          ...given('pointer', pointer.trim() || null),
        })),
        ...given('timePointer', form.timePointer.trim() || null),
        ...given('sequencePointer', form.sequencePointer.trim() || null),
      };
    case 'growing-files':
      return { kind, folder: form.folder.trim(), layout: form.layout as Layout };
    case 'gauge':
      return { kind, readingError: byChannel(({ readingError }) => numberIn(readingError) ?? Number.NaN) };
    case 'practice': {
      const [code = '', issue = ''] = form.cycle.split('\t');
      return { kind, speed: Number(form.speed), cycle: { code, issue } };
    }
  }
}

function registerOf(form: SourceChannelForm): ModbusRegister {
  const notAvailable = form.notAvailable.split(/[\s,;]+/).filter((one) => one !== '');
  return {
    unitId: Number(form.unitId),
    table: form.table as ModbusRegister['table'],
    address: Number(form.address),
    type: form.type as ModbusRegister['type'],
    ...(/32/.test(form.type) ? { words: form.words as 'high-first' } : {}),
    ...(notAvailable.length > 0 ? { notAvailable: notAvailable.map(Number) } : {}),
  };
}

function given<K extends string, V>(key: K, value: V | null): { [P in K]?: V } {
  return (value === null ? {} : { [key]: value }) as { [P in K]?: V };
}

function text(value: number | undefined): string {
  return value === undefined ? '' : String(value);
}
