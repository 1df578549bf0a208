import type { CallName } from './arithmetic.ts';
import { doubleFunctions, integerPower } from './double-functions.ts';
import { functionTable } from './functions.ts';
import { BitHash } from './hash-bits.ts';

/** Arguments of each kind per function. */
const argumentCount = 64;

/** Ranges from which arguments are drawn; those outside a function's domain test that it says NaN. */
const ranges: readonly (readonly [number, number])[] = [
  [-1, 1],
  [-8, 8],
  [0.5, 2],
  [-700, 700],
];

const special = [
  0,
  -0,
  1,
  -1,
  0.5,
  2,
  10,
  100,
  1e-8,
  1e-300,
  5e-324,
  1e15,
  1e22,
  1e300,
  Infinity,
  -Infinity,
  NaN,
];

/** Numbers in [0, 1) from the linear congruential generator a = 1664525, c = 1013904223, m = 2^32 (Press and others, Numerical Recipes; from memory). */
function fractions(): () => number {
  let state = 20_250_101;
  return () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    const high = state >>> 5;
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return (high * 2 ** 26 + (state >>> 6)) / 2 ** 53;
  };
}

let known: string | undefined;

/**
 * A hash of the result bits of every function, of pow and of the multiplications of whole powers at some
 * thousands of fixed arguments. Two runs whose fingerprints agree evaluate equations to the same bits as far as
 * those arguments can tell; two that differ must not be compared to the last evaluation.
 *
 * The arguments come from integer arithmetic and correctly rounded operations only, so they are the same
 * everywhere. Computed once; runs in browsers and in Node.
 * @returns 16 hexadecimal digits
 */
export function arithmeticFingerprint(): string {
  known ??= computeFingerprint();
  return known;
}

function computeFingerprint(): string {
  const hash = new BitHash();
  const next = fractions();
  const draw = ([low, high]: readonly [number, number]) => low + (high - low) * next();
  const names = functionTable.map((entry): CallName | 'pow' => entry.name);
  for (const name of names.toSorted()) {
    const evaluate = doubleFunctions[name];
    for (const a of special) {
      for (const b of special) hash.addNumber(evaluate(a, b));
    }
    for (const range of ranges) {
      for (let index = 0; index < argumentCount; index++) hash.addNumber(evaluate(draw(range), draw(range)));
    }
  }
  for (let exponent = 2; exponent <= 64; exponent++) {
    for (const sign of [1, -1]) hash.addNumber(integerPower(draw([0.5, 2]), sign * exponent));
  }
  return hash.digest();
}
