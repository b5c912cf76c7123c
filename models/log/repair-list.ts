import type { Repair, RepairKind } from './readings.ts';
import { fileOf, type Scans } from './scan-table.ts';

/** Most entries of one kind for one file; beyond that they become one. */
const MOST_ENTRIES = 20;

/** What was done to the times, by kind, with the lines it touched. */
export interface RepairList {
  readonly repairs: Repair[];
  /** Lists scans that were touched; `because` is a sentence that fits each stretch of them. */
  add(kind: RepairKind, scans: readonly number[], because: string): void;
}

export function repairList(log: Scans): RepairList {
  const repairs: Repair[] = [];
  return {
    repairs,
    add(kind, scans, because) {
      for (const [file, first] of log.firstOfFile.entries()) {
        const until = log.firstOfFile[file + 1] ?? log.count;
        const ofFile = scans.filter((scan) => scan >= first && scan < until).sort((a, b) => a - b);
        const stretches = neighbours(ofFile);
        const few = stretches.length <= MOST_ENTRIES ? stretches : [ofFile];
        for (const stretch of few) {
          const lines = [log.line[stretch[0]!]!, log.line[stretch.at(-1)!]!] as const;
          repairs.push({ kind, file, lines, scans: stretch.length, because });
        }
      }
    },
  };
}

/** `t.csv, line 302`, for refusals. */
export function placeOf(log: Scans, files: readonly string[], scan: number): { file: string; line: number } {
  return { file: files[fileOf(log, scan)] ?? '', line: log.line[scan]! };
}

/** Stretches of scans that stand next to each other, or one apart as where every other is touched. */
function neighbours(scans: readonly number[]): number[][] {
  const stretches: number[][] = [];
  for (const scan of scans) {
    const last = stretches.at(-1);
    if (last && scan - last.at(-1)! <= 2) last.push(scan);
    else stretches.push([scan]);
  }
  return stretches;
}
