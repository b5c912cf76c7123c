import express, { type Request, type RequestHandler, type Response, type Router } from 'express';
import { DomainError } from '../../models/errors.ts';
import type { Route } from '../contract/route.ts';
import { type OperationName, ROUTES } from '../contract/routes.ts';
import type { AppParts } from './app-parts.ts';

/** Largest JSON body: a cycle or a load is a few kB. */
const MOST_JSON_BYTES = 1_000_000;

/** A route for every operation of the contract, each with its roles. */
export function createRoutes(parts: AppParts): Router {
  const router = express.Router();
  const readJson = express.json({ limit: MOST_JSON_BYTES, strict: false });
  for (const [name, route] of Object.entries(ROUTES) as [OperationName, Route][]) {
    const steps: RequestHandler[] = [permit(parts, route)];
    if (route.sends !== 'nothing') steps.push(requireMediaType(route.sends));
    if (route.sends === 'json') steps.push(readJson);
    router[route.method](route.path.replace(/\{(\w+)\}/g, ':$1'), ...steps, answerLater(parts, name));
  }
  return router;
}

function permit({ actor }: AppParts, { roles, summary }: Route): RequestHandler {
  return (_request, _response, next) => {
    if (roles.some((role) => actor.roles.includes(role))) return next();
    throw new DomainError('not-permitted', `${actor.name} may not: ${summary}`, { roles: roles.join(', ') });
  };
}

/** Asking for a media type no form can send also keeps other sites' pages from posting here. */
const MEDIA_TYPES = { json: 'application/json', bytes: 'application/octet-stream', csv: 'text/csv' } as const;

function requireMediaType(sends: keyof typeof MEDIA_TYPES): RequestHandler {
  const expected = MEDIA_TYPES[sends];
  return (request, _response, next) => {
    if (request.is(expected)) return next();
    const sent = request.get('content-type') ?? 'nothing';
    throw new DomainError('media-type-wrong', `Expected ${expected}, not ${sent}`, { expected, sent });
  };
}

/** Schemas and handlers are most of the program; the server listens before they are loaded. */
function answerLater(parts: AppParts, name: OperationName) {
  return async (request: Request, response: Response): Promise<void> => {
    const { answer } = await import('./answer.ts');
    await answer(parts, name, request, response);
  };
}
