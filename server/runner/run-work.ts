import { AppError } from '../../shared/errors.ts';
import type { SuiteCase } from '../../shared/schemas/case.ts';
import type { Environment } from '../../shared/schemas/measurement.ts';
import type { Path } from '../../shared/schemas/path.ts';
import type { SolveRecord } from '../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';
import { equationOf } from './kept-equations.ts';
import { Lane } from './lane.ts';
import type { DoneSolve, LaneJob, LaneLimits } from './lane-messages.ts';
import { WorkQueue } from './lane-state.ts';
import { LogTail } from './log-tail.ts';
import { columnsToPath } from './path-recorder.ts';
import { recordWithoutRun } from './record-solve.ts';
import { type Released, SolveOrder, STREAK_LIMIT } from './solve-order.ts';

const LOG_LIMIT_BYTES = 64 * 1024;

/** The wire's own limits; a suite and a site may set others. */
export const usualLimits = {
  readyMs: 20_000,
  graceMs: 2000,
  closeMs: 5000,
  killAfterMs: 1000,
  headPauseMs: 10,
  pathLines: 20_000,
} as const;

export interface MeasureLimits extends Partial<Omit<LaneLimits, 'evaluations' | 'solveMs'>> {
  /** Evaluations a solve. */
  evaluations: number;
  /** Wall time of one solve. */
  seconds: number;
  /** Wall time of the whole run. */
  runSeconds?: number | undefined;
}

export interface RunOptions {
  /** The build's folder: the adapter's working directory. */
  folder: string;
  /** The manifest's line that starts the adapter. */
  adapter: string;
  environment: Readonly<Record<string, string>>;
  solvers: readonly SolverDeclaration[];
  cases: readonly SuiteCase[];
  limits: MeasureLimits;
  /** Adapters that run side by side. */
  lanes: number;
  /** A fresh adapter for every solve. */
  fresh: boolean;
  confinement: Environment['confinement'];
  /** Text that the adapters write to standard error, as it comes. */
  onLog?: ((text: string) => void) | undefined;
  signal?: AbortSignal | undefined;
}

export interface RunHooks {
  onSolve: (record: SolveRecord, path: Path | null) => void;
  onStart?: ((solver: SolverDeclaration, suiteCase: SuiteCase) => void) | undefined;
  /** Whether ten wrong solves in a row make the others of a solver not tried. */
  hasStreaks: boolean;
}

export interface RunResult {
  /** Why the run ended early, in a sentence; null where every solve was tried. */
  stopped: string | null;
  /** What the adapter said of itself when it was ready. */
  adapterText: string;
  /** The end of what the adapters wrote to standard error, lane by lane. */
  log: string;
  elapsedMs: number;
}

type Work = LaneJob['work'];

/** Does the given work on several lanes. Each place of it is given to `onSolve` once, unless the run stops. */
export async function runWork(options: RunOptions, work: Work, hooks: RunHooks): Promise<RunResult> {
  if (options.confinement !== 'unconfined') {
    throw new AppError('unavailable', 'Adapters cannot be sandboxed here yet; run them unconfined.');
  }
  const startedAt = performance.now();
  const run = new Run(options, work, hooks);
  if (work.length > 0) await run.run();
  return { ...run.result(), elapsedMs: performance.now() - startedAt };
}

class Run {
  readonly #options: RunOptions;
  readonly #work: Work;
  readonly #hooks: RunHooks;
  readonly #limits: LaneLimits;
  readonly #queue: WorkQueue;
  readonly #order: SolveOrder;
  readonly #log = new LogTail(LOG_LIMIT_BYTES);
  #lanes: Lane[] = [];
  #stopped: string | null = null;
  #adapterText = '';

  constructor(options: RunOptions, work: Work, hooks: RunHooks) {
    this.#options = options;
    this.#work = work;
    this.#hooks = hooks;
    const { evaluations, seconds, runSeconds: _, ...others } = options.limits;
    this.#limits = { ...usualLimits, ...others, evaluations, solveMs: seconds * 1000 };
    this.#queue = new WorkQueue(options.solvers.length);
    const solverOf = work.map(({ planned }) => planned.solver);
    this.#order = new SolveOrder(solverOf, options.solvers.length);
  }

