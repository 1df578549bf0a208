import type { StripEvent } from '../../../shared/schemas/strips.ts';
import type { StripInput } from '../../components/digit-strip/strip-layout.ts';

/**
 * Small solvers that really run, so that samples and tests of the drawings show measured paths. Each asks
 * through a recorder, as a solver under measurement does through the wire.
 */
export interface Problem {
  f: (x: number) => number;
  df: (x: number) => number;
  root: number;
  attainable: number;
}

export interface Ask {
  f: (x: number) => number;
  df: (x: number) => number;
}

export type SmallSolver = (ask: Ask, ...inputs: number[]) => number | null;

/** Correct digits of x against a root other than 0; 16 where x is the root to the last bit. */
export function digitsOf(x: number, root: number): number | null {
  if (!Number.isFinite(x)) return null;
  const error = Math.abs((x - root) / root);
  return error === 0 ? 16 : Math.min(16, Math.max(0, -Math.log10(error)));
}

/** Runs a solver on a problem and records what it asks. Stops it at `most` evaluations: over budget. */
export function record(solver: SmallSolver, problem: Problem, inputs: number[], most = 200): StripInput {
  const events: StripEvent[] = [];
  const first = new Map<string, number>();
  const spent = Symbol('spent');
  function note(kind: 'f' | 'df', x: number): void {
    if (events.length >= most) throw spent;
    const key = `${kind} ${Object.is(x, -0) ? 0 : x}`;
    const repeatOf = first.get(key) ?? null;
    if (repeatOf === null) first.set(key, events.length);
    events.push({ kind, digits: digitsOf(x, problem.root), repeatOf });
  }
  const ask: Ask = {
    f: (x) => {
      note('f', x);
      return problem.f(x);
    },
    df: (x) => {
      note('df', x);
      return problem.df(x);
    },
  };
  const ended = { events, attainable: problem.attainable, exact: false, digits: null };
  try {
    const root = solver(ask, ...inputs);
    if (root === null) return { ...ended, outcome: 'refused' };
    return {
      ...ended,
      outcome: 'solved',
      digits: digitsOf(root, problem.root),
      exact: root === problem.root,
    };
  } catch (thrown) {
    if (thrown !== spent) throw thrown;
    return { ...ended, outcome: 'over budget' };
  }
}

const near = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-15 * Math.max(Math.abs(a), Math.abs(b));

/** Two-point secant that keeps its stored values. */
export const secant: SmallSolver = (ask, start = 0, second = 1) => {
  let [a, b] = [start, second];
  let [fa, fb] = [ask.f(a), ask.f(b)];
  for (let step = 0; step < 100; step += 1) {
    if (fb === 0) return b;
    if (fa === fb) return null;
    const c = b - (fb * (b - a)) / (fb - fa);
    [a, fa, b] = [b, fb, c];
    fb = ask.f(b);
    if (near(a, b)) return b;
  }
  return null;
};

/** The same formula with the stored values lost: both ends are asked for at every step. */
export const secantForgetful: SmallSolver = (ask, start = 0, second = 1) => {
  let [a, b] = [start, second];
  for (let step = 0; step < 100; step += 1) {
    const [fa, fb] = [ask.f(a), ask.f(b)];
    if (fb === 0 || near(a, b)) return b;
    if (fa === fb) return null;
    [a, b] = [b, b - (fb * (b - a)) / (fb - fa)];
  }
  return null;
};

/** Newton's method: f and f′ a step. */
export const newton: SmallSolver = (ask, start = 0) => {
  let x = start;
  for (let step = 0; step < 100; step += 1) {
    const value = ask.f(x);
    if (value === 0) return x;
    const next = x - value / ask.df(x);
    if (!Number.isFinite(next)) return null;
    if (near(next, x)) return next;
    x = next;
  }
  return null;
};

/** Bisection to the width that binary64 gives. */
export const bisection: SmallSolver = (ask, low = 0, high = 1) => {
  let [a, b] = [low, high];
  const sign = Math.sign(ask.f(a));
  if (sign === Math.sign(ask.f(b))) return null;
  while (!near(a, b)) {
    const middle = a + (b - a) / 2;
    if (middle === a || middle === b) break;
    const value = ask.f(middle);
    if (value === 0) return middle;
    if (Math.sign(value) === sign) a = middle;
    else b = middle;
  }
  return a + (b - a) / 2;
};

/** Attainable digits of these forms in binary64, from F = max(half an ulp, (m! η / |f⁽ᵐ⁾|)^(1/m)). */
export const problems = {
  sqrtThree: { f: (x) => x * x - 3, df: (x) => 2 * x, root: Math.sqrt(3), attainable: 15.7 },
  cosFixed: {
    f: (x) => Math.cos(x) - x,
    df: (x) => -Math.sin(x) - 1,
    root: 0.7390851332151607,
    attainable: 15.9,
  },
  oldCubic: {
    f: (x) => x * x * x - 2 * x - 5,
    df: (x) => 3 * x * x - 2,
    root: 2.0945514815423265,
    attainable: 15.7,
  },
  steep: { f: (x) => x ** 20 - 2, df: (x) => 20 * x ** 19, root: 2 ** (1 / 20), attainable: 16 },
  triple: { f: (x) => (x - 1.1) ** 3, df: (x) => 3 * (x - 1.1) ** 2, root: 1.1, attainable: 15.7 },
  /** Written out, so that rounding hides the root: η is about 4 ulps of 3, m = 3. */
  cubicOut: {
    f: (x) => x * x * x - 3 * x * x + 3 * x - 1,
    df: (x) => 3 * x * x - 6 * x + 3,
    root: 1,
    attainable: 5.2,
  },
  flatShoulder: {
    f: (x) => Math.atan(30 * (x - 0.42)),
    df: (x) => 30 / (1 + (30 * (x - 0.42)) ** 2),
    root: 0.42,
    attainable: 16,
  },
  /** From 0 Newton goes to 1 and back for ever. */
  twoCycle: {
    f: (x) => x * x * x - 2 * x + 2,
    df: (x) => 3 * x * x - 2,
    root: -1.7692923542386314,
    attainable: 15.9,
  },
} satisfies Record<string, Problem>;
