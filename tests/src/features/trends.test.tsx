import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { defaultAllowances } from '../../../shared/schemas/allowances.ts';
import { niceTicks, tickText, xRange, yRange } from '../../../src/components/charts/plot-ranges.ts';
import { layOutTrend } from '../../../src/components/charts/trend-layout.ts';
import { TrendLine } from '../../../src/components/charts/trend-line.tsx';
import { trendSeries } from '../../../src/features/libraries/trend.ts';
import { allowanceLines, allowanceSummary } from '../../../src/lib/allowance-words.ts';
import { rightRefusal, someOrder, someSolve } from './builders.ts';

describe('trendSeries', () => {
  const before = [someSolve({ case: 'a', evaluations: 10 }), someSolve({ case: 'b', evaluations: 100 })];
  const after = [
    someSolve({ case: 'a', evaluations: 12 }),
    someSolve({ case: 'b', outcome: 'refused', evaluations: 2 }),
    someSolve({ case: 'c', solver: 'newton', order: someOrder({ value: 2 }) }),
  ];
  const series = trendSeries([
    { label: 'one', solves: before },
    { label: 'two', solves: after },
  ]);

  it('sums evaluations only over what every build shown has solved', () => {
    expect(series[0]).toMatchObject({
      solver: 'secant',
      evaluations: [10, 12],
      over: 1,
      solved: [2, 1],
      of: 2,
    });
  });

  it('leaves a gap where a build does not have the solver', () => {
    expect(series[1]).toMatchObject({
      solver: 'newton',
      evaluations: [null, 8],
      solved: [null, 1],
      order: [null, 2],
    });
  });

  it('counts a right refusal as solved', () => {
    expect(trendSeries([{ label: 'one', solves: [someSolve(rightRefusal)] }])[0]?.solved).toEqual([1]);
  });
});

describe('layOutTrend', () => {
  const shape = { width: 128, height: 52, isMoreBetter: false, format: String };

  it('marks turns for the worse and the better, and writes values where they change', () => {
    const [piece] = layOutTrend([10, 10, 12, 9], shape).pieces;
    expect(piece?.map((point) => point.turn)).toEqual([null, null, 'worse', 'better']);
    expect(piece?.map((point) => point.label)).toEqual(['10', null, '12', '9']);
  });

  it('takes more for better where that is so', () => {
    const [piece] = layOutTrend([10, 12], { ...shape, isMoreBetter: true }).pieces;
    expect(piece?.[1]?.turn).toBe('better');
  });

  it('has equal steps and breaks where a value is missing', () => {
    const { pieces, marks } = layOutTrend([1, null, 2, 3, 4], shape);
    expect(marks).toEqual([14, 39, 64, 89, 114]);
    expect(pieces.map((piece) => piece.length)).toEqual([1, 3]);
  });

  it('does not draw a change of one in a thousand as a cliff', () => {
    const [piece] = layOutTrend([1000, 1001], shape).pieces;
    expect(Math.abs((piece?.[1]?.y ?? 0) - (piece?.[0]?.y ?? 0))).toBeLessThan(1);
  });

  it('is drawn with a text that names every build', () => {
    const drawn = renderToStaticMarkup(
      <TrendLine
        values={[128, null, 216]}
        labels={['a', 'b', 'c']}
        width={128}
        isMoreBetter={false}
        format={String}
      />,
    );
    expect(drawn).toContain('aria-label="a: 128, b: none, c: 216"');
    expect(drawn).toContain('data-turn="worse"');
  });
});

describe('ranges of plots', () => {
  it('hold the bracket, the first x’s and the root, and leave late wild ones out', () => {
    const range = xRange([0, 1], [0, 1, 0.5, 0.4, 0.3, 0.2, 0.1, 0.05, 1e9], [0.5]);
    expect(range.low).toBeCloseTo(-0.04);
    expect(range.high).toBeCloseTo(1.04);
  });

  it('leave a pole out and always hold the axis', () => {
    const values = Array.from({ length: 100 }, (_, index) => 1 + index / 100);
    const range = yRange([...values, 1e30]);
    expect(range.high).toBeLessThan(3);
    expect(range.low).toBeLessThanOrEqual(0);
  });

  it('are ticked at round numbers', () => {
    expect(niceTicks({ low: 0, high: 1 })).toEqual([0, 0.5, 1]);
    expect(niceTicks({ low: -0.11, high: 0.32 })).toEqual([0, 0.2]);
    expect(niceTicks({ low: 1, high: 1 })).toEqual([]);
    expect([-0.5, 1e7, 2e-9].map(tickText)).toEqual(['−0.5', '1e7', '2e−9']);
  });
});

describe('allowances in words', () => {
  it('name every limit, and where there is none', () => {
    expect(allowanceLines(defaultAllowances)).toHaveLength(6);
    expect(allowanceLines(defaultAllowances)[0]).toEqual({ term: 'broke', text: 'none' });
    expect(allowanceLines({ ...defaultAllowances, broke: null })[0]?.text).toBe('no limit');
    expect(allowanceLines({ ...defaultAllowances, broke: 1 })[0]?.text).toBe('at most 1 pair');
  });

  it('fit in one sentence for the margin', () => {
    expect(allowanceSummary(7, defaultAllowances)).toBe(
      'Allowances 7: no broke; evaluations of a solver +2\u202f%; one case +2.',
    );
  });
});
