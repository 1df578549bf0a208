import type { StripInput } from '../../components/digit-strip/strip-layout.ts';
import { bisection, newton, problems, record, type SmallSolver, secant } from '../specimen/small-solvers.ts';

/** False position where the value of an end that stays twice is halved. */
const illinois: SmallSolver = (ask, low = 0, high = 1) => {
  let [a, b] = [low, high];
  let [fa, fb] = [ask.f(a), ask.f(b)];
  let stayed = 0;
  for (let step = 0; step < 100; step += 1) {
    const c = b - fb * ((b - a) / (fb - fa));
    if (c === a || c === b) return c;
    const fc = ask.f(c);
    if (fc === 0 || Math.abs(b - a) <= 1e-15 * Math.abs(c)) return c;
    if (fc < 0 === fb < 0) {
      [b, fb] = [c, fc];
      if (stayed === -1) fa /= 2;
      stayed = -1;
    } else {
      [a, fa] = [c, fc];
      if (stayed === 1) fb /= 2;
      stayed = 1;
    }
  }
  return null;
};

/** Secant steps that nothing keeps inside the bracket: from a flat start it leaves and gives up. */
const hybridUnguarded: SmallSolver = (ask, low = 0, high = 1) => {
  let [a, b] = [low, high];
  let [fa, fb] = [ask.f(a), ask.f(b)];
  for (let step = 0; step < 100; step += 1) {
    const c = b - (fb * (b - a)) / (fb - fa);
    if (!Number.isFinite(c)) return null;
    [a, fa, b] = [b, fb, c];
    fb = ask.f(b);
    if (fb === 0 || Math.abs(b - a) <= 1e-15 * Math.abs(b)) return b;
  }
  return null;
};

export interface ShownSolver {
  name: string;
  note?: string;
  strip: StripInput;
}

/** Small solvers, run when the page is opened: what is drawn was measured. */
export function shownSolvers(): ShownSolver[] {
  return [
    { name: 'bisection', strip: record(bisection, problems.sqrtThree, [1, 2]) },
    { name: 'illinois', strip: record(illinois, problems.sqrtThree, [1, 2]) },
    { name: 'secant', strip: record(secant, problems.oldCubic, [2, 3]) },
    { name: 'newton', strip: record(newton, problems.oldCubic, [2]) },
    {
      name: 'hybrid',
      note: 'safeguard lost',
      strip: record(hybridUnguarded, problems.flatShoulder, [-1, 5]),
    },
  ];
}
