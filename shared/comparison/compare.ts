import type { AllowanceSet } from '../schemas/allowances.ts';
import { type SolveRecord, solveKey } from '../schemas/solve.ts';
import { changesOf } from './change.ts';
import type { ComparableRun, Comparison, NotCompared, Pair } from './comparison.ts';
import { familyOf, type MatchedPair, type Matching, matchSolves } from './pair.ts';
import { countChanges, overallOf, totalsOf } from './totals.ts';
import { breachesOf, effectiveLimit, type JudgedPair } from './verdict.ts';

/**
 * Compares a candidate with a reference, solve by solve, and judges it by the team's allowances.
 *
 * The path of a deterministic solver is the same to the last bit in every run, so differences are exact and
 * need no statistics. Where the fingerprints of the arithmetic differ that no longer holds: the comparison is
 * made, `exact` is false, and the reason stands on top.
 *
 * Verdict: `beyond allowances` where there is a breach; else `could not tell` where no pair could be compared
 * or the candidate has no result for some that the reference has; else `within allowances`.
 * Linear in the number of solves.
 */
export function compareRuns(
  reference: ComparableRun,
  candidate: ComparableRun,
  allowances: AllowanceSet,
): Comparison {
  const exact = reference.fingerprint === candidate.fingerprint;
  const matching = matchSolves(reference, candidate);
  const judged = inOrder(matching.pairs, candidate, reference).map((matched): JudgedPair => {
    return { matched, pair: pairOf(matched, allowances, exact) };
  });
  const pairs = judged.map((one) => one.pair);
  const declarations = new Map([...reference.solvers, ...candidate.solvers].map((one) => [one.name, one]));
  const totals = totalsOf(pairs, declarations);
  const breaches = breachesOf(judged, totals, allowances);
  const reasons = reasonsOf(reference, candidate, matching, exact);
  const hasCompared = pairs.some((pair) => pair.reference !== null && pair.candidate !== null);
  const isOpen = !hasCompared || matching.notCompared.some((one) => one.reason === 'not run');
  return {
    reference: reference.label,
    candidate: candidate.label,
    verdict: breaches.length > 0 ? 'beyond allowances' : isOpen ? 'could not tell' : 'within allowances',
    reasons,
    exact,
    breaches,
    pairs,
    notApplicable: matching.notApplicable,
    notCompared: matching.notCompared,
    totals,
    overall: overallOf(pairs),
    changes: countChanges(pairs),
  };
}

function pairOf(matched: MatchedPair, allowances: AllowanceSet, exact: boolean): Pair {
  const { solver, formerly, start, reference, candidate } = matched;
  const { id, traits } = matched.case;
  const limit = (name: 'orderUnder' | 'digits') => effectiveLimit(allowances, name, solver, traits).limit;
  const limits = { orderUnder: limit('orderUnder'), digits: limit('digits') };
  const changes = changesOf(matched, limits, exact);
  return {
    key: solveKey({ solver, case: id, start }),
    solver,
    formerly,
    case: id,
    start,
    family: familyOf(matched.case),
    traits,
    reference,
    candidate,
    ...changes,
    repeatedMore: repeatedMore(reference, candidate, changes.difference),
  };
}

function repeatedMore(
  reference: SolveRecord | null,
  candidate: SolveRecord | null,
  difference: number | null,
): number {
  if (reference === null || candidate === null || difference === null || difference <= 0) return 0;
  return Math.max(0, candidate.queryCheck.repeated - reference.queryCheck.repeated);
}

/** By solver as the candidate lists them, then by case as its suite does, then by start. */
function inOrder(
  pairs: readonly MatchedPair[],
  candidate: ComparableRun,
  reference: ComparableRun,
): MatchedPair[] {
  const places = (names: readonly string[]) => new Map([...new Set(names)].map((name, i) => [name, i]));
  const solvers = places([...candidate.solvers, ...reference.solvers].map((one) => one.name));
  const cases = places([...candidate.cases, ...reference.cases].map((one) => one.id));
  const last = Number.MAX_SAFE_INTEGER;
  const ranked = pairs.map((pair) => ({
    pair,
    solver: solvers.get(pair.solver) ?? last,
    case: cases.get(pair.case.id) ?? last,
    start: pair.start ?? -1,
  }));
  ranked.sort((a, b) => a.solver - b.solver || a.case - b.case || a.start - b.start);
  return ranked.map(({ pair }) => pair);
}

function reasonsOf(
  reference: ComparableRun,
  candidate: ComparableRun,
  { pairs, notCompared }: Matching,
  exact: boolean,
): string[] {
  const reasons: string[] = [];
  if (!exact) {
    reasons.push(
      'The two runs were made in different arithmetic, so a difference need not be one of the builds; run the reference again to compare them exactly.',
    );
  }
  const changed = casesOf(notCompared, 'case changed');
  if (changed > 0) {
    reasons.push(
      changed === 1
        ? 'One case has changed in the suite since the reference and is not compared.'
        : `${changed} cases have changed in the suite since the reference and are not compared.`,
    );
  }
  const notRun = notCompared.filter((one) => one.reason === 'not run').length;
  if (notRun > 0) {
    reasons.push(
      notRun === 1
        ? 'The candidate has no result for one solve that the reference has.'
        : `The candidate has no result for ${notRun} solves that the reference has.`,
    );
  }
  if (!pairs.some((pair) => pair.reference !== null && pair.candidate !== null)) {
    reasons.push(nothingReason(reference, candidate, notCompared));
  }
  return reasons;
}

function nothingReason(
  reference: ComparableRun,
  candidate: ComparableRun,
  notCompared: readonly NotCompared[],
): string {
  if (candidate.solves.length === 0) return 'The candidate has no results.';
  if (reference.solves.length === 0) return 'The reference has no results.';
  if (notCompared.length > 0) return 'No case is the same in both runs.';
  const known = new Set(reference.cases.map((one) => one.id));
  if (!candidate.cases.some((one) => known.has(one.id))) return 'The two runs have no case in common.';
  return 'The two runs have no solve in common.';
}

function casesOf(notCompared: readonly NotCompared[], reason: NotCompared['reason']): number {
  return new Set(notCompared.filter((one) => one.reason === reason).map((one) => one.case)).size;
}
