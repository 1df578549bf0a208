import { Router } from 'express';
import { z } from 'zod';
import { rowId, slug } from '../../../shared/schemas/paging.ts';
import { makeTokenBody } from '../../../shared/schemas/tokens.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs, ofLibrary } from '../../http/permissions.ts';
import { actorOf } from '../../http/session.ts';
import type { TokensService } from './tokens.service.ts';

const inLibrary = z.object({ library: slug });
const ofToken = z.object({ library: slug, token: rowId });

export function tokensRoutes(tokens: TokensService): Router {
  const router = Router();
  router.get('/libraries/:library/tokens', needs('tokens.edit', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    response.json({ items: tokens.list(library) });
  });
  router.post('/libraries/:library/tokens', needs('tokens.edit', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    response.status(201).json(tokens.make(actorOf(response), library, parseBody(makeTokenBody, request)));
  });
  router.delete('/libraries/:library/tokens/:token', needs('tokens.edit', ofLibrary), (request, response) => {
    const { library, token } = parseRequest(ofToken, request.params, 'address');
    tokens.revoke(actorOf(response), library, token);
    response.status(204).end();
  });
  return router;
}
