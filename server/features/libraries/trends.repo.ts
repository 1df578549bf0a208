import type { DatabaseClient } from '../../db/client.ts';
import { orderStatusCode, outcomeCode } from '../../db/codes.ts';

export interface TrendRunRow {
  run: number;
  build: number;
  label: string;
  commit: string | null;
}

/** One solver in one run. `evaluations` is summed over what every run that has the solver has solved. */
export interface TrendRow {
  run: number;
  solver: string;
  applies: number;
  solved: number;
  common: number;
  evaluations: number;
  order: number | null;
}

/** The newest finished run of each build on a suite, the newest builds first. */
export const trendRunsSql = `
  SELECT max(r.id) AS run, r.build_id AS build, b.label, b."commit"
  FROM runs AS r JOIN builds AS b ON b.id = r.build_id
  WHERE r.library_id = ? AND r.suite_id = ? AND r.status = 'finished'
  GROUP BY r.build_id ORDER BY r.build_id DESC LIMIT ?`;

/**
 * Solves of the runs (a JSON list) by solver. Solves belong together by the name of the solver, by the name and
 * hash of the case, so that one that has changed is another, and by start.
 */
export const trendSql = `
  WITH shown AS MATERIALIZED (
    SELECT r.id, r.revision_id FROM json_each(?) AS j JOIN runs AS r ON r.id = j.value
  ),
  case_keys AS MATERIALIZED (
    SELECT id, min(id) OVER (PARTITION BY name, hash) AS key FROM cases
    WHERE revision_id IN (SELECT revision_id FROM shown)
  ),
  solver_keys AS MATERIALIZED (
    SELECT run_id, position, name, min(rowid) OVER (PARTITION BY name) AS key
    FROM run_solvers WHERE run_id IN (SELECT id FROM shown)
  ),
  found AS MATERIALIZED (
    SELECT s.run_id, k.name, k.key AS solver, c.key AS case_key, s.start, s.outcome, s.evaluations,
      s.outcome = ${outcomeCode.solved} OR (s.outcome = ${outcomeCode.refused}
        AND ifnull(s.remarks, '') LIKE '%"rightly refused"%') AS success,
      CASE WHEN s.order_low IS NOT NULL AND s.order_high IS NOT NULL
        AND s.order_status NOT IN (${orderStatusCode['one ratio']}, ${orderStatusCode.undecided})
        THEN s.order_value END AS order_value
    FROM solver_keys AS k
    CROSS JOIN solves AS s ON s.run_id = k.run_id AND s.solver = k.position
    JOIN case_keys AS c ON c.id = s.case_id
    WHERE s.outcome <> ${outcomeCode['not applicable']}
  ),
  presence AS MATERIALIZED (
    SELECT solver, count(DISTINCT run_id) AS runs FROM found GROUP BY solver
  ),
  common AS MATERIALIZED (
    SELECT solver, case_key, start FROM found WHERE outcome = ${outcomeCode.solved}
    GROUP BY solver, case_key, start
    HAVING count(*) = (SELECT runs FROM presence AS p WHERE p.solver = found.solver)
  ),
  ranked AS (
    SELECT run_id, solver, order_value,
      row_number() OVER (PARTITION BY run_id, solver ORDER BY order_value) AS place,
      count(*) OVER (PARTITION BY run_id, solver) AS length
    FROM found WHERE order_value IS NOT NULL
  ),
  medians AS MATERIALIZED (
    SELECT run_id, solver, avg(order_value) AS value FROM ranked
    WHERE place IN ((length + 1) / 2, (length + 2) / 2) GROUP BY run_id, solver
  )
  SELECT f.run_id AS run, f.name AS solver, count(*) AS applies, sum(f.success) AS solved,
    count(c.solver) AS common, sum(CASE WHEN c.solver IS NULL THEN 0 ELSE f.evaluations END) AS evaluations,
    (SELECT value FROM medians AS m WHERE m.run_id = f.run_id AND m.solver = f.solver) AS "order"
  FROM found AS f
  LEFT JOIN common AS c ON c.solver = f.solver AND c.case_key = f.case_key AND c.start = f.start
  GROUP BY f.run_id, f.solver`;

export function createTrendsRepo(client: DatabaseClient) {
  const runs = client.sqlite.prepare<[number, number, number], TrendRunRow>(trendRunsSql);
  const trend = client.sqlite.prepare<[string], TrendRow>(trendSql);
  return {
    newestRuns: (libraryId: number, suiteId: number, limit: number) => runs.all(libraryId, suiteId, limit),
    read: (runIds: readonly number[]): TrendRow[] => trend.all(JSON.stringify(runIds)),
  };
}
