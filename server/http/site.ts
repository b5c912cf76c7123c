import express, { type Router } from 'express';

/** The built pages: files that carry a hash in their name for good, everything else asked for anew. */
export function serveSite(folder: string): Router {
  const router = express.Router();
  router.use('/assets', express.static(`${folder}/assets`, { immutable: true, maxAge: '1y', fallthrough: false }));
  router.use(
    express.static(folder, {
      cacheControl: false,
      setHeaders: (response) => response.setHeader('Cache-Control', 'no-cache'),
    }),
  );
  // Every other address is a page of the one application.
  router.get('/{*path}', (_request, response) => {
    response.set('Cache-Control', 'no-cache').sendFile('index.html', { root: folder });
  });
  return router;
}
