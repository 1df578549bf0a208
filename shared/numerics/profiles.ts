/** Where a step function jumps: from `x` on, `x` itself included, its value is `share`. */
export interface ProfilePoint {
  x: number;
  /** Of all problems, 0 to 1. */
  share: number;
}

/**
 * One right-continuous step function. `points`: x rises strictly, the share never falls; the first point is at
 * the left edge, the last one at the right edge that all profiles of one call share, so that a line with steps
 * after each point is the whole drawing.
 */
export interface Profile {
  name: string;
  points: ProfilePoint[];
  /** Share of the problems that it solves at any cost. */
  solved: number;
}

/** The costs of one solver or one build, a problem each; null where it failed. */
export interface ProfileCosts {
  name: string;
  /** Positive and finite; evaluations, so that ties are exact. */
  costs: readonly (number | null)[];
}

/**
 * Performance profiles: ρ_s(τ), the share of all problems that s solves at a cost of at most τ times the least
 * cost of any s on that problem, r_{p,s} = t_{p,s} / min_s t_{p,s} ≤ τ.
 *
 * ρ_s(1) is the share of problems on which s is cheapest; a tie counts for every winner, so that these shares
 * can sum to more than 1. A failure has no ratio and is never reached: the right edge is the greatest finite
 * ratio, where ρ_s is the share that s solves. A problem that nobody solves stays in the denominator. Equal
 * ratios of integer costs are the same binary64, as division rounds correctly, so ties need no tolerance.
 * The x of the points is τ, from 1 on; log2 τ is the usual axis.
 *
 * With three or more, taking one away can change the order of the others (Gould & Scott 2016, ACM TOMS 43(2),
 * article 15): two builds are compared in a call of their own.
 *
 * Where there is no problem there are no points, and `solved` is 0.
 * Throws RangeError where the numbers of problems differ, or a cost is not positive and finite.
 * Source: Dolan & Moré 2002, Math. Program. 91, 201–213 (from memory).
 */
export function performanceProfiles(all: readonly ProfileCosts[]): Profile[] {
  const problems = countProblems(all);
  const least = Array.from({ length: problems }, (_, p) =>
    Math.min(...all.map((one) => one.costs[p] ?? Number.POSITIVE_INFINITY)),
  );
  const ratios = all.map((one) =>
    one.costs.map((cost, p) => (cost === null ? null : cost / (least[p] ?? cost))),
  );
  return stepFunctions(all, ratios, 1);
}

/**
 * Data profiles: d_s(κ), the share of all problems that s solves with at most κ (n_p + 1) evaluations, n_p the
 * number of unknowns of problem p. n_p + 1 evaluations are one simplex gradient, the unit of κ. Unlike a
 * performance profile it does not depend on what else is drawn.
 *
 * The costs count evaluations up to the first that passes the caller's test of convergence, which is to be named
 * beside the drawing; `evaluationsUntil` has one. A Jacobian counts as n_p evaluations.
 * `variables`: n_p for each problem; left out: 1. The x of the points is κ, from 0 on.
 *
 * Where there is no problem there are no points, and `solved` is 0.
 * Throws RangeError as `performanceProfiles` does, and where some n_p is no positive integer.
 * Source: Moré & Wild 2009, SIAM J. Optim. 20, 172–191 (from memory).
 */
export function dataProfiles(all: readonly ProfileCosts[], variables?: readonly number[]): Profile[] {
  const problems = countProblems(all);
  if (variables !== undefined && variables.length !== problems) {
    throw new RangeError('A number of unknowns for each problem was expected.');
  }
  if (variables?.some((n) => !Number.isInteger(n) || n < 1)) {
    throw new RangeError('Numbers of unknowns of at least 1 were expected.');
  }
  const budgets = all.map((one) =>
    one.costs.map((cost, p) => (cost === null ? null : cost / ((variables?.[p] ?? 1) + 1))),
  );
  return stepFunctions(all, budgets, 0);
}

/**
 * Evaluations until a measure of the error has fallen to τ times its first value, e_k ≤ τ e_0, that evaluation
 * included; null where it never does. For root finding the measure is |f(x)|, or the distance from the certified
 * root; which of the two is to be said beside the drawing.
 *
 * `measures`: one for each evaluation, in order; not finite: it passes no test. A first value of 0 passes at
 * once; one that is not finite is no measure of progress, so that nothing passes.
 * `tau`: 10^−k, above 0 and below 1, else RangeError.
 * Source: the test of Moré & Wild 2009 with f_L = 0 (from memory).
 */
export function evaluationsUntil(measures: readonly number[], tau: number): number | null {
  if (!(tau > 0 && tau < 1)) throw new RangeError('A tolerance between 0 and 1 was expected.');
  const first = measures[0];
  if (first === undefined || !Number.isFinite(first)) return null;
  const index = measures.findIndex((measure) => Math.abs(measure) <= tau * Math.abs(first));
  return index < 0 ? null : index + 1;
}

/** The value of a profile at x; 0 left of its first point. */
export function shareAt({ points }: Pick<Profile, 'points'>, x: number): number {
  return points.findLast((point) => point.x <= x)?.share ?? 0;
}

function stepFunctions(
  all: readonly ProfileCosts[],
  values: readonly (readonly (number | null)[])[],
  left: number,
): Profile[] {
  let right = left;
  for (const value of values.flat()) if (value !== null && value > right) right = value;
  return all.map(({ name }, s) => {
    const own = values[s] ?? [];
    if (own.length === 0) return { name, points: [], solved: 0 };
    const reached = own.filter((value) => value !== null).toSorted((a, b) => a - b);
    const points: ProfilePoint[] = [{ x: left, share: 0 }];
    for (const [index, x] of reached.entries()) {
      const share = (index + 1) / own.length;
      const last = points.at(-1);
      if (last?.x === x) last.share = share;
      else points.push({ x, share });
    }
    const solved = reached.length / own.length;
    if (points.at(-1)?.x !== right) points.push({ x: right, share: solved });
    return { name, points, solved };
  });
}

function countProblems(all: readonly ProfileCosts[]): number {
  const problems = all[0]?.costs.length ?? 0;
  for (const { name, costs } of all) {
    if (costs.length !== problems) throw new RangeError(`${name}: ${problems} costs were expected.`);
    const isWrong = costs.some((cost) => cost !== null && !(cost > 0 && Number.isFinite(cost)));
    if (isWrong) throw new RangeError(`${name}: costs above 0 were expected, or null for a failure.`);
  }
  return problems;
}
