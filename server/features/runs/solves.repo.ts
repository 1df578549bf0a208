import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import { type SolveKeyRow, type SolveValues, solveColumns, solveToValues } from './solve-row.ts';

/** A solve ready to be stored: its solver by position in the run, its case by row. */
export interface NewSolve {
  solver: number;
  caseId: number;
  /** −1 where the solver takes no start. */
  start: number;
  record: SolveRecord;
  path: Buffer | null;
}

export interface SolveCounts {
  stored: number;
  solved: number;
  evaluations: number;
}

export interface SteadyMark {
  id: number;
  isSteady: boolean;
}

export type SolveRow = [...SolveKeyRow, ...SolveValues];

export type SolveCostRow = [
  solver: number,
  caseId: number,
  outcome: number,
  evaluations: number,
  isRightlyRefused: number,
];

const columns = ['id', 'solver', 'case_id', 'start', ...solveColumns];
/** The select list of a `SolveRow`, with the table's name before each. */
export const solveSelect = columns.map((column) => `solves.${column}`).join(', ');

/** The only statements that write solves and paths, and those that read them by the thousand. */
export function createSolvesRepo(client: DatabaseClient) {
  const { sqlite } = client;
  const written = ['run_id', 'solver', 'case_id', 'start', ...solveColumns];
  const insertSolve = sqlite.prepare<unknown[]>(
    `INSERT INTO solves (${written.join(', ')}) VALUES (${written.map(() => '?').join(', ')})
     ON CONFLICT (run_id, solver, case_id, start) DO NOTHING`,
  );
  const insertPath = sqlite.prepare<[number | bigint, Buffer]>(
    'INSERT INTO paths (solve_id, data) VALUES (?, ?)',
  );
  const setSteady = sqlite.prepare<[number, number, number]>(
    'UPDATE solves SET steady = ? WHERE id = ? AND run_id = ? AND steady IS NULL',
  );
  const countSolves = sqlite.prepare<[number, number, number, number]>(
    `UPDATE runs SET stored = stored + ?, solved = solved + ?, evaluations = evaluations + ? WHERE id = ?`,
  );
  const countMarks = sqlite.prepare<[number, number, number]>(
    'UPDATE runs SET confirmed = confirmed + ?, unsteady = unsteady + ? WHERE id = ?',
  );
  const all = sqlite
    .prepare<[number], SolveRow>(
      `SELECT ${solveSelect} FROM solves WHERE run_id = ? ORDER BY solver, case_id, start`,
    )
    .raw();
  const one = sqlite.prepare<[number], SolveRow>(`SELECT ${solveSelect} FROM solves WHERE id = ?`).raw();
  const runOf = sqlite.prepare<[number], number>('SELECT run_id FROM solves WHERE id = ?').pluck();
  const keys = sqlite
    .prepare<[number], [solver: number, caseId: number, start: number]>(
      'SELECT solver, case_id, start FROM solves WHERE run_id = ?',
    )
    .raw();
  const costs = sqlite
    .prepare<[number], SolveCostRow>(
      `SELECT solver, case_id, outcome, evaluations, ifnull(remarks, '') LIKE '%"rightly refused"%'
       FROM solves WHERE run_id = ?`,
    )
    .raw();
  const pathOf = sqlite.prepare<[number], Buffer>('SELECT data FROM paths WHERE solve_id = ?').pluck();

  return {
    /**
     * Stores solves with their paths in one transaction, and counts them in the run. One that is there
     * already stays as it is and is not counted, so that repeating a batch does no harm. `before` runs
     * first in the transaction and may throw to call it off.
     */
    insertMany(runId: number, batch: readonly NewSolve[], before: () => void = () => {}): SolveCounts {
      return inTransaction(client, () => {
        before();
        const counts: SolveCounts = { stored: 0, solved: 0, evaluations: 0 };
        for (const { solver, caseId, start, record, path } of batch) {
          const info = insertSolve.run(runId, solver, caseId, start, ...solveToValues(record));
          if (info.changes === 0) continue;
          if (path) insertPath.run(info.lastInsertRowid, path);
          counts.stored += 1;
          counts.evaluations += record.evaluations;
          if (record.outcome === 'solved') counts.solved += 1;
        }
        countSolves.run(counts.stored, counts.solved, counts.evaluations, runId);
        return counts;
      });
    },
    /** Marks solves as steady or not, once each, and counts them in the run. */
    markSteady(runId: number, marks: readonly SteadyMark[], before: () => void = () => {}): void {
      inTransaction(client, () => {
        before();
        let marked = 0;
        let unsteady = 0;
        for (const { id, isSteady } of marks) {
          if (setSteady.run(isSteady ? 1 : 0, id, runId).changes === 0) continue;
          marked += 1;
          if (!isSteady) unsteady += 1;
        }
        countMarks.run(marked, unsteady, runId);
      });
    },
    /** Every solve of a run, by solver, case and start. */
    readRun: (runId: number): SolveRow[] => all.all(runId),
    readOne: (id: number): SolveRow | undefined => one.get(id),
    readRunOf: (id: number): number | undefined => runOf.get(id),
    readKeys: (runId: number) => keys.all(runId),
    /** What a profile needs of every solve of a run, a fraction of the whole. */
    readCosts: (runId: number): SolveCostRow[] => costs.all(runId),
    readPath: (id: number): Buffer | undefined => pathOf.get(id),
  };
}

export type SolvesRepo = ReturnType<typeof createSolvesRepo>;
