import { auditPage, auditQuery } from '../../../shared/schemas/audit.ts';
import { type ApiEntry, named, ok } from '../../openapi/entry.ts';

export const auditApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/audit-log',
    chapter: 'Site',
    summary: 'Lists who did what, newest first.',
    query: auditQuery,
    answers: [ok(named('AuditPage', auditPage))],
    problems: ['invalid', 'not_found'],
  },
];
