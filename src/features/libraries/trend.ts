import { isOrderKnown } from '../../../shared/comparison/change.ts';
import { isSuccess } from '../../../shared/numerics/judge-claim.ts';
import { median } from '../../../shared/numerics/order-window.ts';
import { type SolveRecord, solveKey } from '../../../shared/schemas/solve.ts';

/** What one build did on the suite: the solves of its newest finished run. */
export interface TrendRun {
  label: string;
  solves: readonly SolveRecord[];
}

/** One solver over the builds, oldest first; null where a build does not have it or nothing could be told. */
export interface TrendSeries {
  solver: string;
  evaluations: (number | null)[];
  /** Over how many solves the evaluations are summed: those that every build with the solver has solved. */
  over: number;
  solved: (number | null)[];
  /** How many apply in the newest build. */
  of: number;
  order: (number | null)[];
}

/** Series of each solver of the newest build. Cost is summed over what every build shown has solved. */
export function trendSeries(runs: readonly TrendRun[]): TrendSeries[] {
  const newest = runs.at(-1);
  if (newest === undefined) return [];
  const names = [...new Set(newest.solves.map((solve) => solve.solver))];
  return names.map((solver) => {
    const columns = runs.map((run) => {
      const own = run.solves.filter((solve) => solve.solver === solver && solve.outcome !== 'not applicable');
      return own.length === 0 ? null : own;
    });
    const there = columns.filter((column) => column !== null);
    const [first, ...others] = there.map(
      (column) => new Set(column.filter((solve) => solve.outcome === 'solved').map(solveKey)),
    );
    const common = new Set([...(first ?? [])].filter((key) => others.every((keys) => keys.has(key))));
    const costOf = (column: readonly SolveRecord[]): number =>
      column.reduce((sum, solve) => (common.has(solveKey(solve)) ? sum + solve.evaluations : sum), 0);
    return {
      solver,
      evaluations: columns.map((column) => (column === null || common.size === 0 ? null : costOf(column))),
      over: common.size,
      solved: columns.map((column) => (column === null ? null : column.filter(isSuccess).length)),
      of: columns.at(-1)?.length ?? 0,
      order: columns.map((column) => {
        const orders = (column ?? []).flatMap(({ order }) => (isOrderKnown(order) ? [order.value] : []));
        return orders.length === 0 ? null : median(orders);
      }),
    };
  });
}
