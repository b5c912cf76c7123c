/** Scans as they are read, in the order of the files' lines, before any repair. Grows by doubling. */
export interface ScanTable {
  count: number;
  /** [count], stamps as the clock showed them, or instants where the layout's stamps are instants. */
  stampMs: Float64Array;
  /** [count], line of the file, counted from 1. */
  line: Uint32Array;
  /** [channels][count], figures as in the file; NaN is absent. */
  readonly values: Float64Array[];
  /** First scan of each file, so far as begun. */
  readonly firstOfFile: number[];
}

const FIRST_CAPACITY = 1024;

export function createScanTable(channels: number): ScanTable {
  return {
    count: 0,
    stampMs: new Float64Array(FIRST_CAPACITY),
    line: new Uint32Array(FIRST_CAPACITY),
    values: Array.from({ length: channels }, () => new Float64Array(FIRST_CAPACITY)),
    firstOfFile: [],
  };
}

/** Makes room for one more scan. */
export function makeRoom(table: ScanTable): void {
  const capacity = table.stampMs.length;
  if (table.count < capacity) return;
  table.stampMs = doubled(table.stampMs);
  const line = new Uint32Array(capacity * 2);
  line.set(table.line);
  table.line = line;
  for (let channel = 0; channel < table.values.length; channel++) {
    table.values[channel] = doubled(table.values[channel]!);
  }
}

function doubled(figures: Float64Array): Float64Array {
  const larger = new Float64Array(figures.length * 2);
  larger.set(figures);
  return larger;
}

/** The file a scan came from, as its index in the order the files were given. */
export function fileOf(table: ScanTable, scan: number): number {
  let file = table.firstOfFile.length - 1;
  while (file > 0 && table.firstOfFile[file]! > scan) file--;
  return file;
}
