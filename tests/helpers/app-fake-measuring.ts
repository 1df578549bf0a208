import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { Measuring } from '../../server/features/runs/measuring.ts';
import { pathFromBytes, pathToBytes } from '../../server/runner/path-bytes.ts';
import { planSolves } from '../../server/runner/plan-solves.ts';
import { type SolveRecord, solveKey } from '../../shared/schemas/solve.ts';
import { buildPath, buildSolve } from './builders.ts';

export interface FakeMeasuring extends Measuring {
  /** Keys in the order in which they were measured and confirmed, over all runs. */
  measured: string[];
  confirmed: string[];
}

export interface FakeMeasuringOptions {
  /** Waits between two solves; 0 yields to other work only. */
  delayMs?: number;
  /** Changes what a solve comes out as; `salt` is the content of the build's file `salt`, if it has one. */
  shape?: (record: SolveRecord, salt: string) => Partial<SolveRecord>;
  stopped?: string | null;
  isSteady?: (record: SolveRecord) => boolean;
}

/** In place of the runner: figures that depend on the solve's key alone, so that every run gives the same. */
export function createFakeMeasuring(options: FakeMeasuringOptions = {}): FakeMeasuring {
  const measured: string[] = [];
  const confirmed: string[] = [];
  const pause = () => new Promise<void>((resolve) => setTimeout(resolve, options.delayMs ?? 0));
  return {
    measured,
    confirmed,
    async measure(given) {
      const salt = readSalt(given.folder);
      for (const plan of planSolves(given.solvers, given.cases)) {
        const solver = given.solvers[plan.solver]?.name ?? '';
        const name = given.cases[plan.case]?.id ?? '';
        const key = solveKey({ solver, case: name, start: plan.start });
        if (given.isDone(key)) continue;
        if (options.delayMs !== undefined) await pause();
        if (given.signal.aborted) break;
        const evaluations = (createHash('sha256').update(key).digest()[0] ?? 0) + 3;
        const record = buildSolve({
          solver,
          case: name,
          start: plan.start,
          evaluations,
          f: evaluations,
          iterations: evaluations - 2,
          pathHash: createHash('sha256').update(key).digest('hex'),
        });
        measured.push(key);
        given.onSolve({ ...record, ...options.shape?.(record, salt) }, buildPath(1 + (evaluations % 20)));
      }
      const stopped = options.stopped ?? null;
      return { stopped, adapterText: 'fake 1.0', log: 'a line of the log\n', elapsedMs: 5 };
    },
    async confirm(given, records) {
      const steady = new Map<string, boolean>();
      for (const record of records) {
        if (options.delayMs !== undefined) await pause();
        if (given.signal.aborted) break;
        confirmed.push(solveKey(record));
        steady.set(solveKey(record), options.isSteady?.(record) ?? true);
      }
      return steady;
    },
    countSolves: (solvers, cases) => planSolves(solvers, cases).length,
    encodePath: pathToBytes,
    decodePath: pathFromBytes,
  };
}

function readSalt(folder: string): string {
  try {
    return readFileSync(path.join(folder, 'salt'), 'utf8');
  } catch {
    return '';
  }
}
