import { medianIntervalMs } from './pieces.ts';
import type { RepairList } from './repair-list.ts';
import type { Scans } from './scan-table.ts';
import { areEqual, KEPT_FIRST } from './scans-sent-twice.ts';

/** Scans of one stamp: places `from` to before `until` of a sequence. */
interface Group {
  readonly from: number;
  readonly until: number;
}

/**
 * Leaves every scan a time of its own. Where the stamps are coarser than the scans, the scans of one stamp are spread
 * evenly up to the next; else the first is kept.
 *
 * Stamps count as coarser where at least half of them stand at several scans with different values, or a tenth and no
 * fewer than three.
 *
 * @returns the scans that stay, in rising time. Changes `timeMs` in place.
 */
export function partSameStamps(
  sequence: readonly number[],
  log: Scans,
  timeMs: Float64Array,
  list: RepairList,
): readonly number[] {
  const groups = groupsOf(sequence, timeMs);
  if (groups.length === sequence.length) return sequence;
  const differing = groups.filter(({ from, until }) =>
    sequence.slice(from + 1, until).some((scan) => !areEqual(log, scan, sequence[from]!)),
  ).length;
  const areCoarse = differing * 2 >= groups.length || (differing * 10 >= groups.length && differing >= 3);
  return areCoarse && groups.length > 1
    ? spread(sequence, groups, timeMs, list)
    : keepFirst(sequence, groups, log, list);
}

function groupsOf(sequence: readonly number[], timeMs: Float64Array): Group[] {
  const groups: Group[] = [];
  let from = 0;
  for (let place = 1; place <= sequence.length; place++) {
    if (place < sequence.length && timeMs[sequence[place]!] === timeMs[sequence[from]!]) continue;
    groups.push({ from, until: place });
    from = place;
  }
  return groups;
}

function spread(
  sequence: readonly number[],
  groups: readonly Group[],
  timeMs: Float64Array,
  list: RepairList,
): readonly number[] {
  const stepMs = medianIntervalMs(sequence, timeMs);
  const sizes = Uint32Array.from(groups, ({ from, until }) => until - from).sort();
  const usualSize = sizes[sizes.length >> 1]!;
  const moved: number[] = [];
  for (const [i, { from, until }] of groups.entries()) {
    const stampMs = timeMs[sequence[from]!]!;
    const next = groups[i + 1];
    const toNextMs = next ? timeMs[sequence[next.from]!]! - stampMs : Number.POSITIVE_INFINITY;
    // Before a pause, and at the end, a stamp may hold fewer scans than it has room for.
    const count = toNextMs > stepMs ? Math.max(until - from, usualSize) : until - from;
    const spacingMs = Math.min(toNextMs, stepMs) / count;
    for (let place = from + 1; place < until; place++) {
      timeMs[sequence[place]!] = stampMs + Math.round((place - from) * spacingMs);
      moved.push(sequence[place]!);
    }
  }
  const because = 'The stamps are coarser than the scans; scans of one stamp were spread evenly up to the next.';
  list.add('stamps-spread', moved, because);
  return sequence;
}

function keepFirst(
  sequence: readonly number[],
  groups: readonly Group[],
  log: Scans,
  list: RepairList,
): readonly number[] {
  const kept: number[] = [];
  const equal: number[] = [];
  const different: number[] = [];
  for (const { from, until } of groups) {
    const first = sequence[from]!;
    kept.push(first);
    for (const scan of sequence.slice(from + 1, until)) (areEqual(log, scan, first) ? equal : different).push(scan);
  }
  list.add(
    'scan-left-out',
    equal,
    'These scans repeat the one above them, equal in stamp and values; they were left out.',
  );
  list.add('stamp-kept-first', different, KEPT_FIRST);
  return kept;
}
