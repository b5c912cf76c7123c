/** Scans in the order of the files' lines, before any repair. */
export interface Scans {
  readonly count: number;
  /** [count], stamps as the clock showed them, or instants where the layout's stamps are instants. */
  readonly stampMs: Float64Array;
  /** [count], line of the file, counted from 1. */
  readonly line: Uint32Array;
  /** [channels][count], figures as in the file; NaN is absent. */
  readonly values: readonly Float64Array[];
  /** First scan of each file. */
  readonly firstOfFile: readonly number[];
}

/**
 * Takes scans one by one. The one being written stands at `place` of `stampMs` and each of `values`, and counts once
 * {@link nextScan} was called.
 */
export interface ScanTable {
  place: number;
  /** Scans in `full`. */
  before: number;
  stampMs: Float64Array;
  line: Uint32Array;
  values: readonly Float64Array[];
  /** Blocks that are full: kept apart, so that a long log is copied once and not at every doubling. */
  readonly full: Block[];
  readonly firstOfFile: number[];
}

interface Block {
  readonly stampMs: Float64Array;
  readonly line: Uint32Array;
  readonly values: readonly Float64Array[];
}

const FIRST_BLOCK_SCANS = 1 << 8;
const LARGEST_BLOCK_SCANS = 1 << 13;

export function createScanTable(channels: number): ScanTable {
  return { place: 0, before: 0, ...emptyBlock(channels, FIRST_BLOCK_SCANS), full: [], firstOfFile: [] };
}

function emptyBlock(channels: number, scans: number): Block {
  return {
    stampMs: new Float64Array(scans),
    line: new Uint32Array(scans),
    values: Array.from({ length: channels }, () => new Float64Array(scans)),
  };
}

/** Scans taken so far. */
export function scansTaken(table: ScanTable): number {
  return table.before + table.place;
}

/** The scan at `place`, which stood on `line`, is done. */
export function nextScan(table: ScanTable, line: number): void {
  table.line[table.place++] = line;
  const size = table.line.length;
  if (table.place < size) return;
  const { stampMs, line: lines, values } = table;
  table.full.push({ stampMs, line: lines, values });
  table.before += size;
  table.place = 0;
  Object.assign(table, emptyBlock(values.length, Math.min(size * 2, LARGEST_BLOCK_SCANS)));
}

/** All scans in one piece. */
export function finishScans(table: ScanTable): Scans {
  const count = scansTaken(table);
  const blocks = [...table.full.splice(0), lastBlock(table)];
  const stampMs = new Float64Array(count);
  const line = new Uint32Array(count);
  const values = table.values.map(() => new Float64Array(count));
  let from = 0;
  while (blocks.length > 0) {
    const block = blocks.shift()!; // let go as it is copied, so that a long log is not held twice
    stampMs.set(block.stampMs, from);
    line.set(block.line, from);
    for (const [channel, figures] of values.entries()) figures.set(block.values[channel]!, from);
    from += block.line.length;
  }
  return { count, stampMs, line, values, firstOfFile: table.firstOfFile };
}

function lastBlock({ place, stampMs, line, values }: ScanTable): Block {
  return {
    stampMs: stampMs.subarray(0, place),
    line: line.subarray(0, place),
    values: values.map((figures) => figures.subarray(0, place)),
  };
}

/** The file a scan came from, as its index in the order the files were given. */
export function fileOf(scans: Scans, scan: number): number {
  let file = scans.firstOfFile.length - 1;
  while (file > 0 && scans.firstOfFile[file]! > scan) file--;
  return file;
}
