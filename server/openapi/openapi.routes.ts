import { Router } from 'express';
import { allEntries } from './all-entries.ts';
import { openApiDocument } from './document.ts';
import { apiPage } from './page.ts';

/** The description of the API, made once and asked for rarely. */
export function openapiRoutes(version: string): Router {
  const router = Router();
  let document: string | undefined;
  let page: string | undefined;
  router.get('/openapi.json', (_request, response) => {
    document ??= JSON.stringify(openApiDocument(allEntries, version));
    response.set('Cache-Control', 'no-cache').type('application/json').send(document);
  });
  router.get('/docs', (_request, response) => {
    page ??= apiPage(allEntries, version);
    response.set('Cache-Control', 'no-cache').type('html').send(page);
  });
  return router;
}
