import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { measureFolder } from '../../server/cli/measure-folder.ts';
import type { MeasurementFile } from '../../shared/schemas/measurement.ts';
import { pathFromFile } from '../../shared/schemas/path.ts';
import { createLarkroots, type Larkroots, suiteOf } from '../helpers/larkroots.ts';

// Classic iterates of Newton's method, verified by exact rational arithmetic; attributions from memory.
const suite = suiteOf(`
  - id: sqrt-2
    equation: x^2 - 2
    starts: [[1]]
    roots: [{ value: 1.41421356237309504880168872420969807856967188 }]
    traits: [smooth]
    source: Heron, from memory
  - id: sqrt-612
    equation: x^2 - 612
    starts: [[10]]
    roots: [{ value: 24.7386337537059632989284591358444621508831954 }]
    traits: [smooth]
    source: common worked example, from memory
  - id: two-cycle
    equation: x^3 - 2*x + 2
    starts: [[0]]
    roots: [{ value: -1.76929235423863141524040946433503349267055605 }]
    traits: [cycle]
    source: common practice
  - id: no-root
    equation: x^2 + 1
    starts: [[1]]
    expectation: none
    traits: [no root]
    source: common practice
  - id: cube-root
    equation: cbrt(x)
    starts: [[1]]
    roots: [{ value: 0 }]
    traits: [endpoint]
    source: common practice
  - id: falling-exponential
    equation: exp(-x)
    starts: [[0]]
    expectation: none
    traits: [no root]
    source: common practice
  - id: atan-within
    equation: atan(x)
    starts: [[1.39], [1.393]]
    roots: [{ value: 0 }]
    traits: [far start]
    source: critical start 1.39174520027073489, common practice
`);

let larkroots: Larkroots;
let file: MeasurementFile;

beforeAll(async () => {
  larkroots = await createLarkroots();
  file = await measureFolder({ folder: await larkroots.checkout('main'), suite, solvers: ['newton'] });
});
afterAll(() => larkroots.remove());

function solveOf(id: string, start = 0) {
  const solve = file.solves.find((one) => one.case === id && one.start === start)!;
  const xs = pathFromFile(solve.path!)
    .events.filter((event) => event.kind === 'step')
    .map((event) => event.x);
  return { solve, xs };
}

describe('newton over the wire', () => {
  it('goes through 3/2, 17/12, 577/408 and 665857/470832 on x² − 2 from 1', () => {
    const exact = [3 / 2, 17 / 12, 577 / 408, 665857 / 470832];
    // Each step is rounded three times, at most 2 ulps off the rational iterate.
    for (const [k, x] of solveOf('sqrt-2').xs.slice(0, 4).entries()) {
      expect(Math.abs(x - exact[k]!)).toBeLessThanOrEqual(2 * 2 ** -52);
    }
  });

  it('goes through 35.6, 26.3955…, 24.7906…, 24.7386882… and 24.7386337… on x² − 612 from 10', () => {
    const published = [35.6, 26.395505617978, 24.790635492455, 24.738688294075, 24.738633753767];
    for (const [k, x] of solveOf('sqrt-612').xs.slice(0, 5).entries()) {
      // The published figures are cut after 12 decimals, not rounded.
      expect(Math.abs(x - published[k]!)).toBeLessThan(1e-12);
    }
  });

  it('goes to and fro between 0 and 1 on x³ − 2x + 2 from 0, and the order estimate says cycle of two', () => {
    const { solve, xs } = solveOf('two-cycle');
    expect(xs.slice(0, 4)).toEqual([1, 0, 1, 0]);
    expect(solve.outcome).toBe('refused');
    expect(solve.order.status).toBe('cycle');
    expect(solve.order.period).toBe(2);
  });

  it('goes from 1 to 0 on x² + 1 and refuses rightly, as the slope there is zero', () => {
    const { solve, xs } = solveOf('no-root');
    expect(xs).toEqual([0]);
    expect(solve.outcome).toBe('refused');
    expect(solve.remarks.map((remark) => remark.code)).toContain('rightly refused');
  });

  it('doubles x and changes its sign at each step on the cube root', () => {
    const { xs } = solveOf('cube-root');
    for (const [k, x] of xs.slice(0, 12).entries()) expect(x / (-2) ** (k + 1)).toBeCloseTo(1, 12);
  });

  it('adds one at each step on exp(−x)', () => {
    for (const [k, x] of solveOf('falling-exponential').xs.slice(0, 20).entries()) {
      expect(x).toBeCloseTo(k + 1, 12);
    }
  });

  it('solves atan from 1.39, below the critical start 1.3917…, and refuses from 1.393, above it', () => {
    expect(solveOf('atan-within', 0).solve.outcome).toBe('solved');
    expect(solveOf('atan-within', 1).solve.outcome).toBe('refused');
  });
});
