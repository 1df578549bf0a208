import { Router } from 'express';
import { z } from 'zod';
import { auditQuery } from '../../../shared/schemas/audit.ts';
import { slug } from '../../../shared/schemas/paging.ts';
import { parseRequest } from '../../http/parse-request.ts';
import { type FindTargets, needs, needsEither } from '../../http/permissions.ts';
import type { AuditService } from './audit.service.ts';

const libraryQuery = z.object({ library: slug });
const ofQuery: FindTargets = (request) => parseRequest(libraryQuery, request.query, 'query');

export function auditRoutes(audit: AuditService): Router {
  const router = Router();
  // One library's is its maintainers' business, everything the site's admins'.
  const ofSite = needs('site.audit');
  const ofOne = needs('audit.read', ofQuery);
  router.get(
    '/audit-log',
    needsEither((request) => request.query.library === undefined, ofSite, ofOne),
    (request, response) => {
      response.json(audit.list(parseRequest(auditQuery, request.query, 'query')));
    },
  );
  return router;
}
