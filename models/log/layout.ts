/** The log layout document: how a recorder's file is to be read (`dwellbook-layout/1`). */

export const CHANNEL_ROLES = [
  'part',
  'tool',
  'air',
  'setpoint',
  'pressure',
  'vacuum',
  'vacuum-source',
  'other',
] as const;
export type ChannelRole = (typeof CHANNEL_ROLES)[number];

export const ENCODINGS = ['utf-8', 'utf-16le', 'utf-16be', 'windows-1252'] as const;
export type LogEncoding = (typeof ENCODINGS)[number];

export const THERMOCOUPLE_TYPES = ['K', 'J', 'T', 'N', 'E'] as const;
export type ThermocoupleType = (typeof THERMOCOUPLE_TYPES)[number];

/** How a recorded emf becomes a temperature. */
export interface Thermocouple {
  readonly type: ThermocoupleType;
  /** Name of the channel of the same log that read the cold junction; or its temperature in °C, where it was held. */
  readonly coldJunction: string | number;
}

export interface ChannelLayout {
  /** Heading of the column in the file; or `#5`, the fifth, where its heading is empty or stands twice. */
  readonly column: string;
  /** What the product calls the channel: `TC1`, `vessel pressure`. */
  readonly name: string;
  readonly role: ChannelRole;
  /** Unit of the readings after `scale` and `offset`: `°C`, `bar`, `mbar abs` …; `mV` where emf was recorded. */
  readonly unit: string;
  /** Multiplies what stands in the file; default 1. */
  readonly scale?: number;
  /** Added after `scale`, in `unit`; default 0. */
  readonly offset?: number;
  /** Least and greatest believable value in `unit`; outside it a reading is absent. Temperatures: −200 to 1372 °C. */
  readonly range?: readonly [number, number];
  /** Expanded uncertainty U (k = 2) in `unit`; of a thermocouple in mV that of its temperature, in °C. */
  readonly uncertainty?: number;
  /** With a `unit` of mV only: what is judged and shown is then the temperature in °C. */
  readonly thermocouple?: Thermocouple;
  /** For a one-off check: the parts this channel belongs to. A stored layout never keeps it. */
  readonly parts?: readonly string[];
}

/**
 * How the time is written: a pattern of Unicode TR 35 letters over its columns joined by a space; time elapsed since an
 * instant; or days of a spreadsheet (1900 system; a day and its part may stand in two columns).
 */
export type TimeLayout =
  | { readonly columns: readonly string[]; readonly pattern: string; readonly zone: string }
  | { readonly columns: readonly string[]; readonly elapsed: 's' | 'min' | 'h'; readonly startsAt: string }
  | { readonly columns: readonly string[]; readonly serialDays: true; readonly zone: string };

export interface Layout {
  readonly format: 'dwellbook-layout/1';
  readonly name: string;
  /** Default utf-8. A byte-order mark must not contradict it. */
  readonly encoding?: LogEncoding;
  /** Default `,`. */
  readonly delimiter?: string;
  /** Default `.`. */
  readonly decimal?: '.' | ',';
  /** Line of the column headings, counted from 1. */
  readonly header: number;
  /** Line of the units, where there is one. */
  readonly units?: number;
  /** Line of the first reading; default: the line after headings and units. */
  readonly firstReading?: number;
  readonly time: TimeLayout;
  readonly channels: readonly ChannelLayout[];
  /** Cells that mean "no reading". An empty cell always does. */
  readonly missing?: readonly string[];
}
