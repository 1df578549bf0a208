import type { Path } from '../schemas/path.ts';
import type { SolverDeclaration } from '../schemas/solver.ts';

/**
 * The sequence whose errors are measured, from the path of a solve.
 *
 * Where the solver reported steps: the starting points, then the x of every step, in order. The starts are the
 * x's of the first evaluations of f before the first step, each once, `starts` of them at most (Steffensen's
 * method asks at x₀ and x₀ + f(x₀) and starts from the first alone). For a solver that takes a bracket, with a
 * start or without, the steps alone: the path does not say which of its first x's is no bracket end.
 * Where it reported none: the x's of its evaluations of f (alone or with f′), in order, each x once. An x asked
 * for again is no new approximation, so it is left out wherever it comes again; a cycle cannot be seen then.
 * −0 and 0 are the same x. Evaluations of derivatives alone add nothing.
 *
 * A bracketing solver without steps is measured by where it looks, bracket ends included.
 * `takes`, `starts`: as the solver's declaration says.
 */
export function iteratesOf(
  path: Path,
  takes: SolverDeclaration['takes'],
  starts = Number.POSITIVE_INFINITY,
): number[] {
  const firstStep = path.events.findIndex((event) => event.kind === 'step');
  if (firstStep < 0) return askedOnce(path.events);
  const steps = path.events.filter((event) => event.kind === 'step').map((event) => event.x);
  if (takes === 'bracket' || takes === 'both') return steps;
  // Some solvers evaluate f at a new x before they report the step to it: that x is the step's, no start.
  const before = askedOnce(path.events.slice(0, firstStep)).filter((x) => x !== steps[0]);
  return [...before.slice(0, starts), ...steps];
}

function askedOnce(events: Path['events']): number[] {
  // A Set takes −0 and 0 for the same, and NaN for itself.
  const asked = new Set<number>();
  for (const { kind, x } of events) if (kind === 'f' || kind === 'fdf') asked.add(x);
  return [...asked];
}
