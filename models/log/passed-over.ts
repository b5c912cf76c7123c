import type { PassedOver } from './readings.ts';

/** Keeps the lines that were read past, neighbours of one kind as one entry. */
export interface PassedOverList {
  add(kind: PassedOver['kind'], from: number, until?: number): void;
}

/** Most entries for one file; from then on the last of a kind grows to take the next in, with what lies between. */
const MOST_ENTRIES = 100;

export function passedOverList(file: number, all: PassedOver[]): PassedOverList {
  const first = all.length;
  return {
    add(kind, from, until = from) {
      const isFull = all.length - first >= MOST_ENTRIES;
      const at = isFull ? all.findLastIndex((entry) => entry.file === file && entry.kind === kind) : all.length - 1;
      const last = all[at];
      if (last?.file === file && last.kind === kind && (isFull || last.lines[1] + 1 === from)) {
        all[at] = { kind, file, lines: [last.lines[0], until] };
      } else {
        all.push({ kind, file, lines: [from, until] });
      }
    },
  };
}
