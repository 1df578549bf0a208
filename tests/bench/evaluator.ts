import acos from '@stdlib/math-base-special-acos';
import atan from '@stdlib/math-base-special-atan';
import cos from '@stdlib/math-base-special-cos';
import exp from '@stdlib/math-base-special-exp';
import ln from '@stdlib/math-base-special-ln';
import pow from '@stdlib/math-base-special-pow';
import sin from '@stdlib/math-base-special-sin';
import { compileDouble } from '../../shared/equations/double.ts';
import { interpretDouble } from '../../shared/equations/interpret.ts';
import { parseEquation } from '../../shared/equations/parse-equation.ts';

/** One equation: how long generated code takes, as a multiple of code written by hand. */
export interface EvaluatorRatio {
  equation: string;
  handNs: number;
  generatedNs: number;
  /** generatedNs / handNs; the product promises at most 2. */
  ratio: number;
  /** The same for the closures that pages with a content policy use; no promise. */
  interpretedRatio: number;
}

/** Written by hand with the same functions and the same multiplications, so that the bits agree too. */
const written: [string, (x: number) => number][] = [
  ['x^3 - 2*x - 5', (x) => x * x * x - 2 * x - 5],
  ['cos(x) - x', (x) => cos(x) - x],
  [
    'x*exp(x^2) - sin(x)^2 + 3*cos(x) + 5',
    (x) => {
      const s = sin(x);
      return x * exp(x * x) - s * s + 3 * cos(x) + 5;
    },
  ],
  ['log(x) + sqrt(x) - 5', (x) => ln(x) + Math.sqrt(x) - 5],
  [
    '(x^2 - 1)/(x^2 + 1) + atan(x) - 0.3',
    (x) => {
      const square = x * x;
      return (square - 1) / (square + 1) + atan(x) - 0.3;
    },
  ],
  [
    'x^9 - 9*x^8 + 36*x^7 - 84*x^6 - 1',
    (x) => {
      const two = x * x;
      const four = two * two;
      const eight = four * four;
      const three = two * x;
      return eight * x - 9 * eight + 36 * (three * three * x) - 84 * (three * three) - 1;
    },
  ],
  ['x^2.5 - acos(x/4)', (x) => pow(x, 2.5) - acos(x / 4)],
  ['x < 1.25 ? x^2 - 1 : 2*x - 1.9375', (x) => (x < 1.25 ? x * x - 1 : 2 * x - 1.9375)],
];

const points = Float64Array.from({ length: 1024 }, (_, index) => 1 + index / 2048);

let loops = 0;

/**
 * A loop of its own for each function, told apart by a comment: one loop shared by several would be compiled for
 * the first of them and run slower for all others.
 */
function makeTimer(f: (x: number) => number): (repeats: number) => number {
  const loop: (evaluate: (x: number) => number, at: Float64Array, repeats: number) => number = new Function(
    'evaluate',
    'at',
    'repeats',
    `/* ${loops++} */ let sum = 0; for (let r = 0; r < repeats; r++) for (let i = 0; i < at.length; i++) sum += evaluate(at[i]); return sum;`,
  ).bind(null);
  return (repeats) => {
    const start = performance.now();
    const sum = loop(f, points, repeats);
    const elapsedMs = performance.now() - start;
    if (Number.isNaN(sum)) throw new Error('an equation is not defined on the points');
    return (elapsedMs * 1e6) / (repeats * points.length);
  };
}

const median = (values: number[]) => values.toSorted((a, b) => a - b)[Math.floor(values.length / 2)]!;

/**
 * Times generated and hand-written code in turn, 15 rounds of about a millisecond or more each, and compares the
 * medians. Throws where the two do not return the same bits.
 */
export function benchEvaluator(rounds = 15): EvaluatorRatio[] {
  return written.map(([text, byHand]) => {
    const equation = parseEquation(text);
    const generated = compileDouble(equation).f;
    const interpreted = interpretDouble(equation).f;
    for (const x of points) {
      if (generated(x) !== byHand(x)) throw new Error(`${text} at ${x}: other bits than written by hand`);
    }
    const timers = [byHand, generated, interpreted].map(makeTimer);
    for (const timer of timers) timer(100);
    const times = timers.map((): number[] => []);
    for (let round = 0; round < rounds; round++) {
      for (const [index, timer] of timers.entries()) times[index]!.push(timer(40));
    }
    const [handNs = 0, generatedNs = 0, interpretedNs = 0] = times.map(median);
    return {
      equation: text,
      handNs,
      generatedNs,
      ratio: generatedNs / handNs,
      interpretedRatio: interpretedNs / handNs,
    };
  });
}

if (import.meta.url === `file://${process.argv[1]}`) {
  const rows = benchEvaluator().map((row) => ({
    equation: row.equation,
    'by hand, ns': row.handNs.toFixed(1),
    'generated, ns': row.generatedNs.toFixed(1),
    ratio: row.ratio.toFixed(2),
    'interpreted, ratio': row.interpretedRatio.toFixed(2),
  }));
  console.table(rows);
}
