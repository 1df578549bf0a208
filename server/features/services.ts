import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { matchNames } from '../../shared/comparison/pair.ts';
import type { Environment } from '../../shared/schemas/measurement.ts';
import { solveKey } from '../../shared/schemas/solve.ts';
import { createBuildStore } from '../builds/build-store.ts';
import type { DatabaseClient } from '../db/client.ts';
import { type Clock, systemClock } from '../jobs/clock.ts';
import { createEventBus } from '../jobs/event-bus.ts';
import { createJobRunner, type JobRunnerOptions } from '../jobs/job-runner.ts';
import { createQueue } from '../jobs/queue.ts';
import { createMailService } from '../mail/mail.service.ts';
import { createOutboxRepo } from '../mail/outbox.repo.ts';
import { createAllowancesService } from './allowances/allowances.service.ts';
import { createAuditService } from './audit/audit.service.ts';
import type { ReadManifest } from './builds/build-folder.ts';
import { createBuildLogsRepo } from './builds/build-logs.repo.ts';
import { createBuildLogsService } from './builds/build-logs.service.ts';
import { createBuildPreviewsService } from './builds/build-previews.service.ts';
import { createBuildsRepo } from './builds/builds.repo.ts';
import { createBuildsService } from './builds/builds.service.ts';
import { createPrepareJob, prepareMs } from './builds/prepare-job.ts';
import { createCodeDiffsService } from './comparisons/code-diffs.service.ts';
import { loadReferenceSide, loadRunSide } from './comparisons/comparable.ts';
import { createComparisonsService } from './comparisons/comparisons.service.ts';
import { createExportsService } from './comparisons/exports.service.ts';
import { createProfilesService } from './comparisons/profiles.service.ts';
import { createInvitationsService } from './invitations/invitations.service.ts';
import { createKitsService } from './kits/kits.service.ts';
import { createLibrariesService } from './libraries/libraries.service.ts';
import { createTrendsService } from './libraries/trends.service.ts';
import { createMembersRepo } from './members/members.repo.ts';
import { createMembersService } from './members/members.service.ts';
import { createPeopleService } from './people/people.service.ts';
import { createReferencesRepo } from './references/references.repo.ts';
import { createReferencesService, platformOf } from './references/references.service.ts';
import type { BaseSolves } from './runs/confirm-run.ts';
import type { Measuring } from './runs/measuring.ts';
import { createRunJob } from './runs/run-job.ts';
import { createRunSolves } from './runs/run-solves.ts';
import { createRunsRepo, type RunRow } from './runs/runs.repo.ts';
import { createRunsService } from './runs/runs.service.ts';
import { createSolveListRepo } from './runs/solve-list.repo.ts';
import { createSolvesRepo } from './runs/solves.repo.ts';
import { createSolvesService } from './runs/solves.service.ts';
import { createStripsService } from './runs/strips.service.ts';
import { createSolversService } from './solvers/solvers.service.ts';
import { createSuitesService } from './suites/suites.service.ts';
import { createTokensService } from './tokens/tokens.service.ts';

export interface ServicesOptions {
  client: DatabaseClient;
  measuring: Measuring;
  readManifest: ReadManifest;
  /** Where this process measures, and with what. */
  environment: Environment;
  lanes: number;
  /** Where the files of builds are kept; beside the database where it is left out. */
  dataFolder?: string;
  /** Whether requests may name folders and repositories of this machine; not, where it is left out. */
  allowsLocalPaths?: boolean;
  /** For preparing one build. */
  prepareMs?: number;
  /** Where people reach the server, for links in mails. */
  address?: () => string;
  onJobError: JobRunnerOptions['onError'];
  clock?: Clock;
  pollMs?: number;
}

/**
 * Everything that the product can do, for the web server, the command line and the demo alike. The job
 * runner works on runs once it is started; without it they wait for another process.
 */
