import { z } from 'zod';
import { pageOf, pageQuery, slug } from './paging.ts';

export const auditActions = [
  'library created',
  'build registered',
  'suite revision added',
  'run started',
  'run cancelled',
  'reference set',
  'allowances set',
  'library settings changed',
  'member role set',
  'member removed',
  'member left',
  'invitation sent',
  'invitation sent again',
  'invitation revoked',
  'invitation accepted',
  'token made',
  'token revoked',
  'site set up',
  'account made',
  'password reset',
  'password changed',
  'signed out everywhere',
  'person renamed',
  'person disabled',
  'person enabled',
  'admin made',
  'admin unmade',
  'mail retried',
] as const;
export type AuditAction = (typeof auditActions)[number];

export const auditQuery = pageQuery.extend({ library: slug.optional() });
export type AuditQuery = z.infer<typeof auditQuery>;

export const auditDetail = z.record(z.string(), z.union([z.string(), z.number(), z.boolean(), z.null()]));
export type AuditDetail = z.infer<typeof auditDetail>;

export const auditEntryView = z.strictObject({
  id: z.int().min(1),
  at: z.iso.datetime(),
  actor: z.string(),
  /** Of a person; null for a token, and for what the server did itself. */
  actorId: z.string().nullable(),
  action: z.string(),
  library: z.string().nullable(),
  subject: z.string(),
  detail: auditDetail,
});
export type AuditEntryView = z.infer<typeof auditEntryView>;
export const auditPage = pageOf(auditEntryView);
