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
  action: z.string(),
  library: z.string().nullable(),
  subject: z.string(),
  detail: auditDetail,
});
export type AuditEntryView = z.infer<typeof auditEntryView>;
export const auditPage = pageOf(auditEntryView);
