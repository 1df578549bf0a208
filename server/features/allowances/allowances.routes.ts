import { Router } from 'express';
import { z } from 'zod';
import { setAllowancesBody } from '../../../shared/schemas/allowance-revisions.ts';
import { pageQuery, slug } from '../../../shared/schemas/paging.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs, ofLibrary } from '../../http/permissions.ts';
import { actorOf } from '../../http/session.ts';
import type { AllowancesService } from './allowances.service.ts';

const inLibrary = z.object({ library: slug });
const byNumber = z.object({ library: slug, number: z.coerce.number().int().min(0) });

export function allowancesRoutes(allowances: AllowancesService): Router {
  const router = Router();
  router.get('/libraries/:library/allowances', needs('library.read', ofLibrary), (request, response) => {
    response.json(allowances.get(parseRequest(inLibrary, request.params, 'address').library));
  });
  router.put('/libraries/:library/allowances', needs('allowances.edit', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    response.json(allowances.set(actorOf(response), library, parseBody(setAllowancesBody, request)));
  });
  router.get(
    '/libraries/:library/allowances/revisions',
    needs('library.read', ofLibrary),
    (request, response) => {
      const { library } = parseRequest(inLibrary, request.params, 'address');
      response.json(allowances.list(library, parseRequest(pageQuery, request.query, 'query')));
    },
  );
  router.get(
    '/libraries/:library/allowances/revisions/:number',
    needs('library.read', ofLibrary),
    (request, response) => {
      const { library, number } = parseRequest(byNumber, request.params, 'address');
      response.json(allowances.get(library, number));
    },
  );
  return router;
}
