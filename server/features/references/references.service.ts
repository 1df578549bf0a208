import type { z } from 'zod';
import { AppError } from '../../../shared/errors.ts';
import type { Environment } from '../../../shared/schemas/measurement.ts';
import type { Page } from '../../../shared/schemas/paging.ts';
import type {
  ReferenceEntriesQuery,
  ReferenceEntryView,
  ReferenceRevisionView,
  referenceQuery,
  SetReferenceBody,
} from '../../../shared/schemas/references.ts';
import type { Actor } from '../../actor.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import { decodeCursor, numberCursor, toPage } from '../../db/cursor.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { AuditService } from '../audit/audit.service.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import type { RunSolves } from '../runs/run-solves.ts';
import type { RunRow, RunsRepo } from '../runs/runs.repo.ts';
import type { SuitesService } from '../suites/suites.service.ts';
import { presentEntry, presentReference } from './references.present.ts';
import type {
  ChainRow,
  EntryRow,
  NamedReference,
  NewEntry,
  ReferenceRevisionRow,
  ReferencesRepo,
} from './references.repo.ts';

/** Reference results are kept apart by platform: other arithmetic, other paths. */
export function platformOf(environment: Pick<Environment, 'platform' | 'arch'>): string {
  return `${environment.platform}-${environment.arch}`;
}

export function createReferencesService(deps: {
  client: DatabaseClient;
  clock: Clock;
  bus: EventBus;
  audit: AuditService;
  libraries: LibrariesService;
  suites: SuitesService;
  runs: RunsRepo;
  runSolves: RunSolves;
  repo: ReferencesRepo;
  platform: string;
}) {
  const { repo } = deps;

  function requireNamed(id: number): NamedReference {
    const row = repo.findNamed(id);
    if (!row) throw new AppError('not_found', `There is no reference revision ${id}.`);
    return row;
  }

  function requireRun(id: number): RunRow {
    const run = deps.runs.find(id);
    if (!run) throw new AppError('not_found', `There is no run ${id}.`);
    return run;
  }

  function announce(id: number): ReferenceRevisionView {
    const view = presentReference(requireNamed(id));
    deps.bus.publish({ kind: 'reference', library: view.library, revision: id });
    return view;
  }

  return {
    /** Makes a finished run the first link of its chain. A chain that exists goes on by its own links. */
    setFirst(actor: Actor, slug: string, body: SetReferenceBody): ReferenceRevisionView {
      const library = deps.libraries.require(slug);
      const run = requireRun(body.run);
      if (run.libraryId !== library.id)
        throw new AppError('unprocessable', `Run ${run.id} belongs to another library.`, {
          issues: [{ path: 'run', message: 'another library' }],
        });
      if (run.status !== 'finished' || run.environment === null)
        throw new AppError(
          'conflict',
          `Run ${run.id} is ${run.status}; only a finished run can be a reference.`,
        );
      const platform = platformOf(run.environment);
      const id = inTransaction(deps.client, () => {
        if (repo.findChain(library.id, run.suiteId, platform))
          throw new AppError(
            'conflict',
            `Library “${slug}” has reference results for this suite on ${platform} already; they are changed by a proposal.`,
          );
        const now = deps.clock();
        const chain = repo.insertChain({
          libraryId: library.id,
          suiteId: run.suiteId,
          platform,
          createdAt: now,
        });
        const revision = repo.insertRevision({
          chainId: chain.id,
          number: 1,
          parentId: null,
          runId: run.id,
          reason: body.reason,
          changed: run.stored,
          createdAt: now,
          createdBy: actor.name,
        });
        repo.enterRun(chain.id, 1, run.id);
        deps.audit.record(actor, 'reference set', library.id, `reference ${revision.id}`, {
          run: run.id,
          number: 1,
          reason: body.reason,
        });
        return revision.id;
      });
      return announce(id);
    },
    /** Adds a link with some entries set anew; the others stay as the parent has them. */
    append(
      actor: Actor,
      parentId: number,
      change: { run: number | null; reason: string; entries: NewEntry[] },
    ): ReferenceRevisionView {
      const { chain, revision: parent } = requireNamed(parentId);
      const id = inTransaction(deps.client, () => {
        if (repo.findHead(chain.id)?.id !== parent.id)
          throw new AppError('conflict', 'The reference results have changed meanwhile; look at them again.');
        const revision = repo.insertRevision({
          chainId: chain.id,
          number: parent.number + 1,
          parentId: parent.id,
          runId: change.run,
          reason: change.reason,
          changed: change.entries.length,
          createdAt: deps.clock(),
          createdBy: actor.name,
        });
        repo.enter(chain.id, revision.number, change.entries);
        deps.audit.record(actor, 'reference set', chain.libraryId, `reference ${revision.id}`, {
          run: change.run,
          number: revision.number,
          reason: change.reason,
        });
        return revision.id;
      });
      return announce(id);
    },
    /** The newest revision for this platform; undefined where nothing has been agreed on yet. */
    current(libraryId: number, suiteId: number): number | undefined {
      const chain = repo.findChain(libraryId, suiteId, deps.platform);
      return chain && repo.findHead(chain.id)?.id;
    },
    requireFor(id: number, libraryId: number, suiteId: number): void {
      const { chain } = requireNamed(id);
      if (chain.libraryId !== libraryId || chain.suiteId !== suiteId)
        throw new AppError('unprocessable', `Reference revision ${id} is of another library or suite.`, {
          issues: [{ path: 'against.revision', message: 'another library or suite' }],
        });
    },
    get: (id: number): ReferenceRevisionView => presentReference(requireNamed(id)),
    list(slug: string, query: z.output<typeof referenceQuery>): Page<ReferenceRevisionView> {
      const rows = repo
        .listQuery({
          libraryId: deps.libraries.require(slug).id,
          suiteId: query.suite === undefined ? undefined : deps.suites.requireSuite(query.suite).id,
          platform: query.platform,
          before: numberCursor(query.cursor, 1)?.[0],
          limit: query.limit + 1,
        })
        .all();
      return toPage(rows, query.limit, (row) => [row.revision.id], presentReference);
    },
    /** The rows of all that holds as of a revision, for comparisons. */
    readRows(id: number): { chain: ChainRow; revision: ReferenceRevisionRow; rows: EntryRow[] } {
      const { chain, revision } = requireNamed(id);
      return { chain, revision, rows: repo.readEntries({ chain: chain.id, number: revision.number }) };
    },
    /** All that holds as of a revision, by solver, case and start. */
    readEntries(id: number): ReferenceEntryView[] {
      const { chain, revision } = requireNamed(id);
      const present = deps.runSolves.createPresenter(requireRun);
      return repo
        .readEntries({ chain: chain.id, number: revision.number })
        .map((row) => presentEntry(row, present));
    },
    listEntries(id: number, query: ReferenceEntriesQuery): Page<ReferenceEntryView> {
      const { chain, revision } = requireNamed(id);
      const [afterSolver = '', afterCase = '', afterStart = -2] =
        decodeCursor(query.cursor, ['string', 'string', 'number']) ?? [];
      const rows = repo.readEntriesPage({
        chain: chain.id,
        number: revision.number,
        solver: query.solver ?? null,
        afterSolver: String(afterSolver),
        afterCase: String(afterCase),
        afterStart: Number(afterStart),
        limit: query.limit + 1,
      });
      const present = deps.runSolves.createPresenter(requireRun);
      return toPage(
        rows,
        query.limit,
        (row) => [row[0], row[1], row[2]],
        (row) => presentEntry(row, present),
      );
    },
  };
}

export type ReferencesService = ReturnType<typeof createReferencesService>;
