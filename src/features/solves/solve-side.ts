import { correctDigits } from '../../../shared/numerics/digits.ts';
import { repeatsOf } from '../../../shared/numerics/query-check.ts';
import { rootOfSolve } from '../../../shared/numerics/root-of-solve.ts';
import { rootReference } from '../../../shared/numerics/root-reference.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import { type Path, type PathEvent, pathFromFile } from '../../../shared/schemas/path.ts';
import type { SolveDetail } from '../../../shared/schemas/runs.ts';
import { pictureOfSolve, type SolvePicture } from '../../lib/strip-of-solve.ts';

/** One evaluation as the path table shows it. */
export interface PathLine {
  /** Number of the evaluation from 1; an fdf is two. */
  number: number;
  /** Number of the last of them: differs for an fdf only. */
  lastNumber: number;
  event: PathEvent;
  /** Correct digits of x; null without a certified root or where x is not finite. */
  digits: number | null;
  /** Number of the evaluation that asked first at this x, or null. */
  again: number | null;
}

/** A solve with everything that its page draws. */
export interface SolveSide {
  solve: SolveDetail;
  /** Evaluations only, as they are aligned. */
  path: Path;
  lines: PathLine[];
  steps: number;
  picture: SolvePicture;
  /** Lines of the path that were not kept. */
  cut: number;
  hasPath: boolean;
}

/** Prepares one side of the solve page. */
export function solveSide(solve: SolveDetail, suiteCase: SuiteCase | undefined): SolveSide {
  const all = solve.path === null ? { events: [], cut: 0 } : pathFromFile(solve.path);
  const events = all.events.filter((event) => event.kind !== 'step');
  const repeats = repeatsOf(events);
  const lastX = events.findLast((event) => Number.isFinite(event.x))?.x ?? Number.NaN;
  const rootIndex = suiteCase === undefined ? null : rootOfSolve(solve, suiteCase, lastX);
  const root = rootIndex === null ? undefined : suiteCase?.roots[rootIndex];
  const ref = root === undefined ? null : rootReference(root.value);
  let count = 0;
  const numbers: number[] = [];
  const lines = events.map((event, index): PathLine => {
    const number = count + 1;
    count += event.kind === 'fdf' ? 2 : 1;
    numbers.push(number);
    const earlier = repeats[index] ?? null;
    return {
      number,
      lastNumber: count,
      event,
      digits: ref === null || !Number.isFinite(event.x) ? null : correctDigits(event.x, ref).digits,
      again: earlier === null ? null : (numbers[earlier] ?? null),
    };
  });
  return {
    solve,
    path: { events, cut: all.cut },
    lines,
    steps: solve.iterations ?? all.events.length - events.length,
    picture: pictureOfSolve(solve, suiteCase, solve.path),
    cut: all.cut,
    hasPath: solve.path !== null,
  };
}
