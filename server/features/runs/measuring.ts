import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { Environment } from '../../../shared/schemas/measurement.ts';
import type { Path } from '../../../shared/schemas/path.ts';
import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../../shared/schemas/solver.ts';

/** What a run needs of the runner, so that tests can put something else in its place. */
export interface MeasureOptions {
  folder: string;
  adapter: string;
  environment: Record<string, string>;
  solvers: SolverDeclaration[];
  cases: SuiteCase[];
  limits: { evaluations: number; seconds: number; runSeconds?: number };
  lanes: number;
  fresh: boolean;
  confinement: Environment['confinement'];
  signal: AbortSignal;
}

export interface MeasureCallbacks {
  /** Whether the solve with this key (`solveKey`) is stored already and need not be done. */
  isDone(key: string): boolean;
  /** `path` is null where nothing ran. */
  onSolve(record: SolveRecord, path: Path | null): void;
}

export interface MeasureResult {
  /** Why it ended before every solve was tried, in a sentence; null where it did not. */
  stopped: string | null;
  adapterText: string;
  log: string;
  elapsedMs: number;
}

export interface Measuring {
  measure(options: MeasureOptions & MeasureCallbacks): Promise<MeasureResult>;
  /** Repeats solves in fresh processes; true by key where one came out the same to the last bit. */
  confirm(options: MeasureOptions, records: SolveRecord[]): Promise<Map<string, boolean>>;
  /** How many solves these make. */
  countSolves(solvers: SolverDeclaration[], cases: SuiteCase[]): number;
  encodePath(path: Path): Buffer;
  decodePath(data: Buffer): Path;
}
