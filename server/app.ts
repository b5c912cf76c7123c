import compression from 'compression';
import express, { type Express } from 'express';
import helmet from 'helmet';
import { DomainError } from '../models/errors.ts';
import { answerErrors } from './http/answer-errors.ts';
import type { AppParts } from './http/app-parts.ts';
import { problemPage } from './http/problem-page.ts';
import { createRoutes } from './http/routes.ts';
import { serveSite } from './http/site.ts';

/** The server as a function of its parts: it opens nothing and listens nowhere. */
export function createApp(parts: AppParts): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('query parser', 'simple');
  app.use(helmet(HEADERS));
  // On the workshop's own network the lightest packing is the fastest: a chart has about 1 MB of figures.
  app.use(compression({ level: 1 }));
  app.use('/api', (_request, response, next) => {
    response.set('Cache-Control', 'no-store');
    next();
  });
  app.use(createRoutes(parts));
  app.use('/api', (request) => {
    throw new DomainError('not-found', `There is nothing at ${request.method} ${request.originalUrl}`);
  });
  app.get('/problems/:code', (request, response) => {
    const page = problemPage(request.params.code);
    if (page === null) throw new DomainError('not-found', `There is no problem "${request.params.code}"`);
    response.type('html').send(page);
  });
  if (parts.siteFolder !== null) app.use(serveSite(parts.siteFolder));
  app.use(answerErrors(parts));
  return app;
}

const SELF = ["'self'"];
const NOWHERE = ["'none'"];

const HEADERS = {
  contentSecurityPolicy: {
    useDefaults: false,
    directives: {
      defaultSrc: NOWHERE,
      scriptSrc: SELF,
      styleSrc: SELF,
      imgSrc: ["'self'", 'data:'],
      fontSrc: SELF,
      connectSrc: SELF,
      manifestSrc: SELF,
      baseUri: NOWHERE,
      formAction: SELF,
      frameAncestors: NOWHERE,
    },
  },
  // Over plain HTTP by host name neither an upgrade nor HSTS may be asked for: no page would load.
  strictTransportSecurity: false,
  referrerPolicy: { policy: 'same-origin' },
} as const;
