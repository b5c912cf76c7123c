import type { Response } from 'express';

/** One server-sent event. */
export interface ServerEvent {
  readonly event: string;
  readonly data: unknown;
  /** What a reader names to go on after it. */
  readonly id?: string | number;
}

/** An answer that goes on: `open` is given a way to send and answers how to end it. */
export interface EventStream {
  readonly open: (send: (event: ServerEvent) => void, end: () => void) => () => void;
}

const HEARTBEAT_MS = 15_000;
/** Bytes a reader may be behind; one that is slower is let go and may come back where it left off. */
const MOST_BEHIND_BYTES = 4_000_000;

/** Sends events until the reader leaves, falls too far behind, or there are no more. */
export function sendEvents(response: Response, { open }: EventStream): void {
  response.set({
    'Content-Type': 'text/event-stream',
    // Without `no-transform` compression holds events back until its buffer is full.
    'Cache-Control': 'no-cache, no-transform',
  });
  response.flushHeaders();
  const end = () => response.end();
  const write = (text: string) => {
    if (response.writableEnded) return;
    response.write(text);
    if (response.writableLength > MOST_BEHIND_BYTES) response.destroy();
  };
  const stop = open(({ event, data, id }) => {
    write(`event: ${event}\n${id === undefined ? '' : `id: ${id}\n`}data: ${JSON.stringify(data)}\n\n`);
  }, end);
  const heartbeat = setInterval(() => write(': \n\n'), HEARTBEAT_MS);
  heartbeat.unref();
  response.once('close', () => {
    clearInterval(heartbeat);
    stop();
  });
}
