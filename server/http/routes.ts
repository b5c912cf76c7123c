import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import express, { type Request, type RequestHandler, type Response, type Router } from 'express';
import type * as z from 'zod';
import { DomainError } from '../../models/errors.ts';
import { OPERATIONS, type Operation, type OperationName } from '../contract/operations.ts';
import type { AppParts } from './app-parts.ts';
import type { Download, Handler } from './handler.ts';
import { HANDLERS } from './handlers.ts';
import { InvalidRequest } from './invalid-request.ts';

/** Largest JSON body: a cycle or a load is a few kB. */
const MOST_JSON_BYTES = 1_000_000;

/** A route for every operation of the contract, each with its roles. */
export function createRoutes(parts: AppParts): Router {
  const router = express.Router();
  const readJson = express.json({ limit: MOST_JSON_BYTES, strict: false });
  for (const [name, operation] of Object.entries(OPERATIONS) as [OperationName, Operation][]) {
    const path = operation.path.replace(/\{(\w+)\}/g, ':$1');
    const steps: RequestHandler[] = [permit(parts, operation)];
    if (operation.body !== undefined) steps.push(requireMediaType(operation));
    if (operation.body !== undefined && operation.body !== 'bytes') steps.push(readJson);
    router[operation.method](path, ...steps, answer(parts, name, operation));
  }
  return router;
}

function permit({ actor }: AppParts, { roles, summary }: Operation): RequestHandler {
  return (_request, _response, next) => {
    if (roles.some((role) => actor.roles.includes(role))) return next();
    throw new DomainError('not-permitted', `${actor.name} may not: ${summary}`, { roles: roles.join(', ') });
  };
}

/** Asking for a media type no form can send also keeps other sites' pages from posting here. */
function requireMediaType({ body }: Operation): RequestHandler {
  const expected = body === 'bytes' ? 'application/octet-stream' : 'application/json';
  return (request, _response, next) => {
    if (request.is(expected)) return next();
    const sent = request.get('content-type') ?? 'nothing';
    throw new DomainError('media-type-wrong', `Expected ${expected}, not ${sent}`, { expected, sent });
  };
}

function answer(parts: AppParts, name: OperationName, operation: Operation): RequestHandler {
  const handler = HANDLERS[name] as Handler<OperationName>;
  return async (request: Request, response: Response) => {
    const query = operation.query === undefined ? undefined : parse(operation.query, request.query, '?');
    const body = readBody(operation, request);
    const params = request.params as Record<string, string>;
    const result = await handler(parts, { params, query, body } as never);
    response.status(operation.status ?? 200);
    if (operation.answer === 'text/csv' || operation.answer === 'application/octet-stream') {
      return sendDownload(response, operation.answer, result as Download);
    }
    response.json(result);
  };
}

function readBody({ body }: Operation, request: Request): unknown {
  if (body === undefined) return undefined;
  return body === 'bytes' ? request : parse(body, request.body, '#');
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
  response.type(type);
  response.attachment(name);
  await pipeline(Readable.from(chunks), response);
}
