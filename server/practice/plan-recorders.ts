import type { ChannelLayout } from '../../models/log/layout.ts';
import type { Recorder } from './simulator/recorder.ts';

/** One recorder on each vessel, each with a dialect of its own. */

const INVENTED = 'Skerry Row practice workshop (invented)';

function thermocouples(count: number, unit: '°C' | '°F', column: (n: number) => string): ChannelLayout[] {
  return Array.from({ length: count }, (_, i) => ({ column: column(i + 1), name: `TC${i + 1}`, role: 'part', unit }));
}

/** Two time columns, decimal comma, semicolons, an old Windows code page. */
export const AUTOCLAVE_1_RECORDER: Recorder = {
  name: 'Autoclave 1 recorder',
  vessel: 'Autoclave 1',
  intervalS: 10,
  temperature: { decimals: 1, noise: 0.12 },
  pressure: { decimals: 2, noise: 0.01 },
  vacuum: { decimals: 3, noise: 0.002 },
  absent: '----',
  lineEnd: '\r\n',
  extension: 'csv',
  preamble: [INVENTED, 'Autoclave 1;{run}', 'Export;{date}', ''],
  extra: [{ column: 'Alarm', cell: '0' }],
  layout: {
    format: 'dwellbook-layout/1',
    name: 'Autoclave 1 recorder',
    encoding: 'windows-1252',
    delimiter: ';',
    decimal: ',',
    header: 5,
    units: 6,
    firstReading: 7,
    time: { columns: ['Date', 'Time'], pattern: 'dd/MM/yyyy HH:mm:ss', zone: 'Europe/London' },
    channels: [
      ...thermocouples(8, '°C', (n) => `T${n}`),
      { column: 'T air', name: 'air', role: 'air', unit: '°C' },
      { column: 'SP', name: 'setpoint', role: 'setpoint', unit: '°C' },
      { column: 'P', name: 'vessel pressure', role: 'pressure', unit: 'bar' },
      ...['V1', 'V2', 'V3', 'V4'].map((name): ChannelLayout => ({ column: name, name, role: 'vacuum', unit: 'bar' })),
      { column: 'Pump', name: 'pump', role: 'vacuum-source', unit: 'bar' },
    ],
    missing: ['----', 'OPEN'],
  },
};

/** ISO stamps in universal time, commas, pressure in kPa, vacuum absolute. */
export const AUTOCLAVE_2_RECORDER: Recorder = {
  name: 'Autoclave 2 logger',
  vessel: 'Autoclave 2',
  intervalS: 30,
  temperature: { decimals: 2, noise: 0.08 },
  pressure: { decimals: 1, noise: 0.8 },
  vacuum: { decimals: 0, noise: 1.5 },
  absent: '',
  lineEnd: '\n',
  extension: 'csv',
  preamble: [],
  layout: {
    format: 'dwellbook-layout/1',
    name: 'Autoclave 2 logger',
    delimiter: ',',
    header: 1,
    time: { columns: ['timestamp'], pattern: "yyyy-MM-dd'T'HH:mm:ss'Z'", zone: 'UTC' },
    channels: [
      ...thermocouples(6, '°C', (n) => `part_tc_${n}`),
      { column: 'air_c', name: 'air', role: 'air', unit: '°C' },
      { column: 'setpoint_c', name: 'setpoint', role: 'setpoint', unit: '°C' },
      { column: 'pressure_kpa', name: 'vessel pressure', role: 'pressure', unit: 'kPa' },
      { column: 'bag_1_mbar', name: 'bag 1', role: 'vacuum', unit: 'mbar abs' },
      { column: 'bag_2_mbar', name: 'bag 2', role: 'vacuum', unit: 'mbar abs' },
    ],
  },
};

/** A 12-hour clock, degrees Fahrenheit, inches of mercury, tabs. */
export const OVEN_2_RECORDER: Recorder = {
  name: 'Oven 2 recorder',
  vessel: 'Oven 2',
  intervalS: 60,
  temperature: { decimals: 1, noise: 0.25 },
  pressure: { decimals: 1, noise: 0 },
  vacuum: { decimals: 1, noise: 0.05 },
  absent: 'OPEN',
  lineEnd: '\r\n',
  extension: 'txt',
  preamble: [INVENTED, 'OVEN 2\t{run}'],
  footer: ['', 'END OF RECORD'],
  layout: {
    format: 'dwellbook-layout/1',
    name: 'Oven 2 recorder',
    delimiter: '\t',
    header: 3,
    units: 4,
    firstReading: 5,
    time: { columns: ['Logged'], pattern: 'MM/dd/yyyy hh:mm:ss a', zone: 'Europe/London' },
    channels: [
      ...thermocouples(6, '°F', (n) => `CH ${n}`),
      { column: 'CH 7', name: 'air', role: 'air', unit: '°F' },
      { column: 'VAC 1', name: 'VAC 1', role: 'vacuum', unit: 'inHg' },
      { column: 'VAC 2', name: 'VAC 2', role: 'vacuum', unit: 'inHg' },
    ],
    missing: ['OPEN'],
  },
};

