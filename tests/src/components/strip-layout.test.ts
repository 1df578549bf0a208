import { describe, expect, it } from 'vitest';
import type { StripEvent } from '../../../shared/schemas/strips.ts';
import { layOutStrip, rowScale, type StripInput } from '../../../src/components/digit-strip/strip-layout.ts';
import {
  bisection,
  newton,
  problems,
  record,
  secant,
  secantForgetful,
} from '../../../src/routes/specimen/small-solvers.ts';

const f = (digits: number | null, repeatOf: number | null = null): StripEvent => ({
  kind: 'f',
  digits,
  repeatOf,
});
const strip = (events: StripEvent[], rest: Partial<StripInput> = {}): StripInput => ({
  events,
  outcome: 'solved',
  digits: 16,
  attainable: 16,
  exact: false,
  ...rest,
});
const xs = (input: StripInput): number[] => layOutStrip(input).strokes.map((stroke) => stroke.x);

describe('layOutStrip: where things stand', () => {
  it('puts d digits at 22 + 10 d in row size', () => {
    expect(xs(strip([f(1), f(4), f(12.5)]))).toEqual([32, 62, 147]);
  });

  it('puts d digits at x0 + d times the pitch in any other scale', () => {
    const layout = layOutStrip(strip([f(1), f(8)]), { x0: 112, pitch: 60, leftStep: 7 });
    expect(layout.strokes.map((stroke) => stroke.x)).toEqual([172, 592]);
  });

  it('cuts digits to 0 … 16', () => {
    expect(xs(strip([f(17), f(-3)]))).toEqual([182, 22]);
  });

  it('stands strokes without a digit left of 0 in order of asking, the latest at 0', () => {
    expect(xs(strip([f(0), f(null), f(0.01)]))).toEqual([17, 19.5, 22]);
  });

  it('draws at most eight strokes in the left gutter and the earlier ones as one pile', () => {
    const layout = layOutStrip(strip(Array.from({ length: 11 }, () => f(0))));
    expect(layout.strokes).toHaveLength(8);
    expect(layout.strokes.map((stroke) => stroke.x)).toEqual([4.5, 7, 9.5, 12, 14.5, 17, 19.5, 22]);
    expect(layout.pile).toBe(1);
  });

  it('stands the first x that is there at 16 and each later one 2.5 px to its right, five at most', () => {
    const layout = layOutStrip(strip(Array.from({ length: 7 }, () => f(15.97))));
    expect(layout.strokes.map((stroke) => stroke.x)).toEqual([182, 184.5, 187, 189.5, 192]);
    expect(layout.strokes.at(-1)?.events).toEqual([4, 5, 6]);
  });

  it('draws two different x within 1.2 px as one wide stroke, and no further apart', () => {
    const layout = layOutStrip(strip([f(4), f(4.1), f(8), f(8.2)]));
    expect(layout.strokes.map(({ x, isWide }) => [x, isWide])).toEqual([
      [62, true],
      [102, false],
      [104, false],
    ]);
  });
});

describe('layOutStrip: crowding', () => {
  const slow = (count: number, step: number): StripInput =>
    strip(Array.from({ length: count }, (_, index) => f(0.5 + index * step)));

  it('is a tone where more than 16 strokes have a median gap under 2 px, and widens nothing', () => {
    const layout = layOutStrip(slow(40, 0.1));
    expect(layout.isCrowded).toBe(true);
    expect(layout.strokes).toHaveLength(40);
    expect(layout.strokes.some((stroke) => stroke.isWide)).toBe(false);
  });

  it('is no tone with 16 strokes, nor with gaps of 2 px and more', () => {
    expect(layOutStrip(slow(16, 0.1)).isCrowded).toBe(false);
    expect(layOutStrip(slow(40, 0.21)).isCrowded).toBe(false);
  });

  it('is no tone because of a full gutter', () => {
    expect(layOutStrip(strip(Array.from({ length: 100 }, () => f(0)))).isCrowded).toBe(false);
  });
});

describe('layOutStrip: feet and primes', () => {
  it('gives a repeated evaluation no stroke but a foot under the first', () => {
    const layout = layOutStrip(strip([f(2), f(2, 0), f(5)]));
    expect(layout.strokes.map((stroke) => stroke.x)).toEqual([42, 72]);
    expect(layout.feet).toEqual([{ x: 42, events: [1], drawn: 1 }]);
  });

  it('draws two feet at most, however often the x is asked again', () => {
    const layout = layOutStrip(strip([f(2), f(2, 0), f(2, 0), f(2, 2)]));
    expect(layout.feet).toEqual([{ x: 42, events: [1, 2, 3], drawn: 2 }]);
  });

  it('sets a prime above the f at the same x and no stroke of its own', () => {
    const layout = layOutStrip(strip([f(2), { kind: 'df', digits: 2, repeatOf: null }, f(5)]));
    expect(layout.primes).toEqual([{ x: 42, count: 1 }]);
    expect(layout.strokes).toHaveLength(2);
  });

  it('sets two primes where the second derivative was asked as well', () => {
    const layout = layOutStrip(
      strip([f(2), { kind: 'df', digits: 2, repeatOf: null }, { kind: 'd2f', digits: 2, repeatOf: null }]),
    );
    expect(layout.primes).toEqual([{ x: 42, count: 2 }]);
  });

  it('joins f to a derivative that was asked first', () => {
    const layout = layOutStrip(strip([{ kind: 'df', digits: 3, repeatOf: null }, f(3)]));
    expect(layout.primes).toEqual([{ x: 52, count: 1 }]);
    expect(layout.strokes.map((stroke) => stroke.x)).toEqual([52]);
  });

  it('leaves out steps beside evaluations, but draws them where there are only steps', () => {
    const step = (digits: number): StripEvent => ({ kind: 'step', digits, repeatOf: null });
    expect(xs(strip([f(1), step(3), f(5)]))).toEqual([32, 72]);
    expect(xs(strip([step(1), step(3)]))).toEqual([32, 52]);
  });
});

