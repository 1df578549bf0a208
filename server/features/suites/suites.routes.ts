import { Router } from 'express';
import { z } from 'zod';
import { pageQuery, rowId, slug } from '../../../shared/schemas/paging.ts';
import { sendImmutable } from '../../http/immutable.ts';
import { parseRequest } from '../../http/parse-request.ts';
import { needs } from '../../http/permissions.ts';
import type { SuitesService } from './suites.service.ts';

const bySlug = z.object({ suite: slug });
const byNumber = z.object({ suite: slug, number: rowId });

export function suitesRoutes(suites: SuitesService): Router {
  const router = Router();
  router.get('/suites', needs('suite.read'), (request, response) => {
    response.json(suites.list(parseRequest(pageQuery, request.query, 'query')));
  });
  router.get('/suites/:suite', needs('suite.read'), (request, response) => {
    response.json(suites.get(parseRequest(bySlug, request.params, 'address').suite));
  });
  router.get('/suites/:suite/revisions', needs('suite.read'), (request, response) => {
    const { suite } = parseRequest(bySlug, request.params, 'address');
    response.json(suites.listRevisions(suite, parseRequest(pageQuery, request.query, 'query')));
  });
  router.get('/suites/:suite/revisions/:number', needs('suite.read'), (request, response) => {
    const { suite, number } = parseRequest(byNumber, request.params, 'address');
    const { revision } = suites.requireRevision(suite, number);
    sendImmutable(request, response, `suite-${revision.id}-${revision.hash.slice(0, 16)}`, () =>
      suites.getRevision(suite, number),
    );
  });
  return router;
}
