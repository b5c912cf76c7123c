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
 * Takes scans one by one. The one being written stands at `place` of `stampMs`, `line` and each of `values`, and counts
 * once `place` was passed by {@link nextScan}.
 */
export interface ScanTable {
  place: number;
  stampMs: Float64Array;
  line: Uint32Array;
  readonly values: Float64Array[];
  /** Full blocks, each of `BLOCK_SCANS`. */
  readonly full: { stampMs: Float64Array; line: Uint32Array; values: Float64Array[] }[];
  readonly firstOfFile: number[];
}

/** Scans are kept in blocks, so that a long log is copied once and not at every doubling. */
const BLOCK_SCANS = 1 << 13;

export function createScanTable(channels: number): ScanTable {
  return {
    place: 0,
    stampMs: new Float64Array(BLOCK_SCANS),
    line: new Uint32Array(BLOCK_SCANS),
    values: Array.from({ length: channels }, () => new Float64Array(BLOCK_SCANS)),
    full: [],
    firstOfFile: [],
  };
}

/** Scans taken so far. */
export function scansTaken(table: ScanTable): number {
  return table.full.length * BLOCK_SCANS + table.place;
}

/** The scan at `place`, which stood on `line`, is done. */
export function nextScan(table: ScanTable, line: number): void {
  table.line[table.place++] = line;
  if (table.place < BLOCK_SCANS) return;
  table.full.push({ stampMs: table.stampMs, line: table.line, values: [...table.values] });
  table.stampMs = new Float64Array(BLOCK_SCANS);
  table.line = new Uint32Array(BLOCK_SCANS);
  for (let channel = 0; channel < table.values.length; channel++) {
    table.values[channel] = new Float64Array(BLOCK_SCANS);
  }
  table.place = 0;
}

/** All scans in one piece. Empties the table as it goes, so that no more than one channel is held twice. */
export function finishScans(table: ScanTable): Scans {
  const count = scansTaken(table);
  const stampMs = new Float64Array(count);
  const line = new Uint32Array(count);
  for (const [block, full] of table.full.entries()) {
    stampMs.set(full.stampMs, block * BLOCK_SCANS);
    line.set(full.line, block * BLOCK_SCANS);
  }
  stampMs.set(table.stampMs.subarray(0, table.place), count - table.place);
  line.set(table.line.subarray(0, table.place), count - table.place);
  const values = table.values.map((last, channel) => {
    const figures = new Float64Array(count);
    for (const [block, full] of table.full.entries()) {
      figures.set(full.values[channel]!, block * BLOCK_SCANS);
      full.values[channel] = new Float64Array(0);
    }
    figures.set(last.subarray(0, table.place), count - table.place);
    return figures;
  });
  return { count, stampMs, line, values, firstOfFile: table.firstOfFile };
}

/** The file a scan came from, as its index in the order the files were given. */
export function fileOf(scans: Scans, scan: number): number {
  let file = scans.firstOfFile.length - 1;
  while (file > 0 && scans.firstOfFile[file]! > scan) file--;
  return file;
}
