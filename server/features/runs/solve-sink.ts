import type { Path } from '../../../shared/schemas/path.ts';
import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import type { RunKeys } from './run-solves.ts';
import type { NewSolve } from './solves.repo.ts';

export interface SolveSinkOptions {
  keys: Pick<RunKeys, 'positionOf' | 'caseIdOf'>;
  encodePath(path: Path): Buffer;
  /** Stores a batch in one transaction. */
  store(batch: NewSolve[]): void;
  /** Called once, with what `store` threw when a batch that was due could not be stored. */
  onError(error: unknown): void;
  batchSize?: number;
  batchMs?: number;
}

/**
 * Gathers solves and stores them many to a transaction: as soon as there are enough, and in any case a
 * moment after the first. What is lost when the process dies is measured again.
 */
export function createSolveSink(options: SolveSinkOptions) {
  const { keys, batchSize = 200, batchMs = 100 } = options;
  let batch: NewSolve[] = [];
  let timer: NodeJS.Timeout | undefined;
  let hasFailed = false;

  function flush(): void {
    clearTimeout(timer);
    timer = undefined;
    if (batch.length === 0 || hasFailed) return;
    const due = batch;
    batch = [];
    try {
      options.store(due);
    } catch (error) {
      hasFailed = true;
      options.onError(error);
    }
  }

  return {
    add(record: SolveRecord, path: Path | null): void {
      if (hasFailed) return;
      const solver = keys.positionOf.get(record.solver);
      const caseId = keys.caseIdOf.get(record.case);
      if (solver === undefined || caseId === undefined)
        throw new RangeError(`The run has no solver ${record.solver} or no case ${record.case}`);
      const hasPath = path !== null && (path.events.length > 0 || path.cut > 0);
      const data = hasPath ? options.encodePath(path) : null;
      batch.push({ solver, caseId, start: record.start ?? -1, record, path: data });
      if (batch.length >= batchSize) flush();
      else timer ??= setTimeout(flush, batchMs);
    },
    flush,
  };
}
