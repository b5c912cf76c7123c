import { figureFromText } from '../../../models/log/figure.ts';
import type { ChannelLayout } from '../../../models/log/layout.ts';
import type { MqttReads } from '../../../models/log/live-source.ts';
import { atPointer } from './json-pointer.ts';

export interface ChannelFigure {
  readonly channel: number;
  /** NaN is absent. */
  readonly figure: number;
}

/** What a message says; `wrong` is what could not be read of it, with the text itself. */
export interface ReadMessage {
  /** The sender's instant; null where none is mapped. */
  readonly timeMs: number | null;
  readonly sequence: number | null;
  readonly figures: readonly ChannelFigure[];
  readonly wrong: string | null;
}

/** Longer messages hold no scan. */
const MOST_BYTES = 1 << 16;

/** Reads messages by a source's mapping. A message whose instant cannot be read has no figures: nobody knows of when. */
export function messageReader(reads: MqttReads, channels: readonly ChannelLayout[]) {
  const mapped = channels.flatMap(({ name }, channel) => {
    const at = reads.topics[name];
    return at === undefined ? [] : [{ channel, name, ...at }];
  });
  const carriesMore = reads.timePointer !== undefined || reads.sequencePointer !== undefined;

  return (topic: string, payload: Uint8Array): ReadMessage => {
    const own = mapped.filter((one) => one.topic === topic);
    const nothing = (why: string): ReadMessage => ({
      timeMs: null,
      sequence: null,
      figures: [],
      wrong: `${topic}: ${why}`,
    });
    if (payload.length > MOST_BYTES) return nothing(`a message of ${payload.length} bytes`);
    const text = new TextDecoder().decode(payload);
    let document: unknown;
    if (carriesMore || own.some(({ pointer }) => pointer !== undefined)) {
      try {
        document = JSON.parse(text);
      } catch {
        return nothing(`${excerpt(text)} is not JSON`);
      }
    }
    const written = reads.timePointer === undefined ? null : atPointer(document, reads.timePointer);
    const timeMs = written === null ? null : instantOf(written);
    if (Number.isNaN(timeMs)) return nothing(`${reads.timePointer} is ${excerpt(written)}, which is no instant`);
    const counted = reads.sequencePointer === undefined ? null : atPointer(document, reads.sequencePointer);
    const sequence = typeof counted === 'number' && Number.isSafeInteger(counted) && counted >= 0 ? counted : null;
    let wrong: string | null = null;
    const figures = own.map(({ channel, name, pointer }) => {
      const found = pointer === undefined ? text.trim() : atPointer(document, pointer);
      const figure = figureOf(found);
      if (Number.isNaN(figure) && found !== null) {
        const what = found === undefined ? `nothing at ${pointer}` : `${excerpt(found)} is no figure`;
        wrong ??= `${topic}: ${what} (${name})`;
      }
      return { channel, figure };
    });
    return { timeMs, sequence, figures, wrong };
  };
}

function figureOf(found: unknown): number {
  if (typeof found === 'string') return figureFromText(found.trim(), '.');
  return typeof found === 'number' && Number.isFinite(found) ? found : NaN;
}

const EARLIEST_MS = Date.UTC(2000, 0, 1);
const LATEST_MS = Date.UTC(2200, 0, 1);
/** As s since 1970 this is the year 5138; as ms it is 1973. */
const MS_FROM = 1e11;

/** Ms since 1970 of an ISO 8601 instant with its offset, or of s or ms since 1970; NaN for anything else. */
function instantOf(written: unknown): number {
  const isText = typeof written === 'string';
  if (isText && !/^\d{4}-\d\d-\d\dT\d\d:\d\d(?::\d\d(?:\.\d+)?)?(?:Z|[+-]\d\d:?\d\d)$/.test(written)) return NaN;
  const ms = isText
    ? Date.parse(written)
    : typeof written === 'number'
      ? written < MS_FROM
        ? written * 1000
        : written
      : NaN;
  return ms >= EARLIEST_MS && ms < LATEST_MS ? Math.round(ms) : NaN;
}

function excerpt(what: unknown): string {
  const text = typeof what === 'string' ? JSON.stringify(what) : String(JSON.stringify(what));
  return text.length <= 60 ? text : `${text.slice(0, 57)}…`;
}
