import { isRightlyRefused } from '../numerics/judge-claim.ts';
import type { SolveRecord } from '../schemas/solve.ts';
import type { Pair } from './comparison.ts';
import { fixed, type RichText, say } from './rich-text.ts';

/** What a pair shows, in one sentence under its change. `asks`: what the solver asks for, for the cause. */
export function describePair(pair: Pair, asks: 'f' | 'more' = 'f'): RichText {
  const { reference, candidate, change } = pair;
  if (reference === null || candidate === null) return describeSingle(pair);
  switch (change) {
    case 'broke':
    case 'mended':
      return say`${ended(reference, 'The reference')}; ${ended(candidate, 'the candidate')}.`;
    case 'root moved':
      return say`Both solve it, at different roots: the candidate ends at ${root(candidate)}, the reference at ${root(reference)}.`;
    case 'order lost':
      return say`The order found is ${order(candidate)}; it was ${order(reference)}.`;
    case 'order gained':
      return say`The order found is ${order(candidate)}; it was ${order(reference)}.`;
    case 'less accurate':
      return say`${fixed(-(pair.digits ?? 0), 1)} correct digits fewer: ${digits(candidate)} instead of ${digits(reference)}.`;
    case 'more accurate':
      return say`${fixed(pair.digits ?? 0, 1)} correct digits more: ${digits(candidate)} instead of ${digits(reference)}.`;
    case 'costlier':
      return describeCostlier(pair, reference, candidate, asks);
    case 'cheaper':
      return say`The same root for ${evaluations(candidate)} instead of ${reference.evaluations}.`;
    case 'unsteady':
      return say`A fresh process did not repeat the candidate’s path to the last bit.`;
    case 'drifted':
      return describeDrifted(reference, candidate);
    default:
      return reference.pathHash === candidate.pathHash
        ? say`The same to the last bit.`
        : say`The same outcome at the same cost; the two runs were made in different arithmetic.`;
  }
}

function describeSingle({ reference, candidate, change }: Pair): RichText {
  const solve = candidate ?? reference;
  if (solve === null) return [];
  return change === 'new'
    ? say`Only the candidate has it: ${ended(solve, null)}.`
    : say`Only the reference has it: ${ended(solve, null)}.`;
}

function describeCostlier(
  pair: Pair,
  reference: SolveRecord,
  candidate: SolveRecord,
  asks: 'f' | 'more',
): RichText {
  const cost = say`The same root for ${evaluations(candidate)} instead of ${reference.evaluations}`;
  if (pair.repeatedMore === 0) return say`${cost}.`;
  const times = candidate.queryCheck.repeated;
  const before = reference.queryCheck.repeated;
  const what =
    asks === 'f'
      ? say`it asks for f again at an x it already has`
      : say`it asks again at an x it already has`;
  const often = times === 1 ? say`once` : say`${times} times`;
  return before === 0
    ? say`${cost}: ${what}, ${often}.`
    : say`${cost}: ${what}, ${often}, where the reference did so ${before === 1 ? 'once' : say`${before} times`}.`;
}

function describeDrifted(reference: SolveRecord, candidate: SolveRecord): RichText {
  if (reference.outcome !== candidate.outcome) {
    return say`Neither solves it: ${ended(reference, 'the reference')}; ${ended(candidate, 'the candidate')}.`;
  }
  if (candidate.outcome === 'solved') {
    return say`Another path to the same root, at the same ${evaluations(candidate)}.`;
  }
  if (isRightlyRefused(candidate)) return say`Another path; both rightly refuse, so cost is not compared.`;
  return say`Another path; neither solves it, so cost is not compared.`;
}

/** `the candidate refused after 102 evaluations: “too many steps”`; without a subject, `refused after …`. */
function ended(
  solve: SolveRecord,
  who: 'The reference' | 'the reference' | 'the candidate' | null,
): RichText {
  const subject = who === null ? '' : `${who} `;
  const after = evaluations(solve);
  switch (solve.outcome) {
    case 'solved':
      return who === null ? say`solved with ${after}` : say`${subject}solves it with ${after}`;
    case 'other root':
      return say`${subject}${who === null ? 'ended' : 'ends'} at another root after ${after}`;
    case 'refused':
      return isRightlyRefused(solve)
        ? say`${subject}rightly ${who === null ? 'refused' : 'refuses'} after ${after}`
        : say`${subject}${who === null ? 'refused' : 'refuses'} after ${after}${said(solve)}`;
    case 'false claim':
      return say`${subject}${who === null ? 'claimed' : 'claims'} a root where there is none, after ${after}`;
    case 'over budget':
      return say`${subject}${who === null ? 'was' : 'is'} over budget after ${after}`;
    case 'timed out':
      return say`${subject}${who === null ? 'ran' : 'runs'} out of time after ${after}`;
    case 'crashed':
      return say`${subject}${who === null ? 'crashed' : 'crashes'} after ${after}`;
    case 'garbled':
      return say`${subject}${who === null ? 'broke' : 'breaks'} the wire after ${after}`;
    default:
      return say`${subject}does not apply`;
  }
}

function said(solve: SolveRecord): RichText {
  const text = solve.remarks.find((remark) => remark.code === 'said')?.text ?? '';
  return text === '' ? [] : say`: “${text}”`;
}

function evaluations(solve: SolveRecord): RichText {
  return solve.evaluations === 1 ? say`1 evaluation` : say`${solve.evaluations} evaluations`;
}

function order({ order: { value } }: SolveRecord): RichText {
  return value === null ? say`not known` : [fixed(value, 2)];
}

function digits(solve: SolveRecord): RichText {
  return solve.digits === null ? say`an unknown number` : [fixed(solve.digits, 1)];
}

function root(solve: SolveRecord): RichText {
  return solve.root === null
    ? say`no number`
    : [{ text: String(solve.root).replaceAll('-', '−'), figure: true }];
}
