import { randomUUID } from 'node:crypto';
import type { ErrorRequestHandler, Response } from 'express';
import { DomainError } from '../../models/errors.ts';
import type { Problem } from '../contract/problem.ts';
import type { AppParts } from './app-parts.ts';
import { InvalidRequest } from './invalid-request.ts';
import { problemOf } from './problem.ts';

/** Turns whatever was thrown into a problem: a refusal says what is wrong, a fault says nothing but its number. */
export function answerErrors({ log }: Pick<AppParts, 'log'>): ErrorRequestHandler {
  return (error: unknown, request, response, next) => {
    if (response.headersSent) return next(error);
    const refusal = asRefusal(error);
    if (refusal !== null) {
      const errors = refusal instanceof InvalidRequest ? refusal.errors : undefined;
      return sendProblem(response, problemOf(refusal, errors));
    }
    const incident = randomUUID();
    log.error({ incident, method: request.method, url: request.originalUrl, err: error }, 'fault');
    sendProblem(response, {
      type: 'about:blank',
      title: 'Fault of the program',
      status: 500,
      instance: `urn:uuid:${incident}`,
    });
  };
}

export function sendProblem(response: Response, problem: Problem): void {
  if (problem.status === 401) response.set('WWW-Authenticate', 'Bearer');
  response.status(problem.status).type('application/problem+json').send(JSON.stringify(problem));
}

function asRefusal(error: unknown): DomainError | null {
  if (error instanceof DomainError) return error;
  if (!isExposed(error)) return null;
  if (error.type === 'entity.parse.failed') return new DomainError('document-not-json', error.message);
  if (error.status === 404) return new DomainError('not-found', 'There is nothing at this address');
  if (error.status === 413) return new DomainError('too-large', 'The body is larger than is taken here');
  if (error.status === 415) return new DomainError('media-type-wrong', error.message);
  return new DomainError('invalid-request', error.message);
}

/** Errors of express and its body readers that are the sender's own. */
interface ExposedError {
  readonly expose: true;
  readonly status: number;
  readonly type?: string;
  readonly message: string;
}

function isExposed(error: unknown): error is ExposedError {
  return error instanceof Error && 'expose' in error && error.expose === true;
}
