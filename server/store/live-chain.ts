import { createHash, type Hash } from 'node:crypto';
import type { LiveSource } from '../../models/log/live-source.ts';

/**
 * Where the hash of a source's scans stands in an open run: the canonical form of {@link chainOfReadings}, carried on
 * scan by scan. A head is never changed; one more scan makes another.
 */
export interface ChainHead {
  readonly document: LiveSource;
  readonly scans: number;
  readonly firstMs: number | null;
  readonly lastMs: number | null;
  readonly hash: Hash;
  /** Earlier heads to go back to when a scan comes late. */
  readonly marks: readonly ChainHead[];
}

/** A scan as it is kept. */
export interface PackedScan {
  readonly timeMs: number;
  readonly packed: Buffer;
}

export function beginChain(document: LiveSource): ChainHead {
  const names = JSON.stringify(document.channels.map(({ name }) => name));
  const hash = createHash('sha256').update(`${names}\n`);
  return { document, scans: 0, firstMs: null, lastMs: null, hash, marks: [] };
}

/** The head after more scans, each later than all before. */
export function extendChain(head: ChainHead, scans: Iterable<PackedScan>): ChainHead {
  const { document } = head;
  const hash = head.hash.copy();
  const stamp = Buffer.allocUnsafe(8);
  let { scans: count, firstMs, lastMs, marks } = head;
  for (const { timeMs, packed } of scans) {
    if (count > 0 && count % SCANS_BETWEEN_MARKS === 0) {
      marks = [...marks, { document, scans: count, firstMs, lastMs, hash: hash.copy(), marks }];
    }
    stamp.writeDoubleLE(timeMs);
    hash.update(stamp).update(packed);
    firstMs ??= timeMs;
    lastMs = timeMs;
    count += 1;
  }
  return { document, scans: count, firstMs, lastMs, hash, marks };
}

/** The latest earlier head that does not reach `timeMs`. */
export function rewindChain(head: ChainHead, timeMs: number): ChainHead {
  return head.marks.findLast(({ lastMs }) => lastMs !== null && lastMs < timeMs) ?? beginChain(head.document);
}

export function digestOf(head: ChainHead): Buffer {
  return head.hash.copy().digest();
}

/** Rehashing so many scans takes a fraction of a ms; a mark for each would be memory for nothing. */
const SCANS_BETWEEN_MARKS = 512;
