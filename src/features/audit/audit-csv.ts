import type { AuditEntryView } from '../../../shared/schemas/audit.ts';

/** A text that a spreadsheet would read as a formula gets an apostrophe before it. */
function cell(value: string): string {
  const safe = /^[=+\-@\t\r]/.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** The log as comma-separated values (RFC 4180); the details stay JSON, so that nothing is lost. */
export function auditCsv(entries: readonly AuditEntryView[]): string {
  const head = ['id', 'at', 'actor', 'actor id', 'action', 'library', 'subject', 'detail'];
  const rows = entries.map((entry) => [
    String(entry.id),
    entry.at,
    entry.actor,
    entry.actorId ?? '',
    entry.action,
    entry.library ?? '',
    entry.subject,
    JSON.stringify(entry.detail),
  ]);
  return `${[head, ...rows].map((row) => row.map(cell).join(',')).join('\r\n')}\r\n`;
}
