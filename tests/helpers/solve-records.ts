import type { ComparableCase, ComparableRun } from '../../shared/comparison/comparison.ts';
import { emptyEstimate } from '../../shared/numerics/estimate-order.ts';
import { type AllowanceSet, type Allowances, defaultAllowances } from '../../shared/schemas/allowances.ts';
import type { OrderEstimate, QueryCounts, SolveRecord } from '../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';

const nothingFound: QueryCounts = { repeated: 0, outside: 0, late: 0, unused: 0, nonFinite: 0 };

/** A solved solve of ten evaluations; the path's hash follows from the evaluations unless it is given. */
export function solve(
  solver: string,
  caseId: string,
  change: Partial<Omit<SolveRecord, 'queryCheck'>> & { queryCheck?: Partial<QueryCounts> } = {},
): SolveRecord {
  const evaluations = change.evaluations ?? 10;
  const isSolved = (change.outcome ?? 'solved') === 'solved';
  return {
    solver,
    case: caseId,
    start: null,
    outcome: 'solved',
    remarks: [],
    iterations: null,
    iterationsFrom: null,
    evaluations,
    f: evaluations,
    df: 0,
    d2f: 0,
    root: isSolved ? 1 : null,
    nearest: isSolved ? 0 : null,
    error: isSolved ? 1e-17 : null,
    digits: isSolved ? 16 : null,
    exact: isSolved,
    ulps: isSolved ? 0.1 : null,
    residual: isSolved ? 0 : null,
    order: emptyEstimate('not enough steps'),
    pathHash: `path of ${evaluations}`,
    steady: null,
    elapsedMs: 1,
    ...change,
    queryCheck: { ...nothingFound, ...change.queryCheck },
  };
}

/** An order with its interval. */
export function order(value: number, half = 0.02): OrderEstimate {
  return { ...emptyEstimate('estimated', 5), kind: 'Q', value, low: value - half, high: value + half };
}

export function solverOf(name: string, change: Partial<SolverDeclaration> = {}): SolverDeclaration {
  return {
    name,
    takes: 'bracket',
    starts: 0,
    uses: ['f'],
    order: null,
    onePoint: false,
    widens: false,
    tolerance: { xabs: 0, xrel: 1e-15, fabs: 0 },
    settings: {},
    aliases: [],
    digits: false,
    ...change,
  };
}

/** A run of these solves; solvers and cases follow from them unless they are given. */
export function runOf(solves: SolveRecord[], change: Partial<ComparableRun> = {}): ComparableRun {
  const solvers = [...new Set(solves.map((one) => one.solver))].map((name) => solverOf(name));
  const cases = [...new Set(solves.map((one) => one.case))].map((id) => caseOf(id));
  return { solves, solvers, cases, fingerprint: 'node 20', label: 'a run', ...change };
}

export function caseOf(id: string, change: Partial<ComparableCase> = {}): ComparableCase {
  return {
    id,
    hash: `hash of ${id}`,
    traits: [],
    roots: [{ attainable: 1e-15 }, { attainable: 1e-15 }],
    ...change,
  };
}

export function allow(
  base: Partial<Allowances> = {},
  exceptions: Partial<Omit<AllowanceSet, 'base'>> = {},
): AllowanceSet {
  return { base: { ...defaultAllowances, ...base }, solvers: {}, traits: {}, ...exceptions };
}
