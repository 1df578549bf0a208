import type { AllowanceSet } from '../schemas/allowances.ts';
import { digitsLost } from './change.ts';
import type { AllowanceName, Breach, Pair, Scope, SolverTotals } from './comparison.ts';
import type { MatchedPair } from './pair.ts';

/** A limit and what it holds for. */
export interface EffectiveLimit {
  limit: number | null;
  scope: Scope;
}

const everywhere: Scope = { solver: null, trait: null };

/**
 * The limit that holds for one pair: the solver's exception, else that of one of its case's traits (the most
 * tolerant where several have one, since each was made for what is hard about such cases), else the base.
 */
export function effectiveLimit(
  set: AllowanceSet,
  name: AllowanceName,
  solver: string,
  traits: readonly string[],
): EffectiveLimit {
  const own = set.solvers[solver]?.[name];
  if (own !== undefined) return { limit: own, scope: { solver, trait: null } };
  let best: EffectiveLimit | null = null;
  for (const trait of traits) {
    const limit = set.traits[trait]?.[name];
    if (limit === undefined) continue;
    const isWider = best === null || (best.limit !== null && (limit === null || limit > best.limit));
    if (isWider) best = { limit, scope: { solver: null, trait } };
  }
  return best ?? { limit: set.base[name], scope: everywhere };
}

/** A pair with what is needed to judge it. */
export interface JudgedPair {
  pair: Pair;
  matched: MatchedPair;
}

/**
 * Every allowance that the pairs and totals go beyond, each once for every scope, in the order of the schema.
 * Exactly at a limit is within it. Counted allowances (`broke`, `rootMoved`, `unsteady`) count the pairs of one
 * scope: an exception takes its pairs out of the base's count. `totalPercent` is a solver's, so exceptions for
 * traits do not touch it. `orderUnder` is judged on pairs whose order was lost, by the interval's upper end
 * against the claim, or against the reference's order where the solver claims none.
 */
export function breachesOf(
  judged: readonly JudgedPair[],
  totals: readonly SolverTotals[],
  set: AllowanceSet,
): Breach[] {
  return [
    ...counted('broke', judged, set, (pair) => hasChange(pair, 'broke')),
    ...counted('rootMoved', judged, set, (pair) => hasChange(pair, 'root moved')),
    ...counted('unsteady', judged, set, (pair) => hasChange(pair, 'unsteady')),
    ...totalPercent(judged, totals, set),
    ...eachPair('caseEvaluations', judged, set, ({ pair }) => pair.difference),
    ...eachPair('orderUnder', judged, set, orderUnder),
    ...eachPair('digits', judged, set, fewerDigits),
  ];
}

export function hasChange(pair: Pair, change: Pair['change']): boolean {
  return pair.change === change || pair.others.includes(change);
}

function counted(
  allowance: AllowanceName,
  judged: readonly JudgedPair[],
  set: AllowanceSet,
  isCounted: (pair: Pair) => boolean,
): Breach[] {
  const byScope = new Map<string, Breach>();
  for (const { pair } of judged) {
    if (!isCounted(pair)) continue;
    const { limit, scope } = effectiveLimit(set, allowance, pair.solver, pair.traits);
    if (limit === null) continue;
    const key = scopeKey(scope);
    const breach = byScope.get(key) ?? { allowance, limit, figure: 0, scope, pairs: [] };
    byScope.set(key, breach);
    breach.pairs.push(pair.key);
    breach.figure = breach.pairs.length;
  }
  return [...byScope.values()].filter(({ figure, limit }) => figure !== null && figure > limit);
}

function eachPair(
  allowance: AllowanceName,
  judged: readonly JudgedPair[],
  set: AllowanceSet,
  figureOf: (one: JudgedPair) => number | null,
): Breach[] {
  const byScope = new Map<string, { limit: number; scope: Scope; over: { key: string; figure: number }[] }>();
  for (const one of judged) {
    const figure = figureOf(one);
    if (figure === null) continue;
    const { limit, scope } = effectiveLimit(set, allowance, one.pair.solver, one.pair.traits);
    if (limit === null || !(figure > limit)) continue;
    const key = scopeKey(scope);
    const entry = byScope.get(key) ?? { limit, scope, over: [] };
    byScope.set(key, entry);
    entry.over.push({ key: one.pair.key, figure });
  }
  return [...byScope.values()].map(({ limit, scope, over }) => {
    over.sort((a, b) => b.figure - a.figure);
    return { allowance, limit, figure: over[0]?.figure ?? null, scope, pairs: over.map(({ key }) => key) };
  });
}

function totalPercent(
  judged: readonly JudgedPair[],
  totals: readonly SolverTotals[],
  set: AllowanceSet,
): Breach[] {
  const over = totals.flatMap((one): Breach[] => {
    const { limit } = effectiveLimit(set, 'totalPercent', one.solver, []);
    if (limit === null) return [];
    const { reference, candidate, percent } = one.evaluations;
    // In products, not in quotients: 2 % of 150 is 3 to the last bit.
    if (!(100 * (candidate - reference) > limit * reference)) return [];
    const scope = { solver: one.solver, trait: null };
    return [{ allowance: 'totalPercent', limit, figure: percent, scope, pairs: [] }];
  });
  const bySolver = new Map(over.map((breach) => [breach.scope.solver, breach]));
  for (const { pair } of judged) {
    if (pair.difference !== null) bySolver.get(pair.solver)?.pairs.push(pair.key);
  }
  return over;
}

function orderUnder({ pair, matched }: JudgedPair): number | null {
  if (!hasChange(pair, 'order lost')) return null;
  const high = pair.candidate?.order.high ?? null;
  const wanted = matched.declaration?.order ?? pair.reference?.order.value ?? null;
  return high === null || wanted === null ? null : wanted - high;
}

function fewerDigits({ pair, matched }: JudgedPair): number | null {
  if (pair.digits === null || pair.reference === null || pair.candidate === null) return null;
  return digitsLost(matched, pair.reference, pair.candidate);
}

function scopeKey({ solver, trait }: Scope): string {
  return solver !== null ? `solver ${solver}` : trait !== null ? `trait ${trait}` : '';
}
