import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { Request, Response } from 'express';
import type * as z from 'zod';
import { OPERATIONS, type Operation } from '../contract/operations.ts';
import type { OperationName } from '../contract/routes.ts';
import type { AppParts } from './app-parts.ts';
import { type EventStream, sendEvents } from './event-stream.ts';
import type { Download, Handler, Picture } from './handler.ts';
import { HANDLERS } from './handlers.ts';
import { InvalidRequest } from './invalid-request.ts';

/** Takes a request apart as the contract says, has it handled, and sends what came of it. */
export async function answer(
  parts: AppParts,
  name: OperationName,
  request: Request,
  response: Response,
): Promise<void> {
  const operation: Operation = OPERATIONS[name];
  const query = operation.query === undefined ? undefined : parse(operation.query, request.query, '?');
  const body = operation.body === undefined ? request : parse(operation.body, request.body, '#');
  const params = request.params as Record<string, string>;
  const handler = HANDLERS[name] as Handler<OperationName>;
  const key = /^Bearer +(\S+)$/i.exec(request.get('authorization') ?? '')?.[1] ?? null;
  const lastEventId = request.get('last-event-id') ?? null;
  const result: unknown = await handler(parts, { params, query, body, key, lastEventId } as never);
  response.status(operation.status ?? 200);
  if (operation.answer === 'text/csv' || operation.answer === 'application/octet-stream') {
    await sendDownload(response, operation.answer, result as Download);
  } else if (operation.answer === 'image/*') {
    const { type, chunks } = result as Picture;
    response.type(type);
    await pipeline(Readable.from(chunks), response);
  } else if (operation.answer === 'text/event-stream') {
    sendEvents(response, result as EventStream);
  } else {
    response.json(result);
  }
}

function parse(schema: z.ZodType, value: unknown, root: string): unknown {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  throw new InvalidRequest(
    parsed.error.issues.map(({ path, message }) => ({
      pointer: [root, ...path.map(String)].join('/'),
      detail: message,
    })),
  );
}

async function sendDownload(response: Response, type: string, { name, chunks }: Download): Promise<void> {
  response.attachment(name);
  // After the name, from whose ending another type would be guessed.
  response.type(type);
  await pipeline(Readable.from(chunks), response);
}
