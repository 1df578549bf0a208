import { failed, near, root, small } from './end.mjs';

const BISECTIONS = 5;

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
  let stalled = false;
  for (let k = 1; k <= most; k += 1) {
    let c = x - fx * ((x - p) / (fx - fp));
    if (k > BISECTIONS && Number.isFinite(c) && near(x, c, tolerance)) return root(c, k - 1);
    const inside = (c - low) * (c - high) < 0;
    const halves = k <= BISECTIONS || !inside || stalled;
    if (halves) c = low + (high - low) / 2;
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
    stalled = !halves && Math.abs(fc) > Math.abs(fx) / 2;
    p = x;
    fp = fx;
    x = c;
    fx = fc;
    if (small(fc, tolerance) || near(p, x, tolerance) || near(low, high, tolerance)) return root(x, k);
  }
  return failed('too many steps', most);
}
