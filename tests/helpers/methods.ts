import type { Jet } from './jets.ts';

/** Small root finders in binary64 whose iterates tests measure. They stop where a step is not finite or is 0. */
export type At = (x: number) => Jet;

const mostSteps = 120;

function iterate(x0: number, step: (x: number) => number): number[] {
  const xs = [x0];
  for (let k = 0; k < mostSteps; k += 1) {
    const x = xs.at(-1) ?? Number.NaN;
    const next = step(x);
    if (!Number.isFinite(next) || next === x) break;
    xs.push(next);
  }
  return xs;
}

export function newton(at: At, x0: number): number[] {
  return iterate(x0, (x) => {
    const { v, d } = at(x);
    return x - v / d;
  });
}

export function halley(at: At, x0: number): number[] {
  return iterate(x0, (x) => {
    const { v, d, e } = at(x);
    return x - (2 * v * d) / (2 * d * d - v * e);
  });
}

/** Ostrowski's two-step method of order 4. */
export function ostrowski(at: At, x0: number): number[] {
  return iterate(x0, (x) => {
    const { v, d } = at(x);
    const y = x - v / d;
    const w = at(y).v;
    return y - ((w / d) * v) / (v - 2 * w);
  });
}

export function steffensen(at: At, x0: number): number[] {
  return iterate(x0, (x) => {
    const { v } = at(x);
    return x - (v * v) / (at(x + v).v - v);
  });
}

export function secant(at: At, x0: number, x1: number): number[] {
  const xs = [x0, x1];
  let [a, b, fa, fb] = [x0, x1, at(x0).v, at(x1).v];
  for (let k = 0; k < mostSteps; k += 1) {
    const c = b - (fb * (b - a)) / (fb - fa);
    if (!Number.isFinite(c) || c === b) break;
    xs.push(c);
    [a, fa, b, fb] = [b, fb, c, at(c).v];
  }
  return xs;
}

export function muller(at: At, x0: number, x1: number, x2: number): number[] {
  const xs = [x0, x1, x2];
  for (let k = 0; k < mostSteps; k += 1) {
    const [a = 0, b = 0, c = 0] = xs.slice(-3);
    const [fa, fb, fc] = [at(a).v, at(b).v, at(c).v];
    const [h1, h2] = [b - a, c - b];
    const [d1, d2] = [(fb - fa) / h1, (fc - fb) / h2];
    const second = (d2 - d1) / (h2 + h1);
    const slope = d2 + h2 * second;
    const root = Math.sqrt(slope * slope - 4 * fc * second);
    const next = c - (2 * fc) / (slope + Math.sign(slope) * root);
    if (!Number.isFinite(next) || next === c) break;
    xs.push(next);
  }
  return xs;
}

export function bisection(at: At, low: number, high: number): number[] {
  const xs: number[] = [];
  let [a, b] = [low, high];
  const sign = Math.sign(at(a).v);
  for (let k = 0; k < mostSteps; k += 1) {
    const middle = a + (b - a) / 2;
    if (middle === a || middle === b) break;
    xs.push(middle);
    const value = at(middle).v;
    if (value === 0) break;
    if (Math.sign(value) === sign) a = middle;
    else b = middle;
  }
  return xs;
}

/**
 * False position with a rule for the ordinate of the end that stays: 1 leaves it (regula falsi), 1/2 is
 * Illinois (Dowell & Jarratt 1971), f_b/(f_b + f_c) Pegasus (Dowell & Jarratt 1972), 1 − f_c/f_b or 1/2
 * Anderson–Björck (1973)..
 */
function falsePosition(
  at: At,
  low: number,
  high: number,
  rule: (fb: number, fc: number) => number,
): number[] {
  const xs: number[] = [];
  // b is the newest point, a the end that stays while its sign differs.
  let [a, fa, b, fb] = [low, at(low).v, high, at(high).v];
  for (let k = 0; k < mostSteps; k += 1) {
    const c = b - (fb * (b - a)) / (fb - fa);
    if (!Number.isFinite(c) || c === b || c === a) break;
    xs.push(c);
    const fc = at(c).v;
    if (fc === 0) break;
    if (Math.sign(fc) !== Math.sign(fb)) [a, fa] = [b, fb];
    else fa *= rule(fb, fc);
    [b, fb] = [c, fc];
  }
  return xs;
}

export const regulaFalsi = (at: At, a: number, b: number) => falsePosition(at, a, b, () => 1);
export const illinois = (at: At, a: number, b: number) => falsePosition(at, a, b, () => 0.5);
export const pegasus = (at: At, a: number, b: number) => falsePosition(at, a, b, (fb, fc) => fb / (fb + fc));
export const andersonBjorck = (at: At, a: number, b: number) => {
  return falsePosition(at, a, b, (fb, fc) => (fc / fb < 1 ? 1 - fc / fb : 0.5));
};

/** Ridders 1979: false position on f times an exponential that makes the middle fit. */
export function ridders(at: At, low: number, high: number): number[] {
  const xs: number[] = [];
  let [a, fa, b, fb] = [low, at(low).v, high, at(high).v];
  for (let k = 0; k < mostSteps; k += 1) {
    const m = a + (b - a) / 2;
    const fm = at(m).v;
    const x = m + ((m - a) * Math.sign(fa - fb) * fm) / Math.sqrt(fm * fm - fa * fb);
    if (!Number.isFinite(x) || x === xs.at(-1)) break;
    xs.push(x);
    const fx = at(x).v;
    if (fx === 0) break;
    if (Math.sign(fm) !== Math.sign(fx)) {
      [a, fa] = [m, fm];
      [b, fb] = [x, fx];
    } else if (Math.sign(fa) !== Math.sign(fx)) [b, fb] = [x, fx];
    else [a, fa] = [x, fx];
  }
  return xs;
}
