import { failed, near, root, small } from './end.mjs';

/** The secant method from two starts: one evaluation a step. */
export function secant(f, x0, x1, tolerance, most, step) {
  let a = x0;
  let b = x1;
  let fa = f(a);
  if (small(fa, tolerance)) return root(a, 0);
  let fb = f(b);
  for (let k = 1; k <= most; k += 1) {
    if (small(fb, tolerance)) return root(b, k - 1);
    if (fa === fb) return failed('flat chord', k - 1);
    const c = b - fb * ((b - a) / (fb - fa));
    if (!Number.isFinite(c)) return failed('left the real line', k);
    step(c);
    a = b;
    fa = fb;
    b = c;
    if (near(a, b, tolerance)) return root(b, k);
    fb = f(b);
  }
  return failed('too many steps', most);
}
