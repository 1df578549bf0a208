import { isRightlyRefused } from '../../shared/numerics/judge-claim.ts';
import { rootOfSolve } from '../../shared/numerics/root-of-solve.ts';
import { rootReference } from '../../shared/numerics/root-reference.ts';
import { stripEvents } from '../../shared/numerics/strip-events.ts';
import type { SuiteCase } from '../../shared/schemas/case.ts';
import { type PathFile, pathFromFile } from '../../shared/schemas/path.ts';
import type { SolveRecord } from '../../shared/schemas/solve.ts';
import type { StripEvent } from '../../shared/schemas/strips.ts';
import type { StripInput } from '../components/digit-strip/strip-layout.ts';
import type { StripCounts } from '../components/digit-strip/strip-words.ts';

/** What stands in the place of a strip: the strip, or words where there is nothing to draw. */
export type SolvePicture =
  | { kind: 'strip'; strip: StripInput; counts: StripCounts }
  | { kind: 'words'; words: string };

/** Words for a solve that no strip can show, or null where one can. */
export function wordsInsteadOfStrip(
  solve: Pick<SolveRecord, 'outcome' | 'remarks'>,
  suiteCase: SuiteCase | undefined,
): string | null {
  if (solve.outcome === 'not applicable') return 'not applicable';
  if (suiteCase?.expectation === 'none') {
    return isRightlyRefused(solve) ? 'no root here; rightly refused' : `no root here; ${solve.outcome}`;
  }
  if (suiteCase === undefined || suiteCase.roots.length === 0) return 'no certified root';
  return null;
}

/** Correct digits that a root can be told to in binary64: −log10 of F relative to it. Cut to 0 … 16. */
export function attainableDigits(root: SuiteCase['roots'][number]): number {
  const size = Math.abs(Number(root.value));
  const relative = size === 0 ? root.attainable : root.attainable / size;
  return relative === 0 ? 16 : Math.min(16, Math.max(0, -Math.log10(relative)));
}

function stripPicture(
  solve: SolveRecord,
  events: readonly StripEvent[],
  attainable: number | null,
): SolvePicture {
  return {
    kind: 'strip',
    strip: { events, outcome: solve.outcome, digits: solve.digits, attainable, exact: solve.exact },
    counts: {
      evaluations: solve.evaluations,
      derivatives: solve.df + solve.d2f,
      repeated: solve.queryCheck.repeated,
    },
  };
}

/** Of the root that a solve went to; else what all allowed roots have in common, or null. */
function attainableOf(solve: Pick<SolveRecord, 'nearest'>, suiteCase: SuiteCase): number | null {
  const own = solve.nearest === null ? undefined : suiteCase.roots[solve.nearest];
  if (own !== undefined) return attainableDigits(own);
  const allowed = suiteCase.roots.filter((root) => root.allowed);
  const digits = (allowed.length > 0 ? allowed : suiteCase.roots).map(attainableDigits);
  const [first] = digits;
  return first !== undefined && digits.every((one) => Math.abs(one - first) < 0.05) ? first : null;
}

/** The picture of a solve from its record, its case and its strip as the server makes it. */
export function pictureOfStrip(
  solve: SolveRecord,
  suiteCase: SuiteCase | undefined,
  events: readonly StripEvent[] | null,
): SolvePicture {
  const words = wordsInsteadOfStrip(solve, suiteCase);
  if (words !== null || suiteCase === undefined)
    return { kind: 'words', words: words ?? 'no certified root' };
  if (events === null) return { kind: 'words', words: 'no path kept' };
  return stripPicture(solve, events, attainableOf(solve, suiteCase));
}

/** The picture of a solve from its record, its case and its path. */
export function pictureOfSolve(
  solve: SolveRecord,
  suiteCase: SuiteCase | undefined,
  file: PathFile | null,
): SolvePicture {
  const words = wordsInsteadOfStrip(solve, suiteCase);
  if (words !== null || suiteCase === undefined)
    return { kind: 'words', words: words ?? 'no certified root' };
  if (file === null) return { kind: 'words', words: 'no path kept' };
  const path = pathFromFile(file);
  const lastX = path.events.findLast((event) => Number.isFinite(event.x))?.x ?? Number.NaN;
  const index = rootOfSolve(solve, suiteCase, lastX);
  const root = index === null ? undefined : suiteCase.roots[index];
  if (root === undefined) return { kind: 'words', words: 'no certified root' };
  return stripPicture(solve, stripEvents(path, rootReference(root.value)), attainableDigits(root));
}
