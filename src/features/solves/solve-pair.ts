import { changesOf } from '../../../shared/comparison/change.ts';
import type { Pair } from '../../../shared/comparison/comparison.ts';
import { familyOf } from '../../../shared/comparison/pair.ts';
import { describePair } from '../../../shared/comparison/pair-sentence.ts';
import { defaultAllowances } from '../../../shared/schemas/allowances.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SolveDetail } from '../../../shared/schemas/runs.ts';
import { solveKey } from '../../../shared/schemas/solve.ts';
import type { TextPiece } from '../../components/ui/rich-text.tsx';

/** Two solves as a pair, with what changed between them. */
export function pairOfSolves(reference: SolveDetail, candidate: SolveDetail, suiteCase: SuiteCase): Pair {
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
  const changes = changesOf(matched, defaultAllowances, true);
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