describe('layOutStrip: axis, limit, travel and end', () => {
  it('ends the axis at what can be reached and sets a post only below 15 digits', () => {
    expect(layOutStrip(strip([f(3)], { attainable: 5.2 }))).toMatchObject({ axisEnd: 74, limit: 74 });
    expect(layOutStrip(strip([f(3)], { attainable: 15.7 }))).toMatchObject({ axisEnd: 179, limit: null });
  });

  it('ends a solve in a dot at the digits of its root, and at 16 where it is exact to rounding', () => {
    expect(layOutStrip(strip([f(3)], { digits: 15.2 })).end).toEqual({ kind: 'dot', x: 174 });
    expect(layOutStrip(strip([f(3)], { digits: 15.2, exact: true })).end).toEqual({ kind: 'dot', x: 182 });
  });

  it('puts a ring round another root and an open square at a false claim', () => {
    expect(layOutStrip(strip([f(3)], { outcome: 'other root', digits: 12 })).end).toEqual({
      kind: 'ring',
      x: 142,
    });
    expect(layOutStrip(strip([f(3)], { outcome: 'false claim', digits: 1 })).end).toEqual({
      kind: 'square',
      x: 32,
    });
  });

  it.each(['refused', 'over budget', 'timed out', 'crashed', 'garbled'] as const)(
    'leaves the end open at the last x when the outcome is %s, and stops the travel 3 px short',
    (outcome) => {
      const layout = layOutStrip(strip([f(3), f(7)], { outcome, digits: null }));
      expect(layout.end).toEqual({ kind: 'open', x: 92 });
      expect(layout.travelEnd).toBe(89);
    },
  );

  it('draws no travel where no digit was won', () => {
    expect(layOutStrip(strip([f(0), f(0)], { outcome: 'refused', digits: null })).travelEnd).toBeNull();
  });

  it('has no end where the solver does not take the case', () => {
    expect(layOutStrip(strip([], { outcome: 'not applicable', digits: null })).end).toBeNull();
  });
});

describe('layOutStrip: what measured paths show at a glance', () => {
  it('shows bisection as an even comb', () => {
    const layout = layOutStrip(record(bisection, problems.sqrtThree, [1, 2]));
    expect(layout.isCrowded).toBe(false);
    const sorted = layout.strokes.map((stroke) => stroke.x).toSorted((a, b) => a - b);
    const gaps = sorted.slice(1).map((x, index) => x - (sorted[index] ?? x));
    // One halving is worth log10 2 = 0.301 digits = 3.0 px; single x may lie nearer to the root by chance.
    expect(Math.max(...gaps)).toBeLessThan(16);
    expect(layout.strokes.length).toBeGreaterThan(35);
  });

  it("shows Newton's method as gaps that double, a prime above each", () => {
    const layout = layOutStrip(record(newton, problems.oldCubic, [2]));
    const [, a = 0, b = 0, c = 0] = layout.strokes.map((stroke) => stroke.x - rowScale.x0);
    expect(b / a).toBeGreaterThan(1.8);
    expect(c / b).toBeGreaterThan(1.8);
    expect(layout.primes.length).toBe(layout.strokes.length);
  });

  it('shows a lost stored value as a foot under every stroke but the first and those at the end', () => {
    const kept = layOutStrip(record(secant, problems.cosFixed, [0, 1]));
    const lost = layOutStrip(record(secantForgetful, problems.cosFixed, [0, 1]));
    expect(kept.feet.length).toBeLessThanOrEqual(1);
    expect(lost.feet.length).toBeGreaterThanOrEqual(lost.strokes.length - 2);
  });

  it('shows a triple root as a grey tone that ends open', () => {
    const layout = layOutStrip(record(secant, problems.triple, [0, 2]));
    expect(layout.isCrowded).toBe(true);
    expect(layout.end?.kind).toBe('open');
  });

  it("shows Newton's two-cycle as two strokes in the left gutter with feet under both", () => {
    const layout = layOutStrip(record(newton, problems.twoCycle, [0]));
    expect(layout.strokes.map((stroke) => stroke.x)).toEqual([19.5, 22]);
    expect(layout.feet.map((foot) => foot.drawn)).toEqual([2, 2]);
    expect(layout.end).toMatchObject({ kind: 'open' });
    expect(layout.travelEnd).toBeNull();
  });
});
