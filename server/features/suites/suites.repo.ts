import { and, asc, desc, eq, gt, lt, sql } from 'drizzle-orm';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { Db } from '../../db/client.ts';
import { cases, suiteRevisions, suites } from '../../db/schema/suites.ts';

export type SuiteRow = typeof suites.$inferSelect;
export type RevisionRow = typeof suiteRevisions.$inferSelect;
export interface CaseRow {
  id: number;
  case: SuiteCase;
}

const keptRevisions = 16;

export function createSuitesRepo(db: Db) {
  // A revision never changes, so its parsed cases can be kept; they are read for every list and comparison.
  const kept = new Map<number, CaseRow[]>();
  const newest = sql`(select max(number) from ${suiteRevisions} as r where r.suite_id = ${suites.id})`;
  const selectCurrent = () =>
    db
      .select({ suite: suites, revision: suiteRevisions })
      .from(suites)
      .innerJoin(
        suiteRevisions,
        and(eq(suiteRevisions.suiteId, suites.id), eq(suiteRevisions.number, newest)),
      );

  return {
    insertSuite: (row: typeof suites.$inferInsert): SuiteRow =>
      db.insert(suites).values(row).returning().get(),
    insertRevision(row: typeof suiteRevisions.$inferInsert, list: SuiteCase[]): RevisionRow {
      const revision = db.insert(suiteRevisions).values(row).returning().get();
      for (const data of list)
        db.insert(cases).values({ revisionId: revision.id, name: data.id, hash: data.hash, data }).run();
      return revision;
    },
    find: (slug: string): SuiteRow | undefined => db.select().from(suites).where(eq(suites.slug, slug)).get(),
    findById: (id: number): SuiteRow | undefined => db.select().from(suites).where(eq(suites.id, id)).get(),
    findCurrent: (slug: string) => selectCurrent().where(eq(suites.slug, slug)).get(),
    findByHash: (suiteId: number, hash: string): RevisionRow | undefined =>
      db
        .select()
        .from(suiteRevisions)
        .where(and(eq(suiteRevisions.suiteId, suiteId), eq(suiteRevisions.hash, hash)))
        .orderBy(desc(suiteRevisions.number))
        .limit(1)
        .get(),
    findRevision: (suiteId: number, number: number): RevisionRow | undefined =>
      db
        .select()
        .from(suiteRevisions)
        .where(and(eq(suiteRevisions.suiteId, suiteId), eq(suiteRevisions.number, number)))
        .get(),
    findRevisionById: (id: number): RevisionRow | undefined =>
      db.select().from(suiteRevisions).where(eq(suiteRevisions.id, id)).get(),
    /** In the order of the suite. */
    readCases(revisionId: number): CaseRow[] {
      const known = kept.get(revisionId);
      if (known) return known;
      const rows = db
        .select({ id: cases.id, case: cases.data })
        .from(cases)
        .where(eq(cases.revisionId, revisionId))
        .orderBy(asc(cases.id))
        .all();
      const oldest = kept.keys().next().value;
      if (kept.size >= keptRevisions && oldest !== undefined) kept.delete(oldest);
      kept.set(revisionId, rows);
      return rows;
    },
    /** By slug, from A to Z, each with its newest revision. */
    listQuery: (options: { after?: string | undefined; limit: number }) =>
      selectCurrent()
        .where(options.after === undefined ? undefined : gt(suites.slug, options.after))
        .orderBy(asc(suites.slug))
        .limit(options.limit),
    /** Newest first. */
    listRevisionsQuery: (options: { suiteId: number; before?: number | undefined; limit: number }) =>
      db
        .select()
        .from(suiteRevisions)
        .where(
          and(
            eq(suiteRevisions.suiteId, options.suiteId),
            options.before === undefined ? undefined : lt(suiteRevisions.number, options.before),
          ),
        )
        .orderBy(desc(suiteRevisions.number))
        .limit(options.limit),
  };
}

export type SuitesRepo = ReturnType<typeof createSuitesRepo>;
