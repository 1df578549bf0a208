import { isSuccess } from '../numerics/judge-claim.ts';
import type { OrderEstimate, SolveRecord } from '../schemas/solve.ts';
import type { Change } from '../schemas/words.ts';
import type { MatchedPair } from './pair.ts';

/**
 * Changes by gravity: one pair has one, the first that holds. The bad ones come first, then the good ones in
 * the mirrored order, then what is left. `drifted` is what is left of a pair whose path is another one: a good
 * change always has another path, too, and says more.
 */
export const gravity = [
  'broke',
  'root moved',
  'order lost',
  'less accurate',
  'costlier',
  'unsteady',
  'mended',
  'order gained',
  'more accurate',
  'cheaper',
  'drifted',
  'new',
  'gone',
  'same',
] as const satisfies readonly Change[];

/** Fewer digits by more than this are a change, or by more than the team's allowance where that is less. */
export const digitsNoticed = 0.5;
/** Differences of digits carry rounding of the logarithms. */
const digitsRounding = 1e-9;

export interface ChangeLimits {
  /** How far an order may lie under the solver's claim; null: the claim is not looked at. */
  orderUnder: number | null;
  digits: number | null;
}

export interface Changes {
  change: Change;
  others: Change[];
  /** Evaluations, candidate less reference; null where not both solved. */
  difference: number | null;
  /** Correct digits, candidate less reference; null where not both solved. */
  digits: number | null;
}

/**
 * Says what changed between the two solves of a pair.
 *
 * `isExact`: both ran in the same arithmetic. Else another path at the same cost, or between two solves of
 * which neither succeeded, is no drift of the builds but may be the arithmetic's, and such a pair is `same`.
 *
 * Cost, order, digits and root are compared only where both solved. Where both rightly refused, and where
 * neither succeeded, the path and the outcome alone are: another outcome (refused, then crashed) is `drifted`,
 * since nothing was lost that the reference had; both outcomes stand in the pair. `unsteady`: a fresh process
 * did not repeat the candidate's solve to the last bit. `root moved`: both solved, at different allowed roots;
 * an `other root` is no success, so that solved → other root is `broke`.
 * Where the path is the same to the last bit nothing but outcome and steadiness can have changed.
 */
export function changesOf(pair: MatchedPair, limits: ChangeLimits, isExact: boolean): Changes {
  const { reference, candidate } = pair;
  if (reference === null) return { change: 'new', others: [], difference: null, digits: null };
  if (candidate === null) return { change: 'gone', others: [], difference: null, digits: null };
  const found = new Set<Change>();
  const [was, is] = [isSuccess(reference), isSuccess(candidate)];
  if (was && !is) found.add('broke');
  if (!was && is) found.add('mended');
  if (candidate.steady === false) found.add('unsteady');

  const bothSolved = reference.outcome === 'solved' && candidate.outcome === 'solved';
  const isSamePath = reference.pathHash === candidate.pathHash;
  if (bothSolved && !isSamePath) addSolvedChanges(found, pair, reference, candidate, limits);
  const difference = bothSolved ? candidate.evaluations - reference.evaluations : null;

  const hasDrifted = !isSamePath && (difference === 0 || (!bothSolved && was === is));
  const hasOtherOutcome = was === is && reference.outcome !== candidate.outcome;
  if ((isExact && hasDrifted) || hasOtherOutcome) found.add('drifted');
  if (found.size === 0) found.add('same');

  // Most pairs have one change alone; then there is nothing to put in order.
  const ordered = found.size === 1 ? [...found] : gravity.filter((one) => found.has(one));
  const [change = 'same', ...others] = ordered;
  const digits =
    bothSolved && reference.digits !== null && candidate.digits !== null
      ? candidate.digits - reference.digits
      : null;
  return { change, others, difference, digits };
}

function addSolvedChanges(
  found: Set<Change>,
  pair: MatchedPair,
  reference: SolveRecord,
  candidate: SolveRecord,
  limits: ChangeLimits,
): void {
  const { nearest: from } = reference;
  const { nearest: to } = candidate;
  if (from !== null && to !== null && from !== to) found.add('root moved');

  const claim = pair.declaration?.order ?? null;
  if (isOrderLost(reference.order, candidate.order, claim, limits.orderUnder)) found.add('order lost');
  if (isOrderLost(candidate.order, reference.order, claim, limits.orderUnder)) found.add('order gained');

  if (digitsLost(pair, reference, candidate) > noticedDigits(limits)) found.add('less accurate');
  if (digitsLost(pair, candidate, reference) > noticedDigits(limits)) found.add('more accurate');

  if (candidate.evaluations > reference.evaluations) found.add('costlier');
  if (candidate.evaluations < reference.evaluations) found.add('cheaper');
}

/**
 * Whether the order fell, by intervals alone: that of `after` lies wholly below that of `before`; or wholly
 * below the claim less the allowance, which that of `before` does not. Both need an estimate. The second test
 * asks about `before`, because a claim is for simple roots and a multiple one is linear in every build.
 */
export function isOrderLost(
  before: OrderEstimate,
  after: OrderEstimate,
  claim: number | null,
  orderUnder: number | null,
): boolean {
  if (!isOrderKnown(before) || !isOrderKnown(after)) return false;
  if (after.high < before.low) return true;
  if (claim === null || orderUnder === null) return false;
  return after.high < claim - orderUnder && before.high >= claim - orderUnder;
}

/** An order with an interval that may be shown: a single ratio of a method with memory is none. */
export function isOrderKnown(
  order: OrderEstimate,
): order is OrderEstimate & { value: number; low: number; high: number } {
  const { status, value, low, high } = order;
  return status !== 'one ratio' && status !== 'undecided' && value !== null && low !== null && high !== null;
}

/**
 * An error within this many times the attainable accuracy F is as good as none: the answer is there, the same
 * limit as the query check's. At a well-conditioned root, where F is half an ulp, it is one ulp.
 */
const answerFactor = 2;

/**
 * Correct digits that `after` has fewer than `before`, where its error is beyond the attainable accuracy of
 * the root; else 0, because the case cannot give more.
 */
export function digitsLost(pair: MatchedPair, before: SolveRecord, after: SolveRecord): number {
  if (before.digits === null || after.digits === null || after.error === null) return 0;
  const attainable = after.nearest === null ? 0 : (pair.case.roots?.[after.nearest]?.attainable ?? 0);
  if (after.exact || Math.abs(after.error) <= answerFactor * attainable) return 0;
  return Math.max(0, before.digits - after.digits - digitsRounding);
}

function noticedDigits({ digits }: ChangeLimits): number {
  return digits === null ? digitsNoticed : Math.min(digits, digitsNoticed);
}
