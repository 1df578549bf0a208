import { AppError } from '../../../shared/errors.ts';
import type { Page } from '../../../shared/schemas/paging.ts';
import {
  type RunBase,
  type RunDetail,
  type RunSettings,
  type RunsQuery,
  type RunView,
  runSettings,
  type StartRunBody,
} from '../../../shared/schemas/runs.ts';
import type { SolverDeclaration } from '../../../shared/schemas/solver.ts';
import type { Actor } from '../../actor.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import { numberCursor, toPage } from '../../db/cursor.ts';
import type { VisibleLibraries } from '../../db/visible-libraries.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { Queue } from '../../jobs/queue.ts';
import type { AuditService } from '../audit/audit.service.ts';
import type { BuildRow } from '../builds/builds.repo.ts';
import type { BuildsService } from '../builds/builds.service.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import type { RevisionRow } from '../suites/suites.repo.ts';
import type { SuitesService } from '../suites/suites.service.ts';
import type { Measuring } from './measuring.ts';
import { presentBase, presentProgress, presentRun, presentRunDetail } from './runs.present.ts';
import type { NamedRun, RunRow, RunsRepo } from './runs.repo.ts';

export interface RunsServiceDeps {
  client: DatabaseClient;
  clock: Clock;
  bus: EventBus;
  queue: Queue;
  audit: AuditService;
  libraries: LibrariesService;
  builds: BuildsService;
  suites: SuitesService;
  runs: RunsRepo;
  measuring: Pick<Measuring, 'countSolves'>;
  lanes: number;
  /** The revision of the reference results that a run on this machine is compared with, if there is one. */
  currentReference(libraryId: number, suiteId: number): number | undefined;
  /** Throws where the base is not of this library and suite. */
  requireReference(revisionId: number, libraryId: number, suiteId: number): void;
  /** Tells the job runner of this process, where there is one. */
  wakeRunner(): void;
  abortRun(runId: number): void;
}

const finalStatuses: ReadonlySet<RunView['status']> = new Set(['finished', 'stopped', 'cancelled', 'failed']);

export function isFinal(run: Pick<RunView, 'status'>): boolean {
  return finalStatuses.has(run.status);
}

