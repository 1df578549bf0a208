import { and, asc, desc, eq, lt, type SQL, sql } from 'drizzle-orm';
import type { RunStatus } from '../../../shared/schemas/runs.ts';
import type { DatabaseClient } from '../../db/client.ts';
import { builds, libraries } from '../../db/schema/libraries.ts';
import { runSolvers, runs } from '../../db/schema/runs.ts';
import { suiteRevisions, suites } from '../../db/schema/suites.ts';
import { isOfVisible, type VisibleLibraries } from '../../db/visible-libraries.ts';

export type RunRow = typeof runs.$inferSelect;
export type RunSolverRow = typeof runSolvers.$inferSelect;

export interface RunFilter {
  libraryId?: number | undefined;
  buildId?: number | undefined;
  suiteId?: number | undefined;
  status?: RunStatus | undefined;
  visible?: VisibleLibraries | undefined;
  before?: number | undefined;
  limit: number;
}

export interface OutcomeCount {
  solver: number;
  outcome: number;
  stored: number;
  evaluations: number;
  repeated: number;
  unsteady: number;
}

export function createRunsRepo(client: DatabaseClient) {
  const { db, sqlite } = client;
  const selectNamed = () =>
    db
      .select({
        run: runs,
        library: libraries.slug,
        build: { id: builds.id, label: builds.label, commit: builds.commit },
        suite: {
          slug: suites.slug,
          title: suiteRevisions.title,
          revision: suiteRevisions.number,
          hash: suiteRevisions.hash,
        },
      })
      .from(runs)
      .innerJoin(libraries, eq(libraries.id, runs.libraryId))
      .innerJoin(builds, eq(builds.id, runs.buildId))
      .innerJoin(suites, eq(suites.id, runs.suiteId))
      .innerJoin(suiteRevisions, eq(suiteRevisions.id, runs.revisionId));
  const countOutcomes = sqlite.prepare<[number], OutcomeCount>(
    `SELECT solver, outcome, count(*) AS stored, sum(evaluations) AS evaluations,
       sum(repeated > 0) AS repeated, sum(steady IS 0) AS unsteady
     FROM solves WHERE run_id = ? GROUP BY solver, outcome`,
  );

  return {
    insert(row: typeof runs.$inferInsert, solvers: Omit<RunSolverRow, 'runId'>[]): RunRow {
      const run = db.insert(runs).values(row).returning().get();
      for (const solver of solvers)
        db.insert(runSolvers)
          .values({ ...solver, runId: run.id })
          .run();
      return run;
    },
    find: (id: number): RunRow | undefined => db.select().from(runs).where(eq(runs.id, id)).get(),
    findNamed: (id: number) => selectNamed().where(eq(runs.id, id)).get(),
    update(id: number, set: Partial<RunRow>): void {
      db.update(runs).set(set).where(eq(runs.id, id)).run();
    },
    /** Changes a run only while it has one of these statuses; returns whether it did. */
    updateWhile(id: number, statuses: RunStatus[], set: Partial<RunRow>): boolean {
      const isOneOf = sql`${runs.status} in ${statuses}`;
      return (
        db
          .update(runs)
          .set(set)
          .where(and(eq(runs.id, id), isOneOf))
          .run().changes === 1
      );
    },
    addElapsed(id: number, elapsedMs: number): void {
      db.update(runs)
        .set({ elapsedMs: sql`${runs.elapsedMs} + ${elapsedMs}` })
        .where(eq(runs.id, id))
        .run();
    },
    /** By position. */
    readSolvers: (runId: number): RunSolverRow[] =>
      db.select().from(runSolvers).where(eq(runSolvers.runId, runId)).orderBy(asc(runSolvers.position)).all(),
    countOutcomes: (runId: number): OutcomeCount[] => countOutcomes.all(runId),
    /** Newest first. */
    listQuery(filter: RunFilter) {
      const conditions: (SQL | undefined)[] = [
        filter.libraryId === undefined ? undefined : eq(runs.libraryId, filter.libraryId),
        filter.buildId === undefined ? undefined : eq(runs.buildId, filter.buildId),
        filter.suiteId === undefined ? undefined : eq(runs.suiteId, filter.suiteId),
        filter.status === undefined ? undefined : eq(runs.status, filter.status),
        filter.visible && isOfVisible('runs.library_id', filter.visible),
        filter.before === undefined ? undefined : lt(runs.id, filter.before),
      ];
      return selectNamed()
        .where(and(...conditions))
        .orderBy(desc(runs.id))
        .limit(filter.limit);
    },
  };
}

export type RunsRepo = ReturnType<typeof createRunsRepo>;
export type NamedRun = NonNullable<ReturnType<RunsRepo['findNamed']>>;
