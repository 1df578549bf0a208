import { Router } from 'express';
import { z } from 'zod';
import { rowId, slug } from '../../../shared/schemas/paging.ts';
import {
  referenceEntriesQuery,
  referenceQuery,
  setReferenceBody,
} from '../../../shared/schemas/references.ts';
import { sendImmutable } from '../../http/immutable.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs, ofLibrary, ofReference } from '../../http/permissions.ts';
import { actorOf } from '../../http/session.ts';
import type { ReferencesService } from './references.service.ts';

const inLibrary = z.object({ library: slug });
const byId = z.object({ revision: rowId });

export function referencesRoutes(references: ReferencesService): Router {
  const router = Router();
  router.get('/libraries/:library/references', needs('library.read', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    response.json(references.list(library, parseRequest(referenceQuery, request.query, 'query')));
  });
  router.post('/libraries/:library/references', needs('reference.accept', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    const body = parseBody(setReferenceBody, request);
    const revision = references.setFirst(actorOf(response), library, body);
    response.status(201).location(`/api/references/${revision.id}`).json(revision);
  });
  router.get('/references/:revision', needs('library.read', ofReference), (request, response) => {
    const { revision } = parseRequest(byId, request.params, 'address');
    const view = references.get(revision);
    sendImmutable(request, response, `reference-${view.id}-${Date.parse(view.createdAt)}`, () => view);
  });
  // The entries' steadiness can still be decided after they became the reference: not sent as immutable.
  router.get('/references/:revision/entries', needs('library.read', ofReference), (request, response) => {
    const { revision } = parseRequest(byId, request.params, 'address');
    const query = parseRequest(referenceEntriesQuery, request.query, 'query');
    response.json(references.listEntries(revision, query));
  });
  return router;
}
