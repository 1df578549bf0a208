import type { Path } from '../schemas/path.ts';
import type { SolverDeclaration } from '../schemas/solver.ts';

/**
 * The sequence whose errors are measured, from the path of a solve.
 *
 * Where the solver reported steps: the starting points, then the x of every step, in order. The starts are the
 * x's of the evaluations before the first step, each once; for a solver that takes a bracket and no start there
 * are none, because the bracket's ends are no approximations: the steps alone.
 * Where it reported none: the x's of its evaluations of f (alone or with f′), in order, each x once. An x asked
 * for again is no new approximation, so it is left out wherever it comes again; a cycle cannot be seen then.
 * −0 and 0 are the same x. Evaluations of derivatives alone add nothing.
 *
 * A bracketing solver without steps is measured by where it looks, bracket ends included.
 */
export function iteratesOf(path: Path, takes: SolverDeclaration['takes']): number[] {
  const firstStep = path.events.findIndex((event) => event.kind === 'step');
  if (firstStep < 0) return askedOnce(path.events);
  const steps = path.events.filter((event) => event.kind === 'step').map((event) => event.x);
  if (takes === 'bracket') return steps;
  return [...askedOnce(path.events.slice(0, firstStep)).filter(isNotFirst(steps[0])), ...steps];
}

function askedOnce(events: Path['events']): number[] {
  // A Set takes −0 and 0 for the same, and NaN for itself.
  const asked = new Set<number>();
  for (const { kind, x } of events) if (kind === 'f' || kind === 'fdf') asked.add(x);
  return [...asked];
}

/** Some solvers evaluate f at a new x before they report the step to it: that x is the step's. */
function isNotFirst(step: number | undefined): (x: number) => boolean {
  return (x) => x !== step;
}
