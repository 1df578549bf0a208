import { type Job, type JobKind, LeaseLost, leaseMs, type Queue } from './queue.ts';

/** Safe to repeat. Ends early, without an error, when `signal` fires. */
export type JobHandler = (job: Job, signal: AbortSignal) => Promise<void>;

export interface JobRunnerOptions {
  queue: Queue;
  handlers: Record<JobKind, JobHandler>;
  /** Called with what a handler throws. */
  onError(job: Job, error: unknown): void;
  /** How often the queue is looked at when nobody wakes the runner. */
  pollMs?: number;
}

/** Why a job's signal fired: told apart, because a job of a server that stops goes on after the restart. */
export const shuttingDown = 'the server is stopping';
export const noLongerHeld = 'the job is no longer held';

/** Works on the queue, one job at a time: a job itself spreads over the lanes. */
export function createJobRunner(options: JobRunnerOptions) {
  const { queue, handlers, onError, pollMs = 1000 } = options;
  let isStopping = false;
  let current: { job: Job; abort: AbortController } | undefined;
  let wakeUp = () => {};
  let ended: Promise<void> = Promise.resolve();

  async function work(job: Job): Promise<void> {
    const abort = new AbortController();
    current = { job, abort };
    const heartbeat = setInterval(() => {
      try {
        queue.hold(job.id);
      } catch (error) {
        if (error instanceof LeaseLost) abort.abort(noLongerHeld);
        // Anything else (a locked file) is tried again at the next beat; the lease decides in the end.
      }
    }, leaseMs / 5);
    try {
      await handlers[job.kind](job, abort.signal);
      if (abort.signal.reason === shuttingDown) queue.release(job.id);
      else queue.finish(job.id);
    } catch (error) {
      if (error instanceof LeaseLost) return;
      queue.fail(job.id, error instanceof Error ? error.message : String(error));
      onError(job, error);
    } finally {
      clearInterval(heartbeat);
      current = undefined;
    }
  }

  async function loop(): Promise<void> {
    while (!isStopping) {
      queue.requeueOrphans();
      const job = queue.claim();
      if (job) await work(job);
      else
        await new Promise<void>((resolve) => {
          const timer = setTimeout(resolve, pollMs);
          wakeUp = () => {
            clearTimeout(timer);
            resolve();
          };
        });
    }
  }

  return {
    start(): void {
      isStopping = false;
      ended = loop().catch((error: unknown) => {
        // The database itself is gone or locked for good: nothing can be run without it.
        process.emitWarning(error instanceof Error ? error : String(error), { code: 'JOB_RUNNER_ENDED' });
      });
    },
    wake: () => wakeUp(),
    /** Ends the current job if it is about this subject and has been cancelled. */
    abortSubject(kind: JobKind, subject: number): void {
      if (current?.job.kind === kind && current.job.subject === subject) current.abort.abort(noLongerHeld);
    },
    async stop(): Promise<void> {
      isStopping = true;
      current?.abort.abort(shuttingDown);
      wakeUp();
      await ended;
    },
  };
}

export type JobRunner = ReturnType<typeof createJobRunner>;
