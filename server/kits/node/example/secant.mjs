// A library to try the kit with: the secant method.

/** Finds a zero of f from two starts; null where it does not settle. */
export function secant(f, x0, x1, { relative, maxSteps, onStep = () => {} }) {
  let [a, b] = [x0, x1];
  let [fa, fb] = [f(a), f(b)];
  for (let step = 0; step < maxSteps; step += 1) {
    if (fb === 0) return b;
    const slope = (fb - fa) / (b - a);
    if (!Number.isFinite(slope) || slope === 0) return null;
    const next = b - fb / slope;
    onStep(next);
    if (Math.abs(next - b) <= relative * Math.abs(next)) return next;
    [a, fa] = [b, fb];
    [b, fb] = [next, f(next)];
  }
  return null;
}
