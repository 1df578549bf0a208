import { cut } from './chord.mjs';
import { failed, near, root, small } from './end.mjs';

const BISECTIONS = 2;

/** A few bisections for a good start, then secant steps that are kept inside the bracket. */
export function hybrid(f, a, b, tolerance, most, step) {
  let low = a;
  let high = b;
  let fLow = f(low);
  if (small(fLow, tolerance)) return root(low, 0);
  const fHigh = f(high);
  if (small(fHigh, tolerance)) return root(high, 0);
  if (!(Math.sign(fLow) * Math.sign(fHigh) < 0)) return failed('no change of sign', 0);
  let p = low;
  let fp = fLow;
  let x = high;
  let fx = fHigh;
  for (let k = 1; k <= most; k += 1) {
    let c = cut(p, fp, x, fx);
    if (k <= BISECTIONS || !Number.isFinite(c)) c = low + (high - low) / 2;
    if (c === low || c === high) return root(c, k - 1);
    const fc = f(c);
    if (Number.isNaN(fc)) return failed('f is not defined there', k);
    if (fc < 0 === fLow < 0) {
      low = c;
      fLow = fc;
    } else {
      high = c;
    }
    step(c, low, high);
    p = x;
    fp = fx;
    x = c;
    fx = fc;
    if (small(fc, tolerance) || near(p, x, tolerance) || near(low, high, tolerance)) return root(x, k);
  }
  return failed('too many steps', most);
}
