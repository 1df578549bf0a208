import type { AuditEntryView } from '../../../shared/schemas/audit.ts';
import type { auditLog } from '../../db/schema/operations.ts';
import { toIso } from '../present-time.ts';

export function presentAuditEntry(row: {
  entry: typeof auditLog.$inferSelect;
  library: string | null;
}): AuditEntryView {
  const { id, at, actor, actorId, action, subject, detail } = row.entry;
  return { id, at: toIso(at), actor, actorId, action, library: row.library, subject, detail };
}
