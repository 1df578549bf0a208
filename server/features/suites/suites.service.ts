import { AppError } from '../../../shared/errors.ts';
import type { SuiteRevision } from '../../../shared/schemas/case.ts';
import { type Page, type PageQuery, slug as slugSchema } from '../../../shared/schemas/paging.ts';
import type { SuiteRevisionSummary, SuiteRevisionView, SuiteView } from '../../../shared/schemas/suites.ts';
import type { Actor } from '../../actor.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import { decodeCursor, numberCursor, toPage } from '../../db/cursor.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { AuditService } from '../audit/audit.service.ts';
import { presentRevision, presentRevisionSummary, presentSuite } from './suites.present.ts';
import { type CaseRow, createSuitesRepo, type RevisionRow, type SuiteRow } from './suites.repo.ts';

export interface NewRevision {
  revision: SuiteRevision;
  /** The suite file as written. */
  source: string;
  builtIn: boolean;
  note: string;
}

export function createSuitesService(deps: {
  client: DatabaseClient;
  clock: Clock;
  bus: EventBus;
  audit: AuditService;
}) {
  const repo = createSuitesRepo(deps.client.db);

  function requireSuite(slug: string): SuiteRow {
    const row = repo.find(slug);
    if (!row) throw new AppError('not_found', `There is no suite “${slug}”.`);
    return row;
  }

  /** The revision with this number, or the newest one. */
  function requireRevision(slug: string, number?: number): { suite: SuiteRow; revision: RevisionRow } {
    const suite = requireSuite(slug);
    if (number === undefined) {
      const current = repo.findCurrent(slug);
      if (!current) throw new AppError('not_found', `Suite “${slug}” has no revision yet.`);
      return current;
    }
    const revision = repo.findRevision(suite.id, number);
    if (!revision) throw new AppError('not_found', `Suite “${slug}” has no revision ${number}.`);
    return { suite, revision };
  }

  return {
    requireSuite,
    requireRevision,
    revisionById(id: number): RevisionRow {
      const row = repo.findRevisionById(id);
      if (!row) throw new AppError('not_found', `There is no suite revision ${id}.`);
      return row;
    },
    suiteById(id: number): SuiteRow {
      const row = repo.findById(id);
      if (!row) throw new AppError('not_found', `There is no suite ${id}.`);
      return row;
    },
    /** The cases of a revision with their rows, in order. Kept in memory: do not change them. */
    casesOf: (revisionId: number): CaseRow[] => repo.readCases(revisionId),
    /**
     * Adds a revision; where its hash is that of the newest one (or, for built-in suites, of any), nothing
     * is added and the existing one is returned: the hash covers all that decides a result.
     */
    addRevision(actor: Actor, added: NewRevision): { summary: SuiteRevisionSummary; isNew: boolean } {
      const { revision: content } = added;
      if (!slugSchema.safeParse(content.id).success)
        throw new AppError('unprocessable', `“${content.id}” cannot be the name of a suite in addresses.`, {
          issues: [{ path: 'id', message: 'lower-case letters, digits and hyphens (64 at most)' }],
        });
      const result = inTransaction(deps.client, () => {
        const now = deps.clock();
        const known = repo.find(content.id);
        if (known && known.builtIn !== added.builtIn)
          throw new AppError('conflict', `There is a suite “${content.id}” already.`);
        const suite = known ?? repo.insertSuite({ slug: content.id, builtIn: added.builtIn, createdAt: now });
        const current = repo.findCurrent(suite.slug)?.revision;
        const same = repo.findByHash(suite.id, content.revision);
        if (same && (added.builtIn || same.id === current?.id)) return { revision: same, isNew: false };
        const revision = repo.insertRevision(
          {
            suiteId: suite.id,
            number: (current?.number ?? 0) + 1,
            hash: content.revision,
            title: content.title,
            evaluations: content.limits.evaluations,
            seconds: content.limits.seconds,
            caseCount: content.cases.length,
            source: added.source,
            note: added.note,
            createdAt: now,
            createdBy: actor.name,
          },
          content.cases,
        );
        deps.audit.record(actor, 'suite revision added', null, suite.slug, {
          revision: revision.number,
          cases: revision.caseCount,
        });
        return { revision, isNew: true };
      });
      const summary = presentRevisionSummary(content.id, result.revision);
      if (result.isNew) deps.bus.publish({ kind: 'suite', suite: content.id, revision: summary.number });
      return { summary, isNew: result.isNew };
    },
    list(query: PageQuery): Page<SuiteView> {
      const after = decodeCursor(query.cursor, ['string'])?.[0]?.toString();
      const rows = repo.listQuery({ after, limit: query.limit + 1 }).all();
      return toPage(rows, query.limit, (row) => [row.suite.slug], presentSuite);
    },
    get: (slug: string): SuiteView => presentSuite(requireRevision(slug)),
    listRevisions(slug: string, query: PageQuery): Page<SuiteRevisionSummary> {
      const suite = requireSuite(slug);
      const before = numberCursor(query.cursor, 1)?.[0];
      const rows = repo.listRevisionsQuery({ suiteId: suite.id, before, limit: query.limit + 1 }).all();
      const present = (row: RevisionRow) => presentRevisionSummary(slug, row);
      return toPage(rows, query.limit, (row) => [row.number], present);
    },
    getRevision(slug: string, number: number): SuiteRevisionView {
      const { revision } = requireRevision(slug, number);
      const cases = repo.readCases(revision.id).map((row) => row.case);
      return presentRevision(slug, revision, cases);
    },
  };
}

export type SuitesService = ReturnType<typeof createSuitesService>;