export function createServices(options: ServicesOptions) {
  const { client, measuring, environment } = options;
  const clock = options.clock ?? systemClock;
  const { db } = client;
  const bus = createEventBus();
  const queue = createQueue(client, clock);
  const base = { client, clock, bus };

  const audit = createAuditService(db, clock);
  const members = createMembersRepo(db);
  const libraries = createLibrariesService({ ...base, audit, members });
  const address = () => options.address?.() ?? 'http://localhost';
  const outbox = createOutboxRepo(db);
  const mail = createMailService({ ...base, audit, outbox });
  const people = createPeopleService({ ...base, audit });
  const tokens = createTokensService({ ...base, audit, libraries });
  const memberships = createMembersService({ ...base, audit, libraries, people, members });
  const invitations = createInvitationsService({
    ...base,
    audit,
    libraries,
    people,
    members: memberships,
    mail,
    address,
  });
  const solvers = createSolversService(db, libraries);
  const store = createBuildStore(options.dataFolder ?? path.dirname(client.sqlite.name));
  const { readManifest } = options;
  const allowsLocalPaths = options.allowsLocalPaths ?? false;
  const buildPreviews = createBuildPreviewsService({
    ...base,
    libraries,
    readManifest,
    store,
    allowsLocalPaths,
  });
  const wakeRunner = () => jobRunner.wake();
  const builds = createBuildsService({
    ...base,
    audit,
    libraries,
    readManifest,
    previews: buildPreviews,
    store,
    queue,
    wakeRunner,
  });
  const logs = createBuildLogsRepo(client);
  const buildLogs = createBuildLogsService({ logs, builds });
  const suites = createSuitesService({ ...base, audit });
  const allowances = createAllowancesService({ ...base, audit, libraries });

  const runsRepo = createRunsRepo(client);
  const solvesRepo = createSolvesRepo(client);
  const runSolves = createRunSolves({ runs: runsRepo, solves: solvesRepo, suites });
  const references = createReferencesService({
    ...base,
    audit,
    libraries,
    suites,
    runs: runsRepo,
    runSolves,
    repo: createReferencesRepo(client),
    platform: platformOf(environment),
  });
  const runs = createRunsService({
    ...base,
    queue,
    audit,
    libraries,
    builds,
    suites,
    runs: runsRepo,
    measuring,
    lanes: options.lanes,
    currentReference: references.current,
    requireReference: references.requireFor,
    wakeRunner,
    abortRun: (id) => jobRunner.abortSubject('run', id),
  });
  const solves = createSolvesService({
    runs,
    runSolves,
    solves: solvesRepo,
    lists: createSolveListRepo(client),
    decodePath: measuring.decodePath,
  });
  const strips = createStripsService({
    runs,
    runSolves,
    solves: solvesRepo,
    decodePath: measuring.decodePath,
  });

  const comparisons = createComparisonsService({ runs, runSolves, references, allowances });
  const exports = createExportsService({ comparisons, allowances });
  const codeDiffs = createCodeDiffsService({ runs, builds, references, store });
  const profiles = createProfilesService({ runs, runSolves, solves: solvesRepo, comparisons });
  const trends = createTrendsService({ client, libraries, suites, runs: runsRepo });

  const sides = { runs, runSolves, references };
  /** What a run is compared with, under the names that its own build has for the solvers. */
  function readBase(run: RunRow): BaseSolves | null {
    const { baseRunId, baseReferenceId } = run;
    if (baseRunId === null && baseReferenceId === null) return null;
    const side =
      baseRunId === null ? loadReferenceSide(sides, baseReferenceId ?? 0) : loadRunSide(sides, baseRunId);
    const declarations = runSolves.keysOf(run).solvers.map((solver) => solver.declaration);
    const { now } = matchNames(side.run.solvers, declarations);
    return new Map(
      side.run.solves.map((solve) => [
        solveKey({ ...solve, solver: now.get(solve.solver) ?? solve.solver }),
        solve,
      ]),
    );
  }

  const jobRunner = createJobRunner({
    queue,
    handlers: {
      prepare: createPrepareJob({
        client,
        queue,
        bus,
        builds: createBuildsRepo(db),
        logs,
        libraries,
        store,
        timeLimitMs: options.prepareMs ?? prepareMs,
      }),
      run: createRunJob({
        client,
        clock,
        queue,
        runs: runsRepo,
        solves: solvesRepo,
        runSolves,
        builds,
        suites,
        measuring,
        environment,
        readBase,
        publish: runs.publish,
      }),
    },
    onError: options.onJobError,
    pollMs: options.pollMs ?? 1000,
  });

  const kits = createKitsService(fileURLToPath(new URL('../kits/', import.meta.url)));

  return {
    audit,
    address,
    people,
    members: memberships,
    invitations,
    tokens,
    mail,
    outbox,
    kits,
    libraries,
    solvers,
    builds,
    buildPreviews,
    buildLogs,
    suites,
    allowances,
    references,
    comparisons,
    exports,
    codeDiffs,
    profiles,
    trends,
    runs,
    solves,
    runSolves,
    strips,
    bus,
    queue,
    jobRunner,
    environment,
  };
}

export type Services = ReturnType<typeof createServices>;
