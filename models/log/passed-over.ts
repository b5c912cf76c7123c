import type { PassedOver } from './readings.ts';

/** Keeps the lines that were read past, neighbours of one kind as one entry. */
export interface PassedOverList {
  add(kind: PassedOver['kind'], from: number, until?: number): void;
}

export function passedOverList(file: number, all: PassedOver[]): PassedOverList {
  return {
    add(kind, from, until = from) {
      const last = all.at(-1);
      if (last?.file === file && last.kind === kind && last.lines[1] + 1 === from) {
        all[all.length - 1] = { kind, file, lines: [last.lines[0], until] };
      } else {
        all.push({ kind, file, lines: [from, until] });
      }
    },
  };
}
