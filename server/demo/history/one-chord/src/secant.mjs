import { chord } from './chord.mjs';
import { failed, near, root } from './end.mjs';

/** The secant method from two starts. */
export function secant(f, x0, x1, tolerance, most, step) {
  let a = x0;
  let b = x1;
  for (let k = 1; k <= most; k += 1) {
    const c = chord(f, a, b);
    if (!Number.isFinite(c)) return failed('flat chord', k - 1);
    step(c);
    a = b;
    b = c;
    if (near(a, b, tolerance)) return root(b, k);
  }
  return failed('too many steps', most);
}
