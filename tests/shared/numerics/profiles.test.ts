import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  dataProfiles,
  evaluationsUntil,
  type Profile,
  type ProfileCosts,
  performanceProfiles,
  shareAt,
} from '../../../shared/numerics/profiles.ts';

/** Made by hand for these tests: four problems, a failure of A on the last. */
const byHand: ProfileCosts[] = [
  { name: 'A', costs: [10, 8, 20, null] },
  { name: 'B', costs: [5, 8, 30, 12] },
];

const cost = fc.option(fc.integer({ min: 1, max: 1000 }), { nil: null, freq: 5 });
const table = fc
  .tuple(fc.integer({ min: 1, max: 4 }), fc.integer({ min: 1, max: 12 }))
  .chain(([solvers, problems]) =>
    fc.array(fc.array(cost, { minLength: problems, maxLength: problems }), {
      minLength: solvers,
      maxLength: solvers,
    }),
  )
  .map((rows) => rows.map((costs, i): ProfileCosts => ({ name: `s${i}`, costs })));

function scaled(all: readonly ProfileCosts[], factors: readonly number[]): ProfileCosts[] {
  return all.map(({ name, costs }) => ({
    name,
    costs: costs.map((one, p) => (one === null ? null : one * (factors[p] ?? 1))),
  }));
}

function expectStepFunction({ points, solved }: Profile, left: number): void {
  expect(points[0]?.x).toBe(left);
  for (const [i, { x, share }] of points.entries()) {
    const before = points[i - 1];
    if (before !== undefined) {
      expect(x).toBeGreaterThan(before.x);
      expect(share).toBeGreaterThanOrEqual(before.share);
    }
    expect(share).toBeGreaterThanOrEqual(0);
    expect(share).toBeLessThanOrEqual(1);
  }
  expect(points.at(-1)?.share).toBe(solved);
}

describe('performanceProfiles', () => {
  it('has the figures of the example made by hand', () => {
    // Ratios A 2 1 1 –, B 1 1 1.5 1.
    const [a, b] = performanceProfiles(byHand);
    expect(a).toEqual({
      name: 'A',
      points: [
        { x: 1, share: 0.5 },
        { x: 2, share: 0.75 },
      ],
      solved: 0.75,
    });
    expect(b?.points).toEqual([
      { x: 1, share: 0.75 },
      { x: 1.5, share: 1 },
      { x: 2, share: 1 },
    ]);
    expect(b?.solved).toBe(1);
  });

  it('is continuous from the right: a ratio counts from itself on', () => {
    const [a] = performanceProfiles(byHand);
    expect(
      a && [shareAt(a, 0.999), shareAt(a, 1), shareAt(a, 1.999), shareAt(a, 2), shareAt(a, 1e9)],
    ).toEqual([0, 0.5, 0.5, 0.75, 0.75]);
  });

  it('counts a tie for every winner, so that wins can sum to more than all problems', () => {
    const tied = performanceProfiles([
      { name: 'a', costs: [7, 3] },
      { name: 'b', costs: [7, 9] },
    ]);
    expect(tied.map((one) => shareAt(one, 1))).toEqual([1, 0.5]);
  });

  it('keeps a problem that nobody solves in the denominator', () => {
    const [a, b] = performanceProfiles([
      { name: 'a', costs: [4, null, null] },
      { name: 'b', costs: [8, null, 5] },
    ]);
    expect(a).toEqual({
      name: 'a',
      points: [
        { x: 1, share: 1 / 3 },
        { x: 2, share: 1 / 3 },
      ],
      solved: 1 / 3,
    });
    expect(b?.points).toEqual([
      { x: 1, share: 1 / 3 },
      { x: 2, share: 2 / 3 },
    ]);
  });

  it('stays at 0 where a solver fails on every problem', () => {
    expect(performanceProfiles([{ name: 'a', costs: [null, null] }])).toEqual([
      { name: 'a', points: [{ x: 1, share: 0 }], solved: 0 },
    ]);
  });

  it('has no points where there is no problem, and is empty without solvers', () => {
    expect(performanceProfiles([{ name: 'a', costs: [] }])).toEqual([{ name: 'a', points: [], solved: 0 }]);
    expect(performanceProfiles([])).toEqual([]);
  });

  it.each([[0], [-1], [Number.NaN], [Number.POSITIVE_INFINITY]])('refuses a cost of %d', (wrong) => {
    expect(() => performanceProfiles([{ name: 'a', costs: [1, wrong] }])).toThrow(RangeError);
  });

  it('refuses solvers that were not run on the same number of problems', () => {
    const uneven = [
      { name: 'a', costs: [1] },
      { name: 'b', costs: [1, 2] },
    ];
    expect(() => performanceProfiles(uneven)).toThrow(RangeError);
    expect(() => dataProfiles(uneven)).toThrow(RangeError);
  });

  it('is a step function within 0 and 1 that never falls, and agrees with its definition everywhere', () => {
    fc.assert(
      fc.property(table, fc.integer({ min: 4, max: 400 }), (all, quarters) => {
        const tau = quarters / 4;
        for (const [s, profile] of performanceProfiles(all).entries()) {
          expectStepFunction(profile, 1);
          const costs = all[s]?.costs ?? [];
          const within = costs.filter((own, p) => {
            const best = Math.min(...all.map((one) => one.costs[p] ?? Number.POSITIVE_INFINITY));
            // Products of integers and quarters: exact.
            return own !== null && own <= tau * best;
          });
          expect(shareAt(profile, tau)).toBe(within.length / costs.length);
        }
      }),
      { seed: 21, numRuns: 200 },
    );
  });

  it('does not change where all costs on one problem are multiplied by a factor', () => {
    const factors = fc.array(fc.integer({ min: 1, max: 1000 }), { minLength: 12, maxLength: 12 });
    fc.assert(
      fc.property(table, factors, (all, by) => {
        expect(performanceProfiles(scaled(all, by))).toEqual(performanceProfiles(all));
      }),
      { seed: 22, numRuns: 200 },
    );
  });

  it('ends at the same right edge for every solver, and someone wins each problem that is solved at all', () => {
    fc.assert(
      fc.property(table, (all) => {
        const profiles = performanceProfiles(all);
        expect(new Set(profiles.map((one) => one.points.at(-1)?.x)).size).toBe(1);
        const problems = all[0]?.costs.length ?? 0;
        const solved = all[0]?.costs.filter((_, p) => all.some((one) => one.costs[p] !== null)).length ?? 0;
        const wins = profiles.reduce((sum, one) => sum + shareAt(one, 1), 0);
        expect(wins).toBeGreaterThanOrEqual(solved / problems - 1e-12);
      }),
      { seed: 23, numRuns: 200 },
    );
  });
});

