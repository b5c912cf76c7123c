import type { Readable } from 'node:stream';
import type * as z from 'zod';
import type { OPERATIONS } from '../contract/operations.ts';
import type { OperationName } from '../contract/routes.ts';
import type { AppParts } from './app-parts.ts';
import type { EventStream } from './event-stream.ts';

type Operations = typeof OPERATIONS;

type InputOf<N extends OperationName, Key extends 'query' | 'body'> = Operations[N] extends {
  readonly [P in Key]: infer Schema extends z.ZodType;
}
  ? z.output<Schema>
  : Operations[N]['sends'] extends 'bytes' | 'csv'
    ? Readable
    : undefined;

type AnswerOf<N extends OperationName> = Operations[N]['answer'] extends z.ZodType
  ? z.input<Operations[N]['answer']>
  : Operations[N]['answer'] extends 'application/json'
    ? object
    : Operations[N]['answer'] extends 'text/event-stream'
      ? EventStream
      : Operations[N]['answer'] extends 'image/*'
        ? Picture
        : Download;

/** An answer that is a file, chunk by chunk. */
export interface Download {
  readonly name: string;
  readonly chunks: Iterable<Uint8Array | string>;
}

/** An answer that is shown as a picture. Its type is told from its own bytes, or it was drawn here. */
export interface Picture {
  readonly type: 'image/svg+xml' | 'image/jpeg' | 'image/png' | 'image/webp' | 'image/gif';
  readonly chunks: Iterable<Uint8Array | string>;
}

/** What a handler is given: the address's pieces, its query and the body, each as the contract describes it. */
export interface Input<N extends OperationName> {
  readonly params: Readonly<Record<string, string>>;
  readonly query: InputOf<N, 'query'>;
  readonly body: InputOf<N, 'body'>;
  /** What was sent as `Authorization: Bearer`. */
  readonly key: string | null;
  /** The last event a reader of a stream had. */
  readonly lastEventId: string | null;
}

export type Handler<N extends OperationName> = (parts: AppParts, input: Input<N>) => AnswerOf<N> | Promise<AnswerOf<N>>;

export type Handlers = { readonly [N in OperationName]: Handler<N> };

/** Handlers of some operations; together the files of this room have them all. */
export type SomeHandlers<N extends OperationName> = Pick<Handlers, N>;
