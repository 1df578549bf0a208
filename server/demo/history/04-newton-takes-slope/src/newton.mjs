import { failed, near, root, small } from './end.mjs';

/** Newton's method from one start: f and its slope at every step. */
export function newton(f, df, x0, tolerance, most, step) {
  let x = x0;
  for (let k = 1; k <= most; k += 1) {
    const y = f(x);
    if (small(y, tolerance)) return root(x, k - 1);
    const slope = df(x);
    if (slope === 0) return failed('zero slope', k - 1);
    const next = x - y / slope;
    if (!Number.isFinite(next)) return failed('left the real line', k);
    step(next);
    if (near(x, next, tolerance)) return root(next, k);
    x = next;
  }
  return failed('too many steps', most);
}
