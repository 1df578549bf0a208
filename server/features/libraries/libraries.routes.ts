import { Router } from 'express';
import { z } from 'zod';
import { changeLibraryBody, createLibraryBody } from '../../../shared/schemas/libraries.ts';
import { pageQuery, slug } from '../../../shared/schemas/paging.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs, ofLibrary } from '../../http/permissions.ts';
import { accessOf, actorOf } from '../../http/session.ts';
import type { SolversService } from '../solvers/solvers.service.ts';
import type { LibrariesService } from './libraries.service.ts';

const address = z.object({ library: slug });

export function librariesRoutes(libraries: LibrariesService, solvers: SolversService): Router {
  const router = Router();
  router.get('/libraries', needs('library.list'), (request, response) => {
    const query = parseRequest(pageQuery, request.query, 'query');
    response.json(libraries.list(query, accessOf(response).visible()));
  });
  router.post('/libraries', needs('library.create'), (request, response) => {
    const library = libraries.create(actorOf(response), parseBody(createLibraryBody, request));
    response.status(201).location(`/api/libraries/${library.slug}`).json(library);
  });
  router.get('/libraries/:library', needs('library.read', ofLibrary), (request, response) => {
    response.json(libraries.get(parseRequest(address, request.params, 'address').library));
  });
  router.patch('/libraries/:library', needs('library.settings', ofLibrary), (request, response) => {
    const { library } = parseRequest(address, request.params, 'address');
    response.json(libraries.change(actorOf(response), library, parseBody(changeLibraryBody, request)));
  });
  router.get('/libraries/:library/solvers', needs('library.read', ofLibrary), (request, response) => {
    response.json(solvers.list(parseRequest(address, request.params, 'address').library));
  });
  return router;
}
