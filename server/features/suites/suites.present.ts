import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SuiteRevisionSummary, SuiteRevisionView, SuiteView } from '../../../shared/schemas/suites.ts';
import { toIso } from '../present-time.ts';
import type { RevisionRow, SuiteRow } from './suites.repo.ts';

export function presentSuite({ suite, revision }: { suite: SuiteRow; revision: RevisionRow }): SuiteView {
  return {
    slug: suite.slug,
    title: revision.title,
    builtIn: suite.builtIn,
    revision: revision.number,
    hash: revision.hash,
    caseCount: revision.caseCount,
    createdAt: toIso(suite.createdAt),
    updatedAt: toIso(revision.createdAt),
  };
}

export function presentRevisionSummary(suite: string, revision: RevisionRow): SuiteRevisionSummary {
  const { number, hash, title, evaluations, seconds, caseCount, note, createdAt, createdBy } = revision;
  const limits = { evaluations, seconds };
  return { suite, number, hash, title, limits, caseCount, note, createdAt: toIso(createdAt), createdBy };
}

export function presentRevision(suite: string, revision: RevisionRow, cases: SuiteCase[]): SuiteRevisionView {
  return { ...presentRevisionSummary(suite, revision), source: revision.source, cases };
}
