import type { AuditEntryView } from '../../../shared/schemas/audit.ts';

export interface AuditFilter {
  /** Looked for in who, what, where and the details; every word has to be there. */
  text: string;
  /** An action, or an empty text for all. */
  action: string;
  /** First and last day, in UTC, both counted; empty texts for no limit. */
  from: string;
  to: string;
}

/** `role: reviewer, before: contributor`, for people to read: the number of a person says nothing to them. */
export function detailText(detail: AuditEntryView['detail']): string {
  return Object.entries(detail)
    .filter(([name, value]) => name !== 'person' && value !== null && value !== '')
    .map(([name, value]) => `${name}: ${String(value)}`)
    .join(', ');
}

export function filterAudit(
  entries: readonly AuditEntryView[],
  { text, action, from, to }: AuditFilter,
): AuditEntryView[] {
  const words = text.toLowerCase().split(/\s+/).filter(Boolean);
  return entries.filter((entry) => {
    if (action !== '' && entry.action !== action) return false;
    const day = entry.at.slice(0, 10);
    if ((from !== '' && day < from) || (to !== '' && day > to)) return false;
    const searched =
      `${entry.actor} ${entry.action} ${entry.library ?? ''} ${entry.subject} ${detailText(entry.detail)}`.toLowerCase();
    return words.every((word) => searched.includes(word));
  });
}
