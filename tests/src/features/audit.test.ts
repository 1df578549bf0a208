import { describe, expect, it } from 'vitest';
import type { AuditEntryView } from '../../../shared/schemas/audit.ts';
import { auditCsv } from '../../../src/features/audit/audit-csv.ts';
import { detailText, filterAudit } from '../../../src/features/audit/audit-filter.ts';

const entry = (given: Partial<AuditEntryView> = {}): AuditEntryView => ({
  id: 1,
  at: '2026-03-14T23:59:59.000Z',
  actor: 'Maud Ferreday',
  actorId: 'p1',
  action: 'member role set',
  library: 'larkroots',
  subject: 'Tobin Askeland',
  detail: { person: 'p2', role: 'reviewer', before: null },
  ...given,
});
const everything = { text: '', action: '', from: '', to: '' };

describe('filterAudit', () => {
  const entries = [
    entry(),
    entry({ id: 2, action: 'run started', subject: 'run 12', at: '2026-03-15T00:00:00.000Z', detail: {} }),
  ];
  const ids = (filter: Partial<typeof everything>) =>
    filterAudit(entries, { ...everything, ...filter }).map((one) => one.id);

  it('finds every word, wherever it stands', () => {
    expect(ids({ text: 'maud REVIEWER' })).toEqual([1]);
    expect(ids({ text: 'maud run' })).toEqual([2]);
    expect(ids({ text: 'maud nobody' })).toEqual([]);
  });

  it('keeps to one action', () => {
    expect(ids({ action: 'run started' })).toEqual([2]);
  });

  it('counts the first and the last day with, in UTC', () => {
    expect(ids({ from: '2026-03-15' })).toEqual([2]);
    expect(ids({ to: '2026-03-14' })).toEqual([1]);
    expect(ids({ from: '2026-03-14', to: '2026-03-15' })).toEqual([1, 2]);
  });
});

describe('detailText', () => {
  it('leaves out what says nothing to a reader', () => {
    expect(detailText(entry().detail)).toBe('role: reviewer');
  });
});

describe('auditCsv', () => {
  it('quotes what has commas, quotes or line ends, and ends lines as RFC 4180 has it', () => {
    const lines = auditCsv([entry({ actor: 'Maud "M" Ferreday, twice' })]).split('\r\n');
    expect(lines).toHaveLength(3);
    expect(lines[1]).toContain('"Maud ""M"" Ferreday, twice"');
    expect(lines[1]).toContain('"{""person"":""p2"",""role"":""reviewer"",""before"":null}"');
  });

  it('has nothing that a spreadsheet would compute', () => {
    const [, line] = auditCsv([entry({ actor: '=HYPERLINK("x")', subject: '+1' })]).split('\r\n');
    expect(line).toContain(`"'=HYPERLINK(""x"")"`);
    expect(line).toContain(",'+1,");
  });
});
