import type { FileHandle } from 'node:fs/promises';
import { DomainError } from '../../../models/errors.ts';
import type { Layout } from '../../../models/log/layout.ts';
import type { GrownScan } from '../../../models/log/read-growth.ts';
import { firstReadingLine } from '../../../models/log/read-top.ts';
import { endOfLastLine, lineStarts } from './line-ends.ts';
import { type Lines, type ReadLines, readLines } from './read-lines.ts';

/** How far a file is read. */
export interface GrownFile {
  /** Everything above the first reading; null until it is whole. */
  head: Uint8Array | null;
  /** Bytes that are read, whole lines all of them. */
  offset: number;
  lines: number;
  /** The last bytes before `offset`: other ones there are another file. */
  tail: Uint8Array;
  /** What a clock that was set back took, ms: added from there on. */
  addedMs: number;
}

/** What one look at a file brought; nothing of it counts until `done`. */
export interface Look {
  readonly scans: readonly GrownScan[];
  readonly notes: readonly string[];
  readonly wrong: string | null;
  /** More stands there than one look reads. */
  readonly isMore: boolean;
  /** Takes it that these lines are read. */
  readonly done: () => void;
}

/** Bytes one look reads: some 10 ms of work. */
const PORTION_BYTES = 1 << 18;
/** Read again beside what is new, to see repairs by; and where that does not tell, this much. */
const BEFORE_BYTES = 1 << 15;
const LONG_BEFORE_BYTES = 1 << 24;
const TAIL_BYTES = 64;
/** Nothing above the readings is longer. */
const MOST_HEAD_BYTES = 1 << 20;

export function unreadFile(): GrownFile {
  return { head: null, offset: 0, lines: 0, tail: new Uint8Array(0), addedMs: 0 };
}

/** Whether what was read still stands there; it does not where a file was begun anew in its place. */
export async function isSameFile(file: GrownFile, handle: FileHandle, size: number): Promise<boolean> {
  if (size < file.offset) return false;
  const { tail, offset } = file;
  return Buffer.from(tail).equals(await bytesAt(handle, offset - tail.length, tail.length));
}

/** Reads the next whole lines of a file; null where there are none yet. */
export async function lookAt(
  file: GrownFile,
  handle: FileHandle,
  { name, size, layout }: { readonly name: string; readonly size: number; readonly layout: Layout },
): Promise<Look | null> {
  const encoding = layout.encoding ?? 'utf-8';
  if (file.head === null && !(await readHead(file, handle, size, layout))) {
    if (size < MOST_HEAD_BYTES) return null;
    throw new DomainError('log-no-readings', `${name}: its layout expects more lines above the readings`, {
      file: name,
    });
  }
  const head = file.head ?? new Uint8Array(0);
  const bytes = await bytesAt(handle, file.offset, Math.min(PORTION_BYTES, size - file.offset));
  const fresh = bytes.subarray(0, endOfLastLine(bytes, encoding));
  if (fresh.length === 0) {
    if (bytes.length < PORTION_BYTES) return null;
    throw new DomainError('log-line-too-long', `${name}: a line is longer than ${PORTION_BYTES} bytes`, { file: name });
  }
  const linesBefore = async (most: number) => {
    const from = Math.max(head.length, file.offset - most);
    const before = await bytesAt(handle, from, file.offset - from);
    return from === head.length ? before : before.subarray(lineStarts(before, encoding)[1] ?? before.length);
  };
  const lines = { name, head, fresh, firstLine: file.lines + 1 };
  const { read, addedMs } = await readBeside(lines, layout, file, linesBefore);
  return {
    scans: read.scans,
    notes: read.notes,
    wrong: read.wrong,
    isMore: file.offset + bytes.length < size,
    done() {
      file.offset += fresh.length;
      file.lines += lineStarts(fresh, encoding).length - 1;
      file.tail = Buffer.concat([file.tail, fresh]).subarray(-TAIL_BYTES);
      file.addedMs = addedMs;
    },
  };
}

type FreshLines = Omit<Lines, 'before' | 'isAll'>;

/** Reads beside a little of what is before; beside much of it where only that tells what became of the clock. */
async function readBeside(
  lines: FreshLines,
  layout: Layout,
  file: GrownFile,
  linesBefore: (most: number) => Promise<Uint8Array>,
): Promise<{ readonly read: ReadLines; readonly addedMs: number }> {
  try {
    const read = readLines({ ...lines, before: await linesBefore(BEFORE_BYTES), isAll: false }, layout);
    if (!read.repairs.some(({ kind }) => NEEDS_MORE.has(kind))) {
      const scans = file.addedMs === 0 ? read.scans : read.scans.map((scan) => later(scan, file.addedMs));
      return { read: { ...read, scans }, addedMs: file.addedMs };
    }
  } catch (error) {
    if (!(error instanceof DomainError) || error.code !== 'log-time-ambiguous') throw error;
  }
  const read = readLines({ ...lines, before: await linesBefore(LONG_BEFORE_BYTES), isAll: true }, layout);
  const wasSetBack = read.repairs.some(({ kind }) => kind === 'clock-set-back');
  return { read, addedMs: wasSetBack ? addedTo(read, lines, layout) : file.addedMs };
}

const NEEDS_MORE: ReadonlySet<string> = new Set(['pieces-put-in-order', 'clock-set-back']);

/** What was added to the last of the lines: the difference to how it reads alone. */
function addedTo({ scans }: ReadLines, lines: FreshLines, layout: Layout): number {
  const starts = lineStarts(lines.fresh, layout.encoding ?? 'utf-8');
  const last = lines.fresh.subarray(starts.at(-2) ?? 0);
  const alone = readLines({ ...lines, before: new Uint8Array(0), fresh: last, isAll: true }, layout).scans.at(-1);
  const beside = scans.at(-1);
  return alone === undefined || beside === undefined ? 0 : beside.timeMs - alone.timeMs;
}

function later({ timeMs, figures }: GrownScan, byMs: number): GrownScan {
  return { timeMs: timeMs + byMs, figures };
}

async function readHead(file: GrownFile, handle: FileHandle, size: number, layout: Layout): Promise<boolean> {
  const bytes = await bytesAt(handle, 0, Math.min(size, MOST_HEAD_BYTES));
  const lines = firstReadingLine(layout) - 1;
  const end = lineStarts(bytes, layout.encoding ?? 'utf-8')[lines];
  if (end === undefined) return false;
  file.head = bytes.subarray(0, end);
  file.offset = end;
  file.lines = lines;
  file.tail = file.head.subarray(-TAIL_BYTES);
  return true;
}

async function bytesAt(handle: FileHandle, from: number, length: number): Promise<Uint8Array> {
  const bytes = Buffer.alloc(Math.max(0, length));
  const { bytesRead } = await handle.read(bytes, 0, bytes.length, from);
  return bytes.subarray(0, bytesRead);
}
