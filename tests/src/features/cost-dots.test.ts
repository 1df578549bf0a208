import { describe, expect, it } from 'vitest';
import { logAxis } from '../../../src/components/charts/log-axis.ts';
import { doublings } from '../../../src/components/charts/step-plot.tsx';
import { comparablePairs, costDots, countSides } from '../../../src/features/comparisons/cost-dots.ts';
import { somePair, someSolve } from './builders.ts';

const pairOf = (solver: string, before: number, after: number, outcome: 'solved' | 'refused' = 'solved') =>
  somePair({
    solver,
    reference: someSolve({ solver, evaluations: before }),
    candidate: someSolve({ solver, evaluations: after, outcome }),
  });

describe('comparablePairs', () => {
  it('leaves out what one side did not solve or did without asking', () => {
    const pairs = [pairOf('secant', 8, 14), pairOf('secant', 8, 102, 'refused'), pairOf('newton', 4, 0)];
    expect(comparablePairs(pairs, '')).toEqual([pairs[0]]);
    expect(comparablePairs(pairs, 'newton')).toEqual([]);
  });
});

describe('costDots', () => {
  it('makes one dot of pairs with the same two costs and says how many they are', () => {
    const dots = costDots([pairOf('secant', 8, 8), pairOf('newton', 8, 8), pairOf('hybrid', 8, 9)]);
    expect(dots.map(({ x, y, count }) => [x, y, count])).toEqual([
      [8, 8, 2],
      [8, 9, 1],
    ]);
  });

  it('names only what lies well away from the line', () => {
    const dots = costDots([pairOf('secant', 10, 11), pairOf('hybrid', 10, 30), pairOf('brent', 10, 10)]);
    expect(dots.filter((dot) => dot.name !== null).map((dot) => dot.y)).toEqual([30]);
  });
});

describe('countSides', () => {
  it('counts dearer, equal and cheaper pairs, which are all of them', () => {
    const pairs = [pairOf('a', 1, 2), pairOf('a', 2, 2), pairOf('a', 3, 2), pairOf('a', 9, 2)];
    expect(countSides(pairs)).toEqual({ above: 1, on: 1, below: 2 });
  });
});

describe('logAxis', () => {
  it('begins and ends at round numbers around the values', () => {
    const axis = logAxis([7, 130]);
    expect([axis.low, axis.high]).toEqual([5, 200]);
    expect(axis.ticks).toEqual([5, 10, 20, 50, 100, 200]);
    expect([axis.at(5), axis.at(200)]).toEqual([0, 1]);
  });

  it('has some width where all values are one', () => {
    const axis = logAxis([10, 10]);
    expect(axis.high).toBeGreaterThan(axis.low);
    expect(axis.at(10)).toBeGreaterThanOrEqual(0);
  });

  it('writes powers of ten alone over many decades, and needs no value', () => {
    expect(logAxis([1, 90_000]).ticks).toEqual([1, 10, 100, 1000, 10_000, 100_000]);
    expect(logAxis([]).ticks.length).toBeGreaterThan(1);
  });
});

describe('ticks of a profile', () => {
  it('begin at 1 and do not pass the edge', () => {
    for (const edge of [1.3, 2.33, 5, 40]) {
      const ticks = doublings(edge);
      expect(ticks[0]).toBe(1);
      expect(Math.max(...ticks)).toBeLessThanOrEqual(edge);
    }
    expect(doublings(40)).toEqual([1, 2, 4, 8, 16, 32]);
  });
});
