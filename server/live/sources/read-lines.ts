import { DomainError } from '../../../models/errors.ts';
import type { Layout } from '../../../models/log/layout.ts';
import { type GrownScan, readGrowth } from '../../../models/log/read-growth.ts';
import type { PassedOver, Repair } from '../../../models/log/readings.ts';
import { lineStarts } from './line-ends.ts';

export interface Lines {
  readonly name: string;
  /** Everything above the first reading. */
  readonly head: Uint8Array;
  /** Whole lines that were read before. */
  readonly before: Uint8Array;
  /** Whole lines to be read now. */
  readonly fresh: Uint8Array;
  /** Line of the file the fresh ones begin with, counted from 1. */
  readonly firstLine: number;
  /** There is nothing more to read them beside. */
  readonly isAll: boolean;
}

export interface ReadLines {
  readonly scans: readonly GrownScan[];
  readonly repairs: readonly Repair[];
  /** What was done to the times, and lines that could not be read, with the lines of the file. */
  readonly notes: readonly string[];
  /** First line that could not be read, in words. */
  readonly wrong: string | null;
}

/** Lines one look leaves out before it gives the rest of them up. */
const MOST_LEFT_OUT = 20;

/** Reads fresh lines beside those before them. A line that cannot be read is left out and named; the others count. */
export function readLines(lines: Lines, layout: Layout): ReadLines {
  const { name, head } = lines;
  const body = bodyOf(lines, layout);
  const above = lineStarts(head, layout.encoding ?? 'utf-8').length - 1;
  const notes: string[] = [];
  const wrong: string[] = [];
  const complain = (sentence: string) => {
    notes.push(sentence);
    wrong.push(sentence);
  };
  for (;;) {
    const fileLine = (line: number) => body[Math.max(line - above - 1, body.findIndex(isFresh))]?.line ?? 0;
    try {
      const chunks = [head, ...body.map(({ bytes }) => bytes)];
      const { scans, repairs, passedOver } = readGrowth({ name, chunks }, layout, above + body.findIndex(isFresh));
      for (const { kind, lines: range } of passedOver) {
        if (!HOLDS_TEXT.has(kind)) continue;
        complain(`${name}, ${span(range, fileLine)} left out: no reading stands there`);
      }
      for (const { lines: range, because } of repairs) notes.push(`${name}, ${span(range, fileLine)}: ${because}`);
      return { scans, repairs, notes, wrong: wrong[0] ?? null };
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      if (error.code === 'log-time-ambiguous' && !lines.isAll) throw error;
      const nothing = { scans: [], repairs: [], notes, wrong: wrong[0] ?? null };
      if (error.code === 'log-no-readings' || !body.some(isFresh)) return nothing;
      const at = Number(error.facts.line ?? 0) - above - 1;
      const bad = body[at];
      if (bad === undefined) throw error;
      if (bad.isFresh && wrong.length === MOST_LEFT_OUT) {
        complain(`${name}, from line ${bad.line} on: ${body.length - at} lines left out`);
        return { ...nothing, wrong: wrong[0] ?? null };
      }
      if (bad.isFresh) complain(`${name}, line ${bad.line} left out: ${withoutPlace(error.message)}`);
      body.splice(at, 1);
    }
  }
}

const HOLDS_TEXT: ReadonlySet<PassedOver['kind']> = new Set(['after-last-reading', 'truncated-last-line']);

interface BodyLine {
  readonly bytes: Uint8Array;
  readonly isFresh: boolean;
  /** Its number in the file, counted from 1; 0 of one that was read before. */
  readonly line: number;
}

function isFresh(line: BodyLine): boolean {
  return line.isFresh;
}

function bodyOf({ before, fresh, firstLine }: Lines, { encoding = 'utf-8' }: Layout): BodyLine[] {
  const cut = (bytes: Uint8Array) => {
    const starts = lineStarts(bytes, encoding);
    return starts.slice(0, -1).map((from, i) => bytes.subarray(from, starts[i + 1]));
  };
  return [
    ...cut(before).map((bytes) => ({ bytes, isFresh: false, line: 0 })),
    ...cut(fresh).map((bytes, i) => ({ bytes, isFresh: true, line: firstLine + i })),
  ];
}

function span([from, until]: readonly [number, number], fileLine: (line: number) => number): string {
  const [first, last] = [fileLine(from), fileLine(until)];
  return first === last ? `line ${first}` : `lines ${first} to ${last}`;
}

/** The place in the refusal is that in the lines that were read, not in the file. */
function withoutPlace(message: string): string {
  return message.replace(/^.*?\bline \d+(?:,? column [^:]*)?[:,]?\s*/, '');
}
