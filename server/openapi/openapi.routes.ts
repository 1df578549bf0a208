import { Router } from 'express';
import { needs } from '../http/permissions.ts';
import { allEntries } from './all-entries.ts';
import { type Actions, openApiDocument } from './document.ts';
import { apiPage } from './page.ts';

/** The description of the API, made once and asked for rarely. */
export function openapiRoutes(version: string, actions: () => Actions = () => new Map()): Router {
  const router = Router();
  let document: string | undefined;
  let page: string | undefined;
  router.get('/openapi.json', needs('about.read'), (_request, response) => {
    document ??= JSON.stringify(openApiDocument(allEntries, version, actions()));
    response.set('Cache-Control', 'no-cache').type('application/json').send(document);
  });
  router.get('/docs', needs('about.read'), (_request, response) => {
    page ??= apiPage(allEntries, version, actions());
    response.set('Cache-Control', 'no-cache').type('html').send(page);
  });
  return router;
}
