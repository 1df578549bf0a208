import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { alignSequences } from '../../../shared/comparison/align-sequences.ts';
import { alignPaths, firstDifference } from '../../../shared/comparison/first-difference.ts';
import { pathOf } from '../../helpers/path-lines.ts';

describe('firstDifference', () => {
  const base = pathOf(['f', 1, -1], ['step', 2, 1, 3], ['f', 2, 5]);

  it('is null for paths that are the same to the last bit, NaN included', () => {
    expect(firstDifference(base, base)).toBeNull();
    expect(firstDifference(pathOf(['f', Number.NaN]), pathOf(['f', Number.NaN]))).toBeNull();
    expect(firstDifference(pathOf(), pathOf())).toBeNull();
  });

  it.each([
    ['x', pathOf(['f', 1, -1], ['step', 2, 1, 3], ['f', 2.0000000000000004, 5]), 2],
    ['kind', pathOf(['f', 1, -1], ['step', 2, 1, 3], ['df', 2, 5]), 2],
    ['answer', pathOf(['f', 1, -1.5], ['step', 2, 1, 3], ['f', 2, 5]), 0],
    ['bracket', pathOf(['f', 1, -1], ['step', 2, 1, 4], ['f', 2, 5]), 1],
    ['end', pathOf(['f', 1, -1], ['step', 2, 1, 3]), 2],
  ] as const)('finds the first %s that differs', (what, other, index) => {
    expect(firstDifference(base, other)).toMatchObject({ what, index });
    expect(firstDifference(other, base)).toMatchObject({ what, index });
  });

  it('tells −0 from 0', () => {
    expect(firstDifference(pathOf(['f', 0, 1]), pathOf(['f', -0, 1]))?.what).toBe('x');
  });
});

describe('alignPaths', () => {
  it('puts what only one side asked in a row of its own', () => {
    const reference = pathOf(['f', 0, 1], ['f', 3, 1], ['f', 2, 1]);
    const candidate = pathOf(['f', 0, 1], ['f', 3, 1], ['f', 3, 1], ['f', 2, 1], ['f', 2, 1]);
    expect(alignPaths(reference, candidate)).toEqual([
      { a: 0, b: 0, match: 'bits' },
      { a: 1, b: 1, match: 'bits' },
      { a: null, b: 2, match: null },
      { a: 2, b: 3, match: 'bits' },
      { a: null, b: 4, match: null },
    ]);
  });

  it('aligns x’s that differ in their last places, repeats with repeats alone', () => {
    const reference = pathOf(['f', 3, 1], ['f', 0.20935568749721245, 1], ['f', 0.3932617938214271, 1]);
    const candidate = pathOf(
      ['f', 3, 1],
      ['f', 3, 1],
      ['f', 0.20935568749721215, 1],
      ['f', 0.20935568749721215, 1],
      ['f', 0.3932617938214273, 1],
    );
    expect(alignPaths(reference, candidate)).toEqual([
      { a: 0, b: 0, match: 'bits' },
      { a: null, b: 1, match: null },
      { a: 1, b: 2, match: 'near' },
      { a: null, b: 3, match: null },
      { a: 2, b: 4, match: 'near' },
    ]);
  });

  it('does not align different kinds of lines or x’s that are apart', () => {
    expect(alignPaths(pathOf(['f', 1, 1]), pathOf(['df', 1, 1]))).toEqual([
      { a: 0, b: null, match: null },
      { a: null, b: 0, match: null },
    ]);
    expect(alignPaths(pathOf(['f', 1, 1]), pathOf(['f', 1.0001, 1])).map((row) => row.match)).toEqual([
      null,
      null,
    ]);
  });

  it('shows every line of both paths once, in order', () => {
    const lines = fc.array(
      fc.tuple(fc.constantFrom('f' as const, 'df' as const), fc.integer({ min: 0, max: 4 })),
    );
    fc.assert(
      fc.property(lines, lines, (p, q) => {
        const rows = alignPaths(pathOf(...p), pathOf(...q));
        expect(rows.flatMap((row) => row.a ?? [])).toEqual(p.map((_, i) => i));
        expect(rows.flatMap((row) => row.b ?? [])).toEqual(q.map((_, i) => i));
        for (const { a, b, match } of rows) {
          if (match === 'bits') expect(p[a ?? -1]).toEqual(q[b ?? -1]);
        }
      }),
      { seed: 21 },
    );
  });
});

describe('alignSequences', () => {
  /** Length of a longest common subsequence by the textbook table. */
  function longest(a: readonly number[], b: readonly number[]): number {
    let above = new Array<number>(b.length + 1).fill(0);
    for (const p of a) {
      const row = [0];
      for (const [j, q] of b.entries()) {
        row.push(p === q ? (above[j] ?? 0) + 1 : Math.max(above[j + 1] ?? 0, row[j] ?? 0));
      }
      above = row;
    }
    return above.at(-1) ?? 0;
  }

  it('keeps as many elements together as can be kept', () => {
    const items = fc.array(fc.integer({ min: 0, max: 3 }), { maxLength: 30 });
    fc.assert(
      fc.property(items, items, (a, b) => {
        const rows = alignSequences(a, b, (p, q) => p === q);
        const together = rows.filter((row) => row.a !== null && row.b !== null);
        expect(together.length).toBe(longest(a, b));
        for (const row of together) expect(a[row.a ?? -1]).toBe(b[row.b ?? -1]);
      }),
      { seed: 22, numRuns: 300 },
    );
  });

  it('gives sequences that differ nearly everywhere as one and then the other', () => {
    const a = Array.from({ length: 1500 }, (_, i) => i);
    const b = a.map((i) => -1 - i);
    const rows = alignSequences(a, b, (p, q) => p === q);
    expect(rows).toHaveLength(3000);
    expect(rows[0]).toEqual({ a: 0, b: null });
    expect(rows[1500]).toEqual({ a: null, b: 0 });
  });
});
