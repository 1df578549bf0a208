import { Router } from 'express';
import { comparisonQuery, pairsQuery } from '../../../shared/schemas/comparisons.ts';
import { parseRequest } from '../../http/parse-request.ts';
import { needs, ofComparison } from '../../http/permissions.ts';
import type { ComparisonsService } from './comparisons.service.ts';

export function comparisonsRoutes(comparisons: ComparisonsService): Router {
  const router = Router();
  router.get('/comparisons', needs('library.read', ofComparison), (request, response) => {
    response.json(comparisons.get(parseRequest(comparisonQuery, request.query, 'query')));
  });
  router.get('/comparisons/pairs', needs('library.read', ofComparison), (request, response) => {
    response.json(comparisons.listPairs(parseRequest(pairsQuery, request.query, 'query')));
  });
  return router;
}
