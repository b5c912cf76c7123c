import { DomainError } from '../../models/errors.ts';
import type { ChannelLayout } from '../../models/log/layout.ts';
import type { Readings } from '../../models/log/readings.ts';
import type { Db } from './database.ts';
import { packColumn, unpackColumn } from './pack-column.ts';

/** Scans in one block: 0.1 °C data with noise then fills about one database page a column. */
export const SCANS_IN_BLOCK = 8192;

const TIME_COLUMN = 0;

/** One column of one stretch of scans, packed. */
export interface Block {
  readonly column: number;
  readonly first: number;
  readonly scans: number;
  readonly packed: Buffer;
}

/** Readings as blocks, one after another, each packed when it is asked for. */
export function* packReadings(readings: Readings, scansInBlock = SCANS_IN_BLOCK): Generator<Block> {
  const columns = [readings.timeMs, ...readings.channels.map(({ value }) => value)];
  for (const [column, value] of columns.entries()) {
    for (let first = 0; first < value.length; first += scansInBlock) {
      const stretch = value.subarray(first, first + scansInBlock);
      const packed = packColumn(stretch, column === TIME_COLUMN ? 2 : 1);
      yield { column, first, scans: stretch.length, packed };
    }
  }
}

/** Whether a block holds these readings, figure for figure. */
export function holdsReadings({ column, first, scans, packed }: Block, readings: Readings): boolean {
  const value = column === TIME_COLUMN ? readings.timeMs : readings.channels[column - 1]?.value;
  const unpacked = unpackColumn(packed, scans);
  // Zero and minus zero are one figure, as in the hash; an absent one is only ever absent.
  return value !== undefined && unpacked.every((figure, n) => Object.is(figure + 0, (value[first + n] ?? 0) + 0));
}

/** Writes a source's readings as blocks: one column of one stretch of scans a row. */
export function insertReadings(db: Db, sourceId: number, readings: Readings, scansInBlock = SCANS_IN_BLOCK): void {
  insertBlocks(db, sourceId, packReadings(readings, scansInBlock));
}

export function insertBlocks(db: Db, sourceId: number, blocks: Iterable<Block>): void {
  const insert = db.prepare<[number, number, number, number, Buffer]>(
    'INSERT INTO reading_blocks (source_id, column_n, first_scan, scans, packed) VALUES (?, ?, ?, ?, ?)',
  );
  for (const { column, first, scans, packed } of blocks) insert.run(sourceId, column, first, scans, packed);
}

/** Whether exactly these blocks stand in the database, byte for byte. */
export function areStored(db: Db, sourceId: number, blocks: readonly Block[]): boolean {
  const rows = db
    .prepare<[number], BlockRow>(
      `SELECT column_n, first_scan, scans, packed FROM reading_blocks WHERE source_id = ?
       ORDER BY column_n, first_scan`,
    )
    .all(sourceId);
  return (
    rows.length === blocks.length &&
    blocks.every((block, n) => {
      const row = rows[n];
      return (
        row?.column_n === block.column &&
        row.first_scan === block.first &&
        row.scans === block.scans &&
        row.packed.equals(block.packed)
      );
    })
  );
}

/** Reads a source's readings whole, as they were written. */
export function readReadings(db: Db, sourceId: number, scans: number, channels: readonly ChannelLayout[]): Readings {
  const columns = Array.from({ length: channels.length + 1 }, () => new Float64Array(scans));
  let read = 0;
  for (const block of db
    .prepare<[number], BlockRow>('SELECT column_n, first_scan, scans, packed FROM reading_blocks WHERE source_id = ?')
    .iterate(sourceId)) {
    const column = columns[block.column_n];
    if (column === undefined || block.first_scan + block.scans > scans) throw damaged(sourceId);
    column.set(unpackColumn(block.packed, block.scans), block.first_scan);
    read += block.scans;
  }
  if (read !== scans * columns.length) throw damaged(sourceId);
  const [timeMs = new Float64Array(), ...values] = columns;
  return {
    timeMs,
    channels: channels.map((channel, n) => ({ channel, value: values[n] ?? new Float64Array() })),
  };
}

interface BlockRow {
  readonly column_n: number;
  readonly first_scan: number;
  readonly scans: number;
  readonly packed: Buffer;
}

function damaged(source: number): DomainError {
  return new DomainError('database-damaged', `The readings of source ${source} are not whole`, { source });
}
