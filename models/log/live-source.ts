import type { ChannelLayout, Layout } from './layout.ts';

/** What a live source sends and how it is asked: the source document (`dwellbook-source/1`). It only ever reads. */
export interface LiveSource {
  readonly format: 'dwellbook-source/1';
  readonly name: string;
  /** Seconds between scans as they are meant to come; what is silent for longer than five of them is told. */
  readonly intervalS: number;
  readonly reads: SourceReads;
  /** `column` says where at the source a channel's figure is: a key, a register, a topic. */
  readonly channels: readonly ChannelLayout[];
}

export const SOURCE_KINDS = ['push', 'modbus-tcp', 'modbus-rtu', 'mqtt', 'growing-files', 'gauge', 'practice'] as const;
export type SourceKind = (typeof SOURCE_KINDS)[number];

/** How each kind is reached. */
export type SourceReads =
  /** A sender posts scans; `column` is the key of the figure in `values`. */
  | { readonly kind: 'push' }
  | ({ readonly kind: 'modbus-tcp'; readonly host: string; readonly port: number } & ModbusReads)
  | ({
      readonly kind: 'modbus-rtu';
      readonly port: string;
      readonly baud: number;
      readonly parity: 'none' | 'even' | 'odd';
      readonly stopBits: 1 | 2;
    } & ModbusReads)
  | MqttReads
  /** Files another program writes into a folder: they grow, they are begun anew, they overlap. */
  | { readonly kind: 'growing-files'; readonly folder: string; readonly layout: Layout }
  /** A person reads a gauge; `readingError` is half the least division they can tell, in the channel's unit. */
  | { readonly kind: 'gauge'; readonly readingError: Readonly<Record<string, number>> }
  /** An invented vessel that runs a cycle's programme faster than the clock; for practice only. */
  | {
      readonly kind: 'practice';
      readonly speed: number;
      readonly cycle: { readonly code: string; readonly issue: string };
    };

export interface ModbusReads {
  /** One for each channel, by the channel's name. */
  readonly registers: Readonly<Record<string, ModbusRegister>>;
}

export interface ModbusRegister {
  readonly unitId: number;
  /** Function code 04 reads input, 03 holding registers; there is no other. */
  readonly table: 'input' | 'holding';
  /** On the wire, counted from 0. Documents often count from 1, or from 30001 and 40001. */
  readonly address: number;
  readonly type: 'int16' | 'uint16' | 'int32' | 'uint32' | 'float32';
  /** Order of the two registers of a 32-bit figure. */
  readonly words?: 'high-first' | 'low-first';
  /** Figures, before any scale, that mean "no reading": `32768`, `65535`. */
  readonly notAvailable?: readonly number[];
}

export interface MqttReads {
  readonly kind: 'mqtt';
  /** `mqtt://host:1883` or `mqtts://…`. */
  readonly broker: string;
  readonly user?: string;
  /** Kept beside the document, never in it: the document is shown and hashed. */
  readonly hasPassword?: boolean;
  readonly topics: Readonly<Record<string, MqttTopic>>;
  /** Where in a message the sender's own instant stands (ISO 8601, or s or ms since 1970); absent: the arrival counts. */
  readonly timePointer?: string;
  /** Where the sender's sequence number stands. */
  readonly sequencePointer?: string;
}

/** A channel's figure: the message itself, or what a JSON pointer finds in it. */
export interface MqttTopic {
  readonly topic: string;
  readonly pointer?: string;
}

/** One scan as a source brings it. */
export interface LiveScan {
  /** Ms since 1970-01-01T00:00:00Z, by the sender's clock where it sends one. */
  readonly timeMs: number;
  /** The sender's sequence number; null where it sends none. */
  readonly sequence: number | null;
  /** [channels], figures before `scale` and `offset`, in the order of the document's channels; `NaN` is absent. */
  readonly figures: Float64Array;
}
