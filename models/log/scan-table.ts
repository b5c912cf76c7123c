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
 * Takes scans one by one. The one being written stands at `place` of a small block, its figures side by side from
 * `place * channels` on; it counts once {@link nextScan} was called. Full blocks go into one column a channel.
 */
export interface ScanTable {
  readonly channels: number;
  readonly blockStampMs: Float64Array;
  readonly blockLine: Uint32Array;
  readonly blockFigures: Float64Array;
  place: number;
  /** Scans in the columns. */
  before: number;
  stampMs: Float64Array;
  line: Uint32Array;
  values: Float64Array[];
  readonly firstOfFile: number[];
  /** How many scans may still come, where that can be told: room is then made once. */
  scansToCome: () => number;
}

const BLOCK_SCANS = 1 << 10;

export function createScanTable(channels: number): ScanTable {
  return {
    channels,
    blockStampMs: new Float64Array(BLOCK_SCANS),
    blockLine: new Uint32Array(BLOCK_SCANS),
    blockFigures: new Float64Array(BLOCK_SCANS * channels),
    place: 0,
    before: 0,
    stampMs: new Float64Array(0),
    line: new Uint32Array(0),
    values: Array.from({ length: channels }, () => new Float64Array(0)),
    firstOfFile: [],
    scansToCome: () => 0,
  };
}

/** Scans taken so far. */
export function scansTaken(table: ScanTable): number {
  return table.before + table.place;
}

/** The scan at `place`, which stood on `line`, is done. */
export function nextScan(table: ScanTable, line: number): void {
  table.blockLine[table.place++] = line;
  if (table.place === BLOCK_SCANS) emptyBlock(table);
}

/** All scans in one piece. */
export function finishScans(table: ScanTable): Scans {
  emptyBlock(table);
  const count = table.before;
  const { stampMs, line, values, firstOfFile } = table;
  return {
    count,
    stampMs: stampMs.subarray(0, count),
    line: line.subarray(0, count),
    values: values.map((value) => withoutMuchRoom(value, count)),
    firstOfFile,
  };
}

function emptyBlock(table: ScanTable): void {
  const { channels, place: scans, before, blockFigures } = table;
  makeRoom(table, before + scans);
  table.stampMs.set(table.blockStampMs.subarray(0, scans), before);
  table.line.set(table.blockLine.subarray(0, scans), before);
  for (let channel = 0; channel < channels; channel++) {
    const value = table.values[channel]!;
    for (let scan = 0, at = channel; scan < scans; scan++, at += channels) value[before + scan] = blockFigures[at]!;
  }
  table.before += scans;
  table.place = 0;
}

function makeRoom(table: ScanTable, needed: number): void {
  const had = table.stampMs.length;
  if (needed <= had) return;
  const size = Math.max(needed, Math.min(had * 2, MOST_GUESSED_SCANS), needed + Math.ceil(table.scansToCome()));
  table.stampMs = grown(table.stampMs, new Float64Array(size));
  table.line = grown(table.line, new Uint32Array(size));
  for (let channel = 0; channel < table.channels; channel++) {
    table.values[channel] = grown(table.values[channel]!, new Float64Array(size));
  }
}

/** Room is doubled up to so many scans, some 190 days at 1 Hz, and then made as it is needed. */
const MOST_GUESSED_SCANS = 1 << 24;

function grown<T extends Float64Array | Uint32Array>(figures: T, larger: T): T {
  larger.set(figures);
  return larger;
}

/** A column's figures, copied only where half of it would be kept for nothing. */
function withoutMuchRoom(value: Float64Array, count: number): Float64Array {
  return value.length - count > value.length / 2 ? value.slice(0, count) : value.subarray(0, count);
}

/** The file a scan came from, as its index in the order the files were given. */
export function fileOf(scans: Scans, scan: number): number {
  let file = scans.firstOfFile.length - 1;
  while (file > 0 && scans.firstOfFile[file]! > scan) file--;
  return file;
}
