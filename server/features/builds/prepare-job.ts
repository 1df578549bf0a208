import { AppError } from '../../../shared/errors.ts';
import type { BuildStore } from '../../builds/build-store.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import { type JobHandler, noLongerHeld, shuttingDown } from '../../jobs/job-runner.ts';
import { type Job, LeaseLost, type Queue } from '../../jobs/queue.ts';
import { prepareHome, runPrepareLine } from '../../runner/prepare-line.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import { createBuildLogWriter } from './build-log-writer.ts';
import type { BuildLogsRepo } from './build-logs.repo.ts';
import type { BuildRow, BuildsRepo } from './builds.repo.ts';

export interface PrepareJobDeps {
  client: DatabaseClient;
  queue: Queue;
  bus: EventBus;
  builds: BuildsRepo;
  logs: BuildLogsRepo;
  libraries: LibrariesService;
  store: BuildStore;
  /** For all lines of one build together. */
  timeLimitMs: number;
}

export const prepareMs = 30 * 60_000;
/** Starts in a row that Tallyroot did not survive, before the build is taken for what ends it. */
const maxStarts = 5;

/**
 * Runs the prepare lines of a build, one after the other, until one fails. A build that was interrupted is begun
 * again from its files as they came, in a new folder: what an earlier attempt has left, or still does, is of no
 * consequence. Only a folder of this machine is prepared where it lies.
 */
export function createPrepareJob(deps: PrepareJobDeps): JobHandler {
  const { queue, builds, store } = deps;

  function announce(build: BuildRow): void {
    const library = deps.libraries.slugOf(build.libraryId);
    deps.bus.publish({ kind: 'build', library, build: build.id });
  }

  /** Returns why it failed, or null. */
  async function prepare(job: Job, build: BuildRow, signal: AbortSignal): Promise<string | null> {
    const log = createBuildLogWriter(deps.logs, build.id, (write) =>
      inTransaction(deps.client, () => {
        queue.hold(job.id);
        write();
      }),
    );
    const { home, drop } = prepareHome();
    const { prepare: lines, environment } = build.recipe;
    let leftMs = deps.timeLimitMs;
    try {
      if (deps.logs.read(build.id, 0).length > 0) log.say('note', 'It begins again.');
      for (const [index, command] of lines.entries()) {
        log.say('line', command);
        const result = await runPrepareLine({
          command,
          folder: build.folder,
          home,
          environment,
          timeLimitMs: leftMs,
          onOutput: log.output,
          signal,
        });
        if (signal.aborted) return null;
        leftMs -= result.elapsedMs;
        const seconds = (result.elapsedMs / 1000).toFixed(1);
        const end = result.isOverTime ? 'ended, since the time is over' : result.end;
        log.say('note', `${end}, ${seconds} s`);
        if (result.hasSucceeded) continue;
        const which =
          lines.length === 1 ? 'The prepare line' : `Prepare line ${index + 1} of ${lines.length}`;
        const limit = Math.round(deps.timeLimitMs / 1000);
        return result.isOverTime
          ? `${which} was not done when the ${limit} s for preparing were over.`
          : `${which} failed: ${result.end}.`;
      }
      return null;
    } finally {
      log.stop();
      drop();
    }
  }

  async function work(job: Job, found: BuildRow, signal: AbortSignal): Promise<string | null> {
    let build = found;
    if (found.sourceKey !== null) {
      const folder = await store.copyForBuild(found.sourceKey);
      build = { ...found, folder };
      inTransaction(deps.client, () => {
        queue.hold(job.id);
        builds.update(found.id, { folder });
      });
      await store.dropCopy(found.folder);
    }
    builds.updateWhile(build.id, ['waiting', 'preparing'], { state: 'preparing' });
    announce(build);
    return prepare(job, build, signal);
  }

  function end(job: Job, build: BuildRow, set: Pick<BuildRow, 'state' | 'reason'>): void {
    inTransaction(deps.client, () => {
      queue.hold(job.id);
      builds.updateWhile(build.id, ['waiting', 'preparing'], set);
    });
    announce(build);
  }

  return async (job, signal) => {
    const build = builds.find(job.subject);
    if (!build || (build.state !== 'waiting' && build.state !== 'preparing')) return;
    if (job.attempts > maxStarts) {
      const reason = `It was begun ${maxStarts} times and Tallyroot ended each time before it was prepared.`;
      return end(job, build, { state: 'failed', reason });
    }
    try {
      const reason = await work(job, build, signal);
      if (signal.reason === noLongerHeld) return;
      if (signal.reason === shuttingDown) {
        // Not the build's doing, so that this start does not count against it.
        queue.progressed(job.id);
        return end(job, build, { state: 'waiting', reason: null });
      }
      end(job, build, { state: reason === null ? 'ready' : 'failed', reason });
    } catch (error) {
      if (error instanceof LeaseLost || signal.reason === noLongerHeld) return;
      const isExpected = error instanceof AppError;
      const reason = isExpected
        ? error.message
        : 'Tallyroot itself failed while preparing it; the log of the server says more.';
      end(job, build, { state: 'failed', reason });
      if (!isExpected) throw error;
    }
  };
}