export function createRunsService(deps: RunsServiceDeps) {
  const { runs } = deps;

  function requireNamed(id: number): NamedRun {
    const row = runs.findNamed(id);
    if (!row) throw new AppError('not_found', `There is no run ${id}.`);
    return row;
  }

  function requireRun(id: number): RunRow {
    const row = runs.find(id);
    if (!row) throw new AppError('not_found', `There is no run ${id}.`);
    return row;
  }

  function publish(id: number): void {
    const { run, library } = requireNamed(id);
    const { status, phase } = run;
    deps.bus.publish({ kind: 'run', run: id, library, status, phase, progress: presentProgress(run) });
  }

  function chooseSolvers(build: BuildRow, wanted: string[] | undefined): SolverDeclaration[] {
    const declared = build.recipe.solvers;
    if (wanted === undefined) return declared;
    const unknown = wanted.filter((name) => !declared.some((solver) => solver.name === name));
    if (unknown.length > 0)
      throw new AppError('unprocessable', `Build ${build.id} does not declare ${unknown.join(', ')}.`, {
        issues: unknown.map((name) => ({ path: 'solvers', message: `${name} is not declared` })),
      });
    return declared.filter((solver) => wanted.includes(solver.name));
  }

  function chooseBase(body: StartRunBody, libraryId: number, suiteId: number): RunBase | null {
    if (body.against === undefined) {
      const revision = deps.currentReference(libraryId, suiteId);
      return revision === undefined ? null : { kind: 'reference', revision };
    }
    if (body.against?.kind === 'run') {
      const base = requireRun(body.against.run);
      if (base.libraryId !== libraryId || base.suiteId !== suiteId)
        throw new AppError('unprocessable', `Run ${base.id} is of another library or suite.`, {
          issues: [{ path: 'against.run', message: 'another library or suite' }],
        });
    }
    if (body.against?.kind === 'reference') deps.requireReference(body.against.revision, libraryId, suiteId);
    return body.against;
  }

  function settingsOf(revision: RevisionRow, given: Partial<RunSettings> | undefined): RunSettings {
    return runSettings.parse({
      evaluations: revision.evaluations,
      seconds: revision.seconds,
      runSeconds: null,
      lanes: deps.lanes,
      fresh: false,
      confirm: 'differing',
      ...given,
    });
  }

  function start(actor: Actor, body: StartRunBody): RunView {
    const build = deps.builds.require(body.build);
    deps.builds.requireUsable(build);
    const { suite, revision } = deps.suites.requireRevision(body.suite, body.revision);
    const declarations = chooseSolvers(build, body.solvers);
    const base = chooseBase(body, build.libraryId, suite.id);
    const cases = deps.suites.casesOf(revision.id).map((row) => row.case);
    const run = inTransaction(deps.client, () => {
      const row = runs.insert(
        {
          libraryId: build.libraryId,
          buildId: build.id,
          suiteId: suite.id,
          revisionId: revision.id,
          status: 'queued',
          phase: 'waiting',
          settings: settingsOf(revision, body.settings),
          baseRunId: base?.kind === 'run' ? base.run : null,
          baseReferenceId: base?.kind === 'reference' ? base.revision : null,
          planned: deps.measuring.countSolves(declarations, cases),
          stored: 0,
          solved: 0,
          evaluations: 0,
          toConfirm: 0,
          confirmed: 0,
          unsteady: 0,
          log: '',
          elapsedMs: 0,
          createdAt: deps.clock(),
          createdBy: actor.name,
        },
        declarations.map((declaration, position) => ({ position, name: declaration.name, declaration })),
      );
      deps.queue.enqueue('run', row.id);
      deps.audit.record(actor, 'run started', row.libraryId, `run ${row.id}`, {
        build: build.id,
        suite: suite.slug,
        revision: revision.number,
      });
      return row;
    });
    publish(run.id);
    deps.wakeRunner();
    return presentRun(requireNamed(run.id));
  }

  return {
    start,
    requireRun,
    publish,
    get: (id: number): RunView => presentRun(requireNamed(id)),
    getDetail: (id: number): RunDetail =>
      presentRunDetail(requireNamed(id), runs.readSolvers(id), runs.countOutcomes(id)),
    /** Of the libraries that are visible; of all where it does not matter who asks. */
    list(query: RunsQuery, visible?: VisibleLibraries): Page<RunView> {
      const rows = runs
        .listQuery({
          libraryId: query.library === undefined ? undefined : deps.libraries.require(query.library).id,
          suiteId: query.suite === undefined ? undefined : deps.suites.requireSuite(query.suite).id,
          buildId: query.build,
          visible,
          status: query.status,
          before: numberCursor(query.cursor, 1)?.[0],
          limit: query.limit + 1,
        })
        .all();
      return toPage(rows, query.limit, (row) => [row.run.id], presentRun);
    },
    /** Ends a run that waits or runs; what it has measured is kept. */
    cancel(actor: Actor, id: number): RunView {
      const run = requireRun(id);
      inTransaction(deps.client, () => {
        const isCancelled = runs.updateWhile(id, ['queued', 'running'], {
          status: 'cancelled',
          phase: 'done',
          reason: `Cancelled by ${actor.name}.`,
          finishedAt: deps.clock(),
        });
        if (!isCancelled) throw new AppError('conflict', `Run ${id} has ended already.`);
        deps.queue.cancel('run', id);
        deps.audit.record(actor, 'run cancelled', run.libraryId, `run ${id}`);
      });
      deps.abortRun(id);
      publish(id);
      return presentRun(requireNamed(id));
    },
    /** A new run of the same build, suite revision, solvers and settings, compared with the same. */
    again(actor: Actor, id: number): RunView {
      const run = requireRun(id);
      return start(actor, {
        build: run.buildId,
        suite: deps.suites.suiteById(run.suiteId).slug,
        revision: deps.suites.revisionById(run.revisionId).number,
        solvers: runs.readSolvers(id).map((solver) => solver.name),
        against: presentBase(run),
        settings: run.settings,
      });
    },
    /**
     * Resolves when the run has ended, whatever its end. The database is looked at now and then besides
     * the events, since another process may be the one that works on it.
     */
    async wait(id: number, options: { signal?: AbortSignal; pollMs?: number } = {}): Promise<RunView> {
      for (;;) {
        options.signal?.throwIfAborted();
        const view = presentRun(requireNamed(id));
        if (isFinal(view)) return view;
        await new Promise<void>((resolve) => {
          const done = () => {
            clearTimeout(timer);
            unsubscribe();
            options.signal?.removeEventListener('abort', done);
            resolve();
          };
          const timer = setTimeout(done, options.pollMs ?? 500);
          const unsubscribe = deps.bus.subscribe((event) => {
            if (event.kind === 'run' && event.run === id && isFinal(event)) done();
          });
          options.signal?.addEventListener('abort', done, { once: true });
        });
      }
    },
  };
}

export type RunsService = ReturnType<typeof createRunsService>;
