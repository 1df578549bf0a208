import { AppError } from '../../../shared/errors.ts';
import type { Environment } from '../../../shared/schemas/measurement.ts';
import { solveKey } from '../../../shared/schemas/solve.ts';
import type { DatabaseClient } from '../../db/client.ts';
import type { Clock } from '../../jobs/clock.ts';
import { type JobHandler, noLongerHeld, shuttingDown } from '../../jobs/job-runner.ts';
import { type Job, LeaseLost, maxAttempts, type Queue } from '../../jobs/queue.ts';
import type { BuildsService } from '../builds/builds.service.ts';
import type { SuitesService } from '../suites/suites.service.ts';
import { type BaseSolves, solvesToConfirm } from './confirm-run.ts';
import type { MeasureOptions, Measuring } from './measuring.ts';
import type { RunKeys, RunSolves } from './run-solves.ts';
import type { RunRow, RunsRepo } from './runs.repo.ts';
import { createSolveSink } from './solve-sink.ts';
import type { SolvesRepo } from './solves.repo.ts';

export interface RunJobDeps {
  client: DatabaseClient;
  clock: Clock;
  queue: Queue;
  runs: RunsRepo;
  solves: SolvesRepo;
  runSolves: RunSolves;
  builds: BuildsService;
  suites: SuitesService;
  measuring: Measuring;
  environment: Environment;
  /** The solves that a run is compared with, by key; null where it is compared with nothing. */
  readBase(run: RunRow): BaseSolves | null;
  publish(runId: number): void;
}

const logCharacters = 65_536;
const confirmBatch = 50;

/**
 * Runs a build on a suite revision. May be repeated at any point: what is stored is not measured again and
 * what is marked is not confirmed again, so a run that was interrupted ends with the results of one that
 * was not.
 */
export function createRunJob(deps: RunJobDeps): JobHandler {
  const { queue, runs, solves } = deps;

  function measureOptions(run: RunRow, keys: RunKeys, signal: AbortSignal): MeasureOptions {
    const build = deps.builds.require(run.buildId);
    const { evaluations, seconds, runSeconds, lanes, fresh } = run.settings;
    const left = runSeconds === null ? null : Math.max(0.001, runSeconds - run.elapsedMs / 1000);
    return {
      folder: build.folder,
      adapter: build.recipe.adapter,
      environment: build.recipe.environment,
      solvers: keys.solvers.map((solver) => solver.declaration),
      cases: keys.cases.map((row) => row.case),
      limits: { evaluations, seconds, ...(left === null ? {} : { runSeconds: left }) },
      lanes,
      fresh,
      confinement: deps.environment.confinement,
      signal,
    };
  }

  /** Returns why it stopped early, or null. */
  async function measureRun(
    job: Job,
    run: RunRow,
    keys: RunKeys,
    outer: AbortSignal,
  ): Promise<string | null> {
    const failure = new AbortController();
    const signal = AbortSignal.any([outer, failure.signal]);
    const done = new Set(
      solves.readKeys(run.id).map(([solver, caseId, start]) => `${solver} ${caseId} ${start}`),
    );
    const rowKey = (key: string): string => {
      const [solver = '', name = '', start = ''] = key.split('\u0000');
      return `${keys.positionOf.get(solver)} ${keys.caseIdOf.get(name)} ${start === '' ? -1 : start}`;
    };
    let storeError: unknown;
    const sink = createSolveSink({
      keys,
      encodePath: deps.measuring.encodePath,
      store: (batch) => {
        const counts = solves.insertMany(run.id, batch, () => queue.hold(job.id));
        if (counts.stored > 0 && job.attempts > 1) queue.progressed(job.id);
        deps.publish(run.id);
      },
      onError: (error) => {
        storeError = error;
        failure.abort(error);
      },
    });
    const result = await deps.measuring.measure({
      ...measureOptions(run, keys, signal),
      isDone: (key) => done.has(rowKey(key)),
      // A solve that ends because the run is called off says nothing about the solver.
      onSolve: (record, path) => {
        if (!signal.aborted) sink.add(record, path);
      },
    });
    sink.flush();
    if (storeError !== undefined) throw storeError;
    runs.update(run.id, {
      adapterText: result.adapterText || run.adapterText,
      log: (run.log + result.log).slice(-logCharacters),
    });
    runs.addElapsed(run.id, result.elapsedMs);
    return result.stopped;
  }

  async function confirmRun(job: Job, run: RunRow, keys: RunKeys, signal: AbortSignal): Promise<void> {
    const all = deps.runSolves.readAll(run, keys);
    const due = solvesToConfirm(all, run.settings.confirm, deps.readBase(run));
    runs.update(run.id, { phase: 'confirming', toConfirm: due.length });
    deps.publish(run.id);
    const open = due.filter((solve) => solve.steady === null);
    const options = measureOptions(run, keys, signal);
    for (let from = 0; from < open.length && !signal.aborted; from += confirmBatch) {
      const batch = open.slice(from, from + confirmBatch);
      const records = batch.map(({ id: _id, ...record }) => record);
      const steadyOf = await deps.measuring.confirm(options, records);
      if (signal.aborted) return;
      const marks = batch.flatMap((solve) => {
        const isSteady = steadyOf.get(solveKey(solve));
        return isSteady === undefined ? [] : [{ id: solve.id, isSteady }];
      });
      solves.markSteady(run.id, marks, () => queue.hold(job.id));
      if (job.attempts > 1) queue.progressed(job.id);
      deps.publish(run.id);
    }
  }

  function end(runId: number, set: Pick<RunRow, 'status' | 'reason'>): void {
    runs.updateWhile(runId, ['queued', 'running'], { ...set, phase: 'done', finishedAt: deps.clock() });
    deps.publish(runId);
  }

  async function work(job: Job, run: RunRow, signal: AbortSignal): Promise<void> {
    if (run.environment && run.environment.fingerprint !== deps.environment.fingerprint)
      throw new AppError(
        'conflict',
        'This run was begun where arithmetic gives other bits (another Node.js, most likely). Run it again.',
      );
    await deps.builds.check(deps.builds.require(run.buildId));
    runs.updateWhile(run.id, ['queued', 'running'], {
      status: 'running',
      phase: run.phase === 'waiting' ? 'measuring' : run.phase,
      environment: deps.environment,
      startedAt: run.startedAt ?? deps.clock(),
    });
    deps.publish(run.id);
    const keys = deps.runSolves.keysOf(run);
    if (run.phase !== 'confirming') {
      const stopped = await measureRun(job, run, keys, signal);
      if (signal.aborted) return;
      if (stopped !== null) return end(run.id, { status: 'stopped', reason: stopped });
    }
    await confirmRun(job, run, keys, signal);
    if (!signal.aborted) end(run.id, { status: 'finished', reason: null });
  }

  return async (job, signal) => {
    const run = runs.find(job.subject);
    if (!run || (run.status !== 'queued' && run.status !== 'running')) return;
    if (job.attempts > maxAttempts)
      return end(run.id, {
        status: 'failed',
        reason: `It was begun ${maxAttempts} times and Tallyroot ended each time before anything was stored.`,
      });
    try {
      await work(job, run, signal);
      if (signal.reason === shuttingDown) runs.updateWhile(run.id, ['running'], { status: 'queued' });
    } catch (error) {
      if (error instanceof LeaseLost || signal.reason === noLongerHeld) return;
      const isExpected = error instanceof AppError;
      const reason = isExpected
        ? error.message
        : 'Tallyroot itself failed during this run; the log of the server says more.';
      end(run.id, { status: 'failed', reason });
      if (!isExpected) throw error;
    }
  };
}
