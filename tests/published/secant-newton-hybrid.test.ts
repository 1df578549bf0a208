import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { measureFolder } from '../../server/cli/measure-folder.ts';
import { rootReference, signedError } from '../../shared/numerics/root-reference.ts';
import type { MeasurementFile } from '../../shared/schemas/measurement.ts';
import { type PathEvent, pathFromFile } from '../../shared/schemas/path.ts';
import { createLarkroots, type Larkroots, suiteOf } from '../helpers/larkroots.ts';

// Common practice, no source: on x² − 3 from 1.65 and 1.7 the secant's errors are about 3e-2 (1.7 itself), then of
// the magnitudes 1e-4, 1e-6, 1e-9 and 1e-15, each exponent about 1.6 times the one before; Newton does the same
// with two evaluations a step and about one step less; five or six bisections and then three or four secant steps
// make a sound hybrid.
const suite = suiteOf(`
  - id: sqrt-3
    equation: x^2 - 3
    bracket: [1, 2]
    starts: [[1.65, 1.7], [1.7]]
    roots: [{ value: 1.73205080756887729352744634150587236694280525 }]
    traits: [smooth]
    source: common practice
`);
const root = rootReference(suite.cases[0]!.roots[0]!.value);

let larkroots: Larkroots;
let file: MeasurementFile;

beforeAll(async () => {
  larkroots = await createLarkroots();
  file = await measureFolder({ folder: await larkroots.checkout('main'), suite });
});
afterAll(() => larkroots.remove());

function solveOf(solver: string, start: number | null) {
  const solve = file.solves.find((one) => one.solver === solver && one.start === start)!;
  return { solve, events: pathFromFile(solve.path!).events };
}

function stepErrors(events: readonly PathEvent[]): number[] {
  return events.filter((event) => event.kind === 'step').map((event) => Math.abs(signedError(event.x, root)));
}

/** −log10 of an error, rounded: its magnitude. */
const magnitude = (error: number): number => Math.round(-Math.log10(error));

describe('secant on x² − 3 from 1.65 and 1.7', () => {
  it('has an error of 3e-2 at its second start, then magnitudes 4, 6, 9 (±1) and the last within an ulp', () => {
    const { events } = solveOf('secant', 0);
    expect(Math.abs(signedError(1.7, root))).toBeCloseTo(3.2e-2, 3);
    const [first, second, third, fourth] = stepErrors(events);
    expect(Math.abs(magnitude(first!) - 4)).toBeLessThanOrEqual(1);
    expect(Math.abs(magnitude(second!) - 6)).toBeLessThanOrEqual(1);
    expect(Math.abs(magnitude(third!) - 9)).toBeLessThanOrEqual(1);
    expect(fourth!).toBeLessThan(1e-14);
  });

  it('multiplies the exponent of its error by about 1.6 in each step', () => {
    const exponents = stepErrors(solveOf('secant', 0).events)
      .slice(0, 3)
      .map((error) => -Math.log10(error));
    expect(exponents[1]! / exponents[0]!).toBeGreaterThan(1.4);
    expect(exponents[1]! / exponents[0]!).toBeLessThan(1.8);
    expect(exponents[2]! / exponents[1]!).toBeGreaterThan(1.4);
    expect(exponents[2]! / exponents[1]!).toBeLessThan(1.8);
  });

  it('asks for f once a step and never twice at one x', () => {
    const { solve, events } = solveOf('secant', 0);
    const steps = events.filter((event) => event.kind === 'step').length;
    // Two starts, then one evaluation a step; the last step is not evaluated.
    expect(solve.f).toBe(steps + 1);
    expect(solve.queryCheck.repeated).toBe(0);
  });
});

describe('newton on x² − 3 from 1.7', () => {
  it('takes about one step less than the secant, at two evaluations a step', () => {
    const secant = solveOf('secant', 0);
    const newton = solveOf('newton', 1);
    // Within 1e-14, the magnitude at which both have arrived.
    const steps = (events: readonly PathEvent[]): number =>
      stepErrors(events).findIndex((error) => error < 1e-14) + 1;
    expect(steps(secant.events) - steps(newton.events)).toBe(1);
    expect(newton.solve.f).toBe(newton.solve.df);
    expect(newton.solve.outcome).toBe('solved');
  });
});

describe('hybrid on x² − 3 in [1, 2]', () => {
  it('makes five bisections, then reaches the root in three or four secant steps', () => {
    const { solve, events } = solveOf('hybrid', null);
    const errors = stepErrors(events);
    // The first five steps are the midpoints of the bracket: odd multiples of a power of 1/2.
    const xs = events.filter((event) => event.kind === 'step').map((event) => event.x);
    expect(xs.slice(0, 5)).toEqual([1.5, 1.75, 1.625, 1.6875, 1.71875]);
    const reached = errors.slice(5).findIndex((error) => error < 1e-15) + 1;
    expect(reached).toBeGreaterThanOrEqual(3);
    expect(reached).toBeLessThanOrEqual(4);
    expect(solve.outcome).toBe('solved');
  });
});
