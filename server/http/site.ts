import express, { type Router } from 'express';
import { DomainError } from '../../models/errors.ts';

/** The built pages: files that carry a hash in their name for good, everything else asked for anew. */
export function serveSite(folder: string): Router {
  const router = express.Router();
  router.use('/assets', express.static(`${folder}/assets`, { immutable: true, maxAge: '1y' }));
  router.use('/assets', (request) => {
    throw new DomainError('not-found', `There is nothing at ${request.originalUrl}; the page may be an older one`);
  });
  const anew = (response: { setHeader(name: string, value: string): unknown }) =>
    response.setHeader('Cache-Control', 'no-cache');
  router.use(express.static(folder, { cacheControl: false, setHeaders: anew }));
  // Every other address is a page of the one application.
  router.get('/{*path}', (_request, response) => {
    response.set('Cache-Control', 'no-cache').sendFile('index.html', { root: folder, cacheControl: false });
  });
  return router;
}