describe('dataProfiles', () => {
  it('has the figures of the example made by hand', () => {
    // One unknown, so units of 2 evaluations: A 5 4 10 –, B 2.5 4 15 6.
    const [a, b] = dataProfiles(byHand);
    expect(a?.points).toEqual([
      { x: 0, share: 0 },
      { x: 4, share: 0.25 },
      { x: 5, share: 0.5 },
      { x: 10, share: 0.75 },
      { x: 15, share: 0.75 },
    ]);
    expect(b?.points).toEqual([
      { x: 0, share: 0 },
      { x: 2.5, share: 0.25 },
      { x: 4, share: 0.5 },
      { x: 6, share: 0.75 },
      { x: 15, share: 1 },
    ]);
  });

  it('counts in units of n + 1 evaluations, n the unknowns of each problem', () => {
    const [one] = dataProfiles([{ name: 'a', costs: [6, 6] }], [1, 2]);
    expect(one?.points).toEqual([
      { x: 0, share: 0 },
      { x: 2, share: 0.5 },
      { x: 3, share: 1 },
    ]);
    expect(() => dataProfiles([{ name: 'a', costs: [6, 6] }], [1])).toThrow(RangeError);
    expect(() => dataProfiles([{ name: 'a', costs: [6] }], [0])).toThrow(RangeError);
    expect(() => dataProfiles([{ name: 'a', costs: [6] }], [1.5])).toThrow(RangeError);
  });

  it('is a step function within 0 and 1 that never falls', () => {
    fc.assert(
      fc.property(table, (all) => {
        for (const profile of dataProfiles(all)) expectStepFunction(profile, 0);
      }),
      { seed: 24, numRuns: 200 },
    );
  });

  it('has the same shares of one solver whatever else is drawn', () => {
    fc.assert(
      fc.property(table, fc.integer({ min: 0, max: 600 }), (all, kappa) => {
        const [first] = all;
        const [together] = dataProfiles(all);
        const [alone] = first === undefined ? [] : dataProfiles([first]);
        expect(together && shareAt(together, kappa)).toBe(alone && shareAt(alone, kappa));
      }),
      { seed: 25, numRuns: 200 },
    );
  });

  it('stretches its axis with the costs and keeps the shares', () => {
    fc.assert(
      fc.property(table, (all) => {
        // A power of two keeps every quotient exact.
        const stretched = dataProfiles(scaled(all, new Array(12).fill(8)));
        const plain = dataProfiles(all).map((one) => ({
          ...one,
          points: one.points.map(({ x, share }) => ({ x: 8 * x, share })),
        }));
        expect(stretched).toEqual(plain);
      }),
      { seed: 26, numRuns: 100 },
    );
  });
});

describe('evaluationsUntil', () => {
  it('counts up to the first evaluation that passes, that one included', () => {
    expect(evaluationsUntil([-2, 1, -0.02, 1e-9], 1e-2)).toBe(3);
    expect(evaluationsUntil([2, 1, 0.5], 1e-2)).toBeNull();
    expect(evaluationsUntil([0, 1], 1e-2)).toBe(1);
    expect(evaluationsUntil([], 1e-2)).toBeNull();
  });

  it('passes nothing that is not finite', () => {
    expect(evaluationsUntil([1, Number.NaN, Number.NEGATIVE_INFINITY, 1e-3], 1e-2)).toBe(4);
    expect(evaluationsUntil([Number.POSITIVE_INFINITY, 1], 1e-2)).toBeNull();
  });

  it.each([[0], [1], [-1], [Number.NaN]])('refuses the tolerance %d', (tau) => {
    expect(() => evaluationsUntil([1], tau)).toThrow(RangeError);
  });
});
