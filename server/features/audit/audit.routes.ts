import { Router } from 'express';
import { auditQuery } from '../../../shared/schemas/audit.ts';
import { parseRequest } from '../../http/parse-request.ts';
import type { AuditService } from './audit.service.ts';

export function auditRoutes(audit: AuditService): Router {
  const router = Router();
  router.get('/audit-log', (request, response) => {
    response.json(audit.list(parseRequest(auditQuery, request.query, 'query')));
  });
  return router;
}
