import { Router } from 'express';
import { z } from 'zod';
import { createLibraryBody } from '../../../shared/schemas/libraries.ts';
import { pageQuery, slug } from '../../../shared/schemas/paging.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { actorOf } from '../../http/session.ts';
import type { SolversService } from '../solvers/solvers.service.ts';
import type { LibrariesService } from './libraries.service.ts';

const address = z.object({ library: slug });

export function librariesRoutes(libraries: LibrariesService, solvers: SolversService): Router {
  const router = Router();
  router.get('/libraries', (request, response) => {
    response.json(libraries.list(parseRequest(pageQuery, request.query, 'query')));
  });
  router.post('/libraries', (request, response) => {
    const library = libraries.create(actorOf(response), parseBody(createLibraryBody, request));
    response.status(201).location(`/api/libraries/${library.slug}`).json(library);
  });
  router.get('/libraries/:library', (request, response) => {
    response.json(libraries.get(parseRequest(address, request.params, 'address').library));
  });
  router.get('/libraries/:library/solvers', (request, response) => {
    response.json(solvers.list(parseRequest(address, request.params, 'address').library));
  });
  return router;
}
