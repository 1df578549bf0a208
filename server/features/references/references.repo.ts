import { and, desc, eq, lt } from 'drizzle-orm';
import type { DatabaseClient } from '../../db/client.ts';
import { libraries } from '../../db/schema/libraries.ts';
import { referenceChains, referenceRevisions } from '../../db/schema/references.ts';
import { suites } from '../../db/schema/suites.ts';
import { type SolveRow, solveSelect } from '../runs/solves.repo.ts';

export type ChainRow = typeof referenceChains.$inferSelect;
export type ReferenceRevisionRow = typeof referenceRevisions.$inferSelect;

/** What holds for one solver, case and start as of a revision, before its solve. */
export type EntryRow = [
  solver: string,
  caseName: string,
  start: number,
  since: number,
  runId: number,
  reason: string,
  decidedBy: string,
  decidedAt: number,
  ...SolveRow,
];

export interface NewEntry {
  solver: string;
  case: string;
  start: number | null;
  /** null takes the entry out of the reference. */
  solveId: number | null;
}

/** The newest entry of each key up to a revision; one that takes its key out is left out. */
const entriesSql = (extra: string) => `
  SELECT e.solver, e."case", e.start, e.number, solves.run_id, ifnull(e.reason, r.reason),
    ifnull(e.decided_by, r.created_by), ifnull(e.decided_at, r.created_at), ${solveSelect}
  FROM (SELECT solver, "case", start, max(number) AS number FROM reference_entries
        WHERE chain_id = @chain AND number <= @number ${extra}
        GROUP BY solver, "case", start) AS newest
  JOIN reference_entries AS e ON e.chain_id = @chain AND e.solver = newest.solver
    AND e."case" = newest."case" AND e.start = newest.start AND e.number = newest.number
  JOIN reference_revisions AS r ON r.chain_id = @chain AND r.number = e.number
  JOIN solves ON solves.id = e.solve_id
  ORDER BY e.solver, e."case", e.start`;

export const entriesQuery = entriesSql('');
export const entriesPageQuery = `${entriesSql(
  'AND (@solver IS NULL OR solver = @solver) AND (solver, "case", start) > (@afterSolver, @afterCase, @afterStart)',
)} LIMIT @limit`;

interface EntriesKey {
  chain: number;
  number: number;
}
interface EntriesPage extends EntriesKey {
  solver: string | null;
  afterSolver: string;
  afterCase: string;
  afterStart: number;
  limit: number;
}

export function createReferencesRepo(client: DatabaseClient) {
  const { db, sqlite } = client;
  const copyRun = sqlite.prepare<[number, number, number]>(
    `INSERT INTO reference_entries (chain_id, number, solver, "case", start, solve_id)
     SELECT ?, ?, rs.name, c.name, s.start, s.id FROM solves AS s
     JOIN run_solvers AS rs ON rs.run_id = s.run_id AND rs.position = s.solver
     JOIN cases AS c ON c.id = s.case_id
     WHERE s.run_id = ?`,
  );
  const insertEntry = sqlite.prepare<[number, number, string, string, number, number | null]>(
    'INSERT INTO reference_entries (chain_id, number, solver, "case", start, solve_id) VALUES (?, ?, ?, ?, ?, ?)',
  );
  const all = sqlite.prepare<[EntriesKey], EntryRow>(entriesQuery).raw();
  const page = sqlite.prepare<[EntriesPage], EntryRow>(entriesPageQuery).raw();
  const selectNamed = () =>
    db
      .select({
        revision: referenceRevisions,
        chain: referenceChains,
        library: libraries.slug,
        suite: suites.slug,
      })
      .from(referenceRevisions)
      .innerJoin(referenceChains, eq(referenceChains.id, referenceRevisions.chainId))
      .innerJoin(libraries, eq(libraries.id, referenceChains.libraryId))
      .innerJoin(suites, eq(suites.id, referenceChains.suiteId));

  return {
    insertChain: (row: typeof referenceChains.$inferInsert): ChainRow =>
      db.insert(referenceChains).values(row).returning().get(),
    findChain: (libraryId: number, suiteId: number, platform: string): ChainRow | undefined =>
      db
        .select()
        .from(referenceChains)
        .where(
          and(
            eq(referenceChains.libraryId, libraryId),
            eq(referenceChains.suiteId, suiteId),
            eq(referenceChains.platform, platform),
          ),
        )
        .get(),
    findHead: (chainId: number): ReferenceRevisionRow | undefined =>
      db
        .select()
        .from(referenceRevisions)
        .where(eq(referenceRevisions.chainId, chainId))
        .orderBy(desc(referenceRevisions.number))
        .limit(1)
        .get(),
    insertRevision: (row: typeof referenceRevisions.$inferInsert): ReferenceRevisionRow =>
      db.insert(referenceRevisions).values(row).returning().get(),
    /** Enters every solve of a run; returns how many. */
    enterRun: (chainId: number, number: number, runId: number): number =>
      copyRun.run(chainId, number, runId).changes,
    enter(chainId: number, number: number, entries: NewEntry[]): void {
      for (const entry of entries)
        insertEntry.run(chainId, number, entry.solver, entry.case, entry.start ?? -1, entry.solveId);
    },
    findNamed: (id: number) => selectNamed().where(eq(referenceRevisions.id, id)).get(),
    /** Newest first, over the chains of a library. */
    listQuery: (options: {
      libraryId: number;
      suiteId?: number | undefined;
      platform?: string | undefined;
      before?: number | undefined;
      limit: number;
    }) =>
      selectNamed()
        .where(
          and(
            eq(referenceChains.libraryId, options.libraryId),
            options.suiteId === undefined ? undefined : eq(referenceChains.suiteId, options.suiteId),
            options.platform === undefined ? undefined : eq(referenceChains.platform, options.platform),
            options.before === undefined ? undefined : lt(referenceRevisions.id, options.before),
          ),
        )
        .orderBy(desc(referenceRevisions.id))
        .limit(options.limit),
    readEntries: (key: EntriesKey): EntryRow[] => all.all(key),
    readEntriesPage: (key: EntriesPage): EntryRow[] => page.all(key),
  };
}

export type ReferencesRepo = ReturnType<typeof createReferencesRepo>;
export type NamedReference = NonNullable<ReturnType<ReferencesRepo['findNamed']>>;
