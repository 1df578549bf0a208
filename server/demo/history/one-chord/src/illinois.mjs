import { cut } from './chord.mjs';
import { failed, near, root, small } from './end.mjs';

/** False position where the value of the end that stays is halved when it stays twice. */
export function illinois(f, a, b, tolerance, most, step) {
  let fa = f(a);
  if (small(fa, tolerance)) return root(a, 0);
  let fb = f(b);
  if (small(fb, tolerance)) return root(b, 0);
  if (!(Math.sign(fa) * Math.sign(fb) < 0)) return failed('no change of sign', 0);
  let stayed = 0;
  for (let k = 1; k <= most; k += 1) {
    let c = cut(a, fa, b, fb);
    if (c === a || c === b) c = a + (b - a) / 2;
    if (!Number.isFinite(c)) return failed('left the real line', k - 1);
    const fc = f(c);
    if (Number.isNaN(fc)) return failed('f is not defined there', k);
    if (fc < 0 === fb < 0) {
      b = c;
      fb = fc;
      if (stayed === -1) fa /= 2;
      stayed = -1;
    } else {
      a = c;
      fa = fc;
      if (stayed === 1) fb /= 2;
      stayed = 1;
    }
    step(c, Math.min(a, b), Math.max(a, b));
    if (small(fc, tolerance) || near(a, b, tolerance)) return root(c, k);
  }
  return failed('too many steps', most);
}
