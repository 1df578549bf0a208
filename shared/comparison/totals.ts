import { isSuccess } from '../numerics/judge-claim.ts';
import { median } from '../numerics/order-window.ts';
import type { SolveRecord } from '../schemas/solve.ts';
import type { SolverDeclaration } from '../schemas/solver.ts';
import type { Change, QueryFinding } from '../schemas/words.ts';
import { isOrderKnown } from './change.ts';
import type {
  Comparison,
  CostPair,
  FindingCount,
  OrderSummary,
  Pair,
  SolvedCount,
  SolverTotals,
} from './comparison.ts';

/**
 * Totals of each solver over its compared pairs, in the order of the pairs.
 *
 * Cost is summed over the pairs that both solved alone: a solver that became cheap by giving up is not cheaper.
 * Solved counts and the query check run over all solves of a side that apply, new and gone ones included.
 */
export function totalsOf(
  pairs: readonly Pair[],
  declarations: ReadonlyMap<string, SolverDeclaration>,
): SolverTotals[] {
  const bySolver = new Map<string, Pair[]>();
  for (const pair of pairs) append(bySolver, pair.solver, pair);
  return [...bySolver].map(([solver, own]) => {
    const [was, is] = [solvesOf(own, 'reference'), solvesOf(own, 'candidate')];
    const both = own.filter(isCostCompared);
    const cases = [...groups(both, (pair) => pair.case).values()].map((group) => ({
      family: group[0]?.family ?? '',
      ...meanCost(group.map(costOf)),
    }));
    const families = [...groups(cases, (one) => one.family).values()].map(meanCost);
    return {
      solver,
      formerly: own.find((pair) => pair.formerly !== null)?.formerly ?? null,
      presence: was.length === 0 ? 'new' : is.length === 0 ? 'gone' : 'both',
      claim: declarations.get(solver)?.order ?? null,
      uses: declarations.get(solver)?.uses ?? ['f'],
      reference: solvedCount(was),
      candidate: solvedCount(is),
      pairs: both.length,
      evaluations: sumCost(both.map(costOf)),
      perCase: meanCost(cases),
      perFamily: meanCost(families),
      findings: findingsOf(was, is),
      order: { reference: orderSummary(was), candidate: orderSummary(is) },
      changes: countChanges(own),
    };
  });
}

/** All solvers together. */
export function overallOf(pairs: readonly Pair[]): Comparison['overall'] {
  const both = pairs.filter(isCostCompared);
  return {
    reference: solvedCount(solvesOf(pairs, 'reference')),
    candidate: solvedCount(solvesOf(pairs, 'candidate')),
    pairs: both.length,
    evaluations: sumCost(both.map(costOf)),
  };
}

export function countChanges(pairs: readonly Pair[]): Partial<Record<Change, number>> {
  const counts: Partial<Record<Change, number>> = {};
  for (const { change } of pairs) counts[change] = (counts[change] ?? 0) + 1;
  return counts;
}

/** 100 (candidate − reference) / reference; null where the reference is 0 and the candidate is not. */
export function percentMore(reference: number, candidate: number): number | null {
  if (candidate === reference) return 0;
  return reference === 0 ? null : (100 * (candidate - reference)) / reference;
}

/** Whether both sides of a pair solved, so that their cost can be compared. */
export function isCostCompared(pair: Pair): boolean {
  return pair.difference !== null;
}

function costOf(pair: Pair): CostPair {
  const [reference, candidate] = [pair.reference?.evaluations ?? 0, pair.candidate?.evaluations ?? 0];
  return { reference, candidate, percent: percentMore(reference, candidate) };
}

function sumCost(costs: readonly CostPair[]): CostPair {
  let [reference, candidate] = [0, 0];
  for (const cost of costs) {
    reference += cost.reference;
    candidate += cost.candidate;
  }
  return { reference, candidate, percent: costs.length === 0 ? null : percentMore(reference, candidate) };
}

function meanCost(costs: readonly CostPair[]): CostPair {
  const total = sumCost(costs);
  const count = Math.max(1, costs.length);
  let percents: number | null = costs.length === 0 ? null : 0;
  for (const cost of costs) {
    percents = percents === null || cost.percent === null ? null : percents + cost.percent;
  }
  const percent = percents === null ? null : percents / count;
  return { reference: total.reference / count, candidate: total.candidate / count, percent };
}

function solvedCount(solves: readonly SolveRecord[]): SolvedCount {
  return { solved: solves.filter(isSuccess).length, of: solves.length };
}

function findingsOf(was: readonly SolveRecord[], is: readonly SolveRecord[]): SolverTotals['findings'] {
  const count = (solves: readonly SolveRecord[], finding: QueryFinding): FindingCount => {
    let [withSome, evaluations] = [0, 0];
    for (const { queryCheck } of solves) {
      evaluations += queryCheck[finding];
      if (queryCheck[finding] > 0) withSome += 1;
    }
    return { solves: withSome, of: solves.length, evaluations };
  };
  const both = (finding: QueryFinding) => ({ reference: count(was, finding), candidate: count(is, finding) });
  return {
    repeated: both('repeated'),
    outside: both('outside'),
    late: both('late'),
    unused: both('unused'),
    nonFinite: both('nonFinite'),
  };
}

function orderSummary(solves: readonly SolveRecord[]): OrderSummary {
  const values: number[] = [];
  for (const { order } of solves) if (isOrderKnown(order)) values.push(order.value);
  return { median: values.length === 0 ? null : median(values), count: values.length };
}

function solvesOf(pairs: readonly Pair[], side: 'reference' | 'candidate'): SolveRecord[] {
  const solves: SolveRecord[] = [];
  for (const pair of pairs) {
    const solve = pair[side];
    if (solve !== null) solves.push(solve);
  }
  return solves;
}

function groups<T>(items: readonly T[], keyOf: (item: T) => string): Map<string, T[]> {
  const map = new Map<string, T[]>();
  for (const item of items) append(map, keyOf(item), item);
  return map;
}

function append<T>(map: Map<string, T[]>, key: string, item: T): void {
  const list = map.get(key);
  if (list === undefined) map.set(key, [item]);
  else list.push(item);
}