  result(): Omit<RunResult, 'elapsedMs'> {
    return { stopped: this.#stopped, adapterText: this.#adapterText, log: this.#log.text() };
  }

  async run(): Promise<void> {
    const { signal, limits } = this.#options;
    const abort = (): void => this.#stop('The run was cancelled.');
    if (signal?.aborted) return abort();
    signal?.addEventListener('abort', abort, { once: true });
    const { runSeconds } = limits;
    const timer =
      runSeconds === undefined
        ? undefined
        : setTimeout(() => this.#stop(`The run's time of ${runSeconds} s is over.`), runSeconds * 1000);
    const count = Math.max(1, Math.min(this.#options.lanes, this.#work.length));
    this.#lanes = Array.from({ length: count }, () => this.#makeLane());
    try {
      await this.#runLanes();
    } finally {
      clearTimeout(timer);
      signal?.removeEventListener('abort', abort);
    }
    this.#release(this.#order.rest());
  }

  async #runLanes(): Promise<void> {
    const { solvers, cases, fresh } = this.#options;
    const job = {
      queue: this.#queue.shared,
      solvers,
      cases,
      equations: cases.map(equationOf),
      work: this.#work,
      limits: this.#limits,
      isFresh: fresh,
      wantsStarts: this.#hooks.onStart !== undefined,
      // Several lanes see only their own part of a row, so there the main thread alone decides.
      streakLimit:
        this.#hooks.hasStreaks && this.#lanes.length === 1 ? STREAK_LIMIT : Number.POSITIVE_INFINITY,
    };
    // One lane that fails takes the others with it, but not before all have let go of their adapters.
    const runs = this.#lanes.map((lane) =>
      lane.run(job).catch((error: unknown) => {
        this.#stop('A lane failed.');
        throw error;
      }),
    );
    const failed = (await Promise.allSettled(runs)).find((result) => result.status === 'rejected');
    if (failed) throw failed.reason;
  }

  #makeLane(): Lane {
    const { adapter: command, folder, environment } = this.#options;
    const onLog = (text: string): void => {
      this.#log.push(Buffer.from(text));
      this.#options.onLog?.(text);
    };
    return new Lane({ command, folder, environment, onLog }, this.#limits, {
      onReady: (text) => {
        this.#adapterText = text;
      },
      onStarting: (at) => this.#tellStart(at),
      onSolves: (solves) => this.#take(solves),
      onStop: (reason) => this.#stop(reason),
    });
  }

  #stop(reason: string): void {
    if (this.#stopped !== null) return;
    this.#stopped = reason;
    for (const lane of this.#lanes) lane.stop();
  }

  #tellStart(at: number): void {
    const planned = this.#work[at]?.planned;
    const solver = planned && this.#options.solvers[planned.solver];
    const suiteCase = planned && this.#options.cases[planned.case];
    if (solver && suiteCase) this.#hooks.onStart?.(solver, suiteCase);
  }

  #take(solves: readonly DoneSolve[]): void {
    for (const done of solves) {
      const released = this.#hooks.hasStreaks
        ? this.#order.add(done, (solver) => this.#queue.giveUp(solver))
        : [{ at: done.at, done }];
      this.#release(released);
    }
  }

  #release(released: readonly Released[]): void {
    for (const one of released) {
      if (one.done) {
        this.#hooks.onSolve(one.done.record, columnsToPath(one.done.path));
        continue;
      }
      const planned = this.#work[one.at]?.planned;
      const solver = planned && this.#options.solvers[planned.solver];
      const suiteCase = planned && this.#options.cases[planned.case];
      if (!planned || !solver || !suiteCase) continue;
      const text = `Not tried: ten solves in a row of this solver had gone wrong, the last one ${one.outcome}.`;
      const record = recordWithoutRun(planned, solver, suiteCase, one.outcome, [{ code: 'not tried', text }]);
      this.#hooks.onSolve(record, null);
    }
  }
}