/** Minutes since the press was closed, in UTF-16 with tabs, as its panel writes to a memory stick. */
export const PRESS_1_RECORDER: Recorder = {
  name: 'Press 1 panel',
  vessel: 'Press 1',
  intervalS: 12,
  temperature: { decimals: 1, noise: 0.1 },
  pressure: { decimals: 3, noise: 0.002 },
  vacuum: { decimals: 2, noise: 0 },
  absent: '9999',
  lineEnd: '\r\n',
  byteOrderMark: true,
  extension: 'txt',
  preamble: ['Press 1\t{run}'],
  layout: {
    format: 'dwellbook-layout/1',
    name: 'Press 1 panel',
    encoding: 'utf-16le',
    delimiter: '\t',
    header: 2,
    time: { columns: ['min'], elapsed: 'min', startsAt: '2026-01-01T00:00:00Z' },
    channels: [
      ...thermocouples(4, '°C', (n) => `Skin ${n}`),
      { column: 'Upper platen', name: 'upper platen', role: 'tool', unit: '°C' },
      { column: 'Lower platen', name: 'lower platen', role: 'tool', unit: '°C' },
      { column: 'p', name: 'skin pressure', role: 'pressure', unit: 'MPa' },
    ],
    missing: ['9999'],
  },
};

/** A repair console that never left winter time: whole degrees Fahrenheit once a minute. */
export const BLANKET_1_RECORDER: Recorder = {
  name: 'Blanket console 1',
  vessel: 'Heat blanket 1',
  intervalS: 60,
  temperature: { decimals: 0, noise: 0.3 },
  pressure: { decimals: 1, noise: 0 },
  vacuum: { decimals: 1, noise: 0.08 },
  absent: '----',
  lineEnd: '\n',
  extension: 'csv',
  preamble: [INVENTED, 'console 1;{run}', 'clock kept on winter time'],
  layout: {
    format: 'dwellbook-layout/1',
    name: 'Blanket console 1',
    delimiter: ';',
    header: 4,
    time: { columns: ['at'], pattern: 'yyyy-MM-dd HH:mm', zone: '+00:00' },
    channels: [
      ...thermocouples(5, '°F', (n) => `zone ${n}`),
      { column: 'blanket', name: 'blanket', role: 'other', unit: '°F' },
      { column: 'vacuum', name: 'vacuum', role: 'vacuum', unit: 'inHg' },
    ],
    missing: ['----'],
  },
};

/** New, and not set up in the product yet: one stamp column, semicolons, decimal commas. */
export const OVEN_1_RECORDER: Recorder = {
  name: 'Oven 1 recorder',
  vessel: 'Oven 1',
  intervalS: 30,
  temperature: { decimals: 1, noise: 0.15 },
  pressure: { decimals: 1, noise: 0 },
  vacuum: { decimals: 0, noise: 2 },
  absent: '----',
  lineEnd: '\r\n',
  extension: 'csv',
  preamble: ['Oven 1;{run}'],
  layout: {
    format: 'dwellbook-layout/1',
    name: 'Oven 1 recorder',
    delimiter: ';',
    decimal: ',',
    header: 2,
    units: 3,
    time: { columns: ['Stamp'], pattern: 'dd.MM.yyyy HH:mm:ss', zone: 'Europe/London' },
    channels: [
      ...thermocouples(6, '°C', (n) => `Part ${n}`),
      { column: 'Air', name: 'air', role: 'air', unit: '°C' },
      { column: 'Bag 1', name: 'VAC 1', role: 'vacuum', unit: 'mbar' },
      { column: 'Bag 2', name: 'VAC 2', role: 'vacuum', unit: 'mbar' },
    ],
    missing: ['----'],
  },
};

/** Those the product knows. */
export const RECORDERS: readonly Recorder[] = [
  AUTOCLAVE_1_RECORDER,
  AUTOCLAVE_2_RECORDER,
  OVEN_2_RECORDER,
  PRESS_1_RECORDER,
  BLANKET_1_RECORDER,
];
