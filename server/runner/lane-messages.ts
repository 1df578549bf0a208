import type { MessagePort } from 'node:worker_threads';
import type { Equation } from '../../shared/equations/tree.ts';
import type { SuiteCase } from '../../shared/schemas/case.ts';
import type { SolveRecord } from '../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';
import type { PathColumns } from './path-recorder.ts';
import type { PlannedSolve } from './plan-solves.ts';

/** Every limit of a lane; milliseconds of wall time unless said otherwise. */
export interface LaneLimits {
  /** Evaluations a solve. */
  evaluations: number;
  /** From `go` to the end line. */
  solveMs: number;
  /** From start to `ready`. */
  readyMs: number;
  /** From `stop` to the end line. */
  graceMs: number;
  /** From `close` to exit. */
  closeMs: number;
  /** From SIGTERM to SIGKILL. */
  killAfterMs: number;
  /** In the first solve after a start, how long `go` is held back to see whether the adapter asks too early. */
  headPauseMs: number;
  /** Lines of a path that are kept. */
  pathLines: number;
}

/** What the main thread gives a worker: all of the work, of which the worker takes piece by piece. */
export interface LaneJob {
  state: SharedArrayBuffer;
  epoch: bigint;
  queue: SharedArrayBuffer;
  solvers: readonly SolverDeclaration[];
  cases: readonly SuiteCase[];
  /** Of the cases, one by one: reading them takes a parser that is slow to load in every thread. */
  equations: readonly Equation[];
  /** The solves to do; each with its number on the wire. */
  work: readonly { id: number; planned: PlannedSolve }[];
  limits: LaneLimits;
  isFresh: boolean;
  wantsStarts: boolean;
  /** Wrong solves of one solver in a row after which this lane alone may leave its others; or Infinity. */
  streakLimit: number;
  replies: MessagePort;
}

/** One solve done: `at` is its place in the work. */
export interface DoneSolve {
  at: number;
  record: SolveRecord;
  path: PathColumns;
}

/** How the worker wants the adapter ended: it was asked to close, it ended its output, or it must go. */
export type EndHow = 'close' | 'end of file' | 'kill';

export type FromWorker =
  | { kind: 'start' }
  | { kind: 'end'; how: EndHow }
  | { kind: 'ready'; text: string }
  | { kind: 'starting'; at: number }
  | { kind: 'solves'; solves: DoneSolve[] }
  | { kind: 'stop'; reason: string }
  | { kind: 'finished' };

export interface StartReply {
  kind: 'started';
  write: number;
  read: number;
  peek: number;
  inPath: string;
  wakeToken: Uint8Array;
}

export interface EndReply {
  kind: 'ended';
  /** How the process ended, in words, with the tail of its log. */
  text: string;
}

export type ToWorker = StartReply | EndReply | { kind: 'failed'; text: string };
