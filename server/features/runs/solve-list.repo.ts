import type { SolvesQuery } from '../../../shared/schemas/runs.ts';
import type { DatabaseClient } from '../../db/client.ts';
import { outcomeCode } from '../../db/codes.ts';
import { type SolveRow, solveSelect } from './solves.repo.ts';

/** What to list: names already turned into keys. `caseIds` undefined means every case. */
export interface SolveFilter {
  runId: number;
  solver?: number | undefined;
  outcomes?: SolvesQuery['outcome'];
  caseIds?: number[] | undefined;
  sort: SolvesQuery['sort'];
  direction: SolvesQuery['direction'];
  limit: number;
  /** Sort key and id of the last row of the page before. */
  after?: SolveCursor | undefined;
}

export type SolveCursor = number[];

/**
 * Each sort as expressions that are never null (a missing value comes below all others), the last of them
 * unique within the run, and the same values taken from a row, for the cursor. The first sort is the
 * unique index itself; the others sort the run's own rows.
 */
const sortKeys: Record<SolvesQuery['sort'], { keys: string[]; of: (row: SolveRow) => SolveCursor }> = {
  solver: { keys: ['solver', 'case_id', 'start'], of: (row) => [row[1], row[2], row[3]] },
  case: { keys: ['case_id', 'solver', 'start'], of: (row) => [row[2], row[1], row[3]] },
  evaluations: { keys: ['evaluations', 'id'], of: (row) => [row[7], row[0]] },
  iterations: { keys: ['ifnull(iterations, -1)', 'id'], of: (row) => [row[5] ?? -1, row[0]] },
  digits: { keys: ['ifnull(digits, -1)', 'id'], of: (row) => [row[14] ?? -1, row[0]] },
  order: { keys: ['ifnull(order_value, -1)', 'id'], of: (row) => [row[20] ?? -1, row[0]] },
  elapsed: { keys: ['elapsed_ms', 'id'], of: (row) => [row[36], row[0]] },
};

export const cursorLength = (sort: SolvesQuery['sort']): number => sortKeys[sort].keys.length;

/** The statement of one page; `parameters` in its order. */
export function solveListSql(filter: SolveFilter): { sql: string; parameters: (number | string)[] } {
  const { keys } = sortKeys[filter.sort];
  const where = ['run_id = ?'];
  const parameters: (number | string)[] = [filter.runId];
  if (filter.solver !== undefined) {
    where.push('solver = ?');
    parameters.push(filter.solver);
  }
  if (filter.outcomes) {
    where.push(`outcome IN (${filter.outcomes.map(() => '?').join(', ')})`);
    parameters.push(...filter.outcomes.map((outcome) => outcomeCode[outcome]));
  }
  if (filter.caseIds) {
    where.push('case_id IN (SELECT value FROM json_each(?))');
    parameters.push(JSON.stringify(filter.caseIds));
  }
  const isUp = filter.direction === 'up';
  if (filter.after) {
    where.push(`(${keys.join(', ')}) ${isUp ? '>' : '<'} (${keys.map(() => '?').join(', ')})`);
    parameters.push(...filter.after);
  }
  const order = keys.map((key) => (isUp ? key : `${key} DESC`)).join(', ');
  parameters.push(filter.limit);
  const sql = `SELECT ${solveSelect} FROM solves
    WHERE ${where.join(' AND ')} ORDER BY ${order} LIMIT ?`;
  return { sql, parameters };
}

export function createSolveListRepo(client: DatabaseClient) {
  return {
    /** Rows with the cursor that stands for each. */
    list(filter: SolveFilter): { cursor: SolveCursor; row: SolveRow }[] {
      const { sql, parameters } = solveListSql(filter);
      const rows = client.sqlite
        .prepare<unknown[], SolveRow>(sql)
        .raw()
        .all(...parameters);
      return rows.map((row) => ({ cursor: sortKeys[filter.sort].of(row), row }));
    },
  };
}

export type SolveListRepo = ReturnType<typeof createSolveListRepo>;
