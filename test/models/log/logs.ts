import { DomainError } from '../../../models/errors.ts';
import type { Layout } from '../../../models/log/layout.ts';
import type { LogFile } from '../../../models/log/log-file.ts';
import { parseLayout } from '../../../models/log/parse-layout.ts';
import { type ReadLogOptions, readLog } from '../../../models/log/read-log.ts';
import type { ReadLog } from '../../../models/log/readings.ts';

/** A plain layout: comma, point, headings in line 1, ISO stamps, two thermocouples; changed by what is given. */
export function layoutOf(changes: object = {}): Layout {
  return parseLayout({
    format: 'dwellbook-layout/1',
    name: 'trial',
    header: 1,
    time: { columns: ['Stamp'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: 'UTC' },
    channels: [
      { column: 'T1', name: 'TC1', role: 'part', unit: '°C' },
      { column: 'T2', name: 'TC2', role: 'part', unit: '°C' },
    ],
    missing: ['OPEN'],
    ...changes,
  });
}

export function fileOf(text: string | Uint8Array, name = 'run.csv'): LogFile {
  return { name, chunks: [typeof text === 'string' ? new TextEncoder().encode(text) : text] };
}

export function read(text: string | Uint8Array, changes: object = {}, options: ReadLogOptions = {}): ReadLog {
  return readLog([fileOf(text)], layoutOf(changes), options);
}

/** Scans as rows, `NaN` as null: easy to compare whole. */
export function rowsOf({ readings }: ReadLog): [string, ...(number | null)[]][] {
  return [...readings.timeMs].map((timeMs, i) => [
    new Date(timeMs).toISOString().replace('.000Z', 'Z'),
    ...readings.channels.map(({ value }) => (Number.isNaN(value[i]!) ? null : value[i]!)),
  ]);
}

/** The refusal of a call; fails the test where there is none, or where it is no DomainError. */
export function refusalOf(call: () => unknown): DomainError {
  try {
    call();
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
  throw new Error('nothing was refused');
}
