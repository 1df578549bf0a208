import { changesOf } from '../../../shared/comparison/change.ts';
import type { Pair } from '../../../shared/comparison/comparison.ts';
import { familyOf } from '../../../shared/comparison/pair.ts';
import { describePair } from '../../../shared/comparison/pair-sentence.ts';
import { effectiveLimit } from '../../../shared/comparison/verdict.ts';
import type { AllowanceSet } from '../../../shared/schemas/allowances.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SolveDetail } from '../../../shared/schemas/runs.ts';
import { solveKey } from '../../../shared/schemas/solve.ts';
import type { TextPiece } from '../../components/ui/rich-text.tsx';

export interface PairJudging {
  /** Of the library. */
  allowances: AllowanceSet;
  /** Whether both were measured in the same arithmetic, so that a difference is one of the builds. */
  isExact: boolean;
}

/** Two solves as a pair, with what changed between them by the library's allowances. */
export function pairOfSolves(
  reference: SolveDetail,
  candidate: SolveDetail,
  suiteCase: SuiteCase,
  { allowances, isExact }: PairJudging,
): Pair {
  const formerly = reference.solver === candidate.solver ? null : reference.solver;
  const matched = {
    solver: candidate.solver,
    formerly,
    case: suiteCase,
    start: candidate.start,
    reference,
    candidate,
    declaration: candidate.declaration,
  };
  const limit = (name: 'orderUnder' | 'digits') =>
    effectiveLimit(allowances, name, candidate.solver, suiteCase.traits).limit;
  const limits = { orderUnder: limit('orderUnder'), digits: limit('digits') };
  const changes = changesOf(matched, limits, isExact);
  return {
    key: solveKey(candidate),
    solver: candidate.solver,
    formerly,
    case: suiteCase.id,
    start: candidate.start,
    family: familyOf(suiteCase),
    traits: suiteCase.traits,
    reference,
    candidate,
    ...changes,
    repeatedMore:
      changes.difference === null || changes.difference <= 0
        ? 0
        : Math.max(0, candidate.queryCheck.repeated - reference.queryCheck.repeated),
  };
}

/** Names, then what the pair shows. */
export function pairSentence(pair: Pair, candidate: SolveDetail): TextPiece[] {
  const { uses } = candidate.declaration;
  const asks = uses.length === 1 && uses[0] === 'f' ? 'f' : 'more';
  return [
    { text: pair.solver, strong: true },
    { text: ' on ' },
    { text: pair.case, strong: true },
    { text: '. ' },
    ...describePair(pair, asks),
  ];
}
