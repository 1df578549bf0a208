import { Router } from 'express';
import { z } from 'zod';
import { slug } from '../../../shared/schemas/paging.ts';
import { trendQuery } from '../../../shared/schemas/trends.ts';
import { parseRequest } from '../../http/parse-request.ts';
import { needs, ofLibrary } from '../../http/permissions.ts';
import type { TrendsService } from './trends.service.ts';

const inLibrary = z.object({ library: slug });

export function trendsRoutes(trends: TrendsService): Router {
  const router = Router();
  router.get('/libraries/:library/trend', needs('library.read', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    response.json(trends.get(library, parseRequest(trendQuery, request.query, 'query')));
  });
  return router;
}
