import { describe, expect, it } from 'vitest';
import { compareRuns } from '../../../shared/comparison/compare.ts';
import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import { allow, order, runOf, solve, solverOf } from '../../helpers/solve-records.ts';

const compare = (was: SolveRecord[], is: SolveRecord[], uses: ('f' | 'df')[] = ['f']) => {
  const solvers = [...new Set(is.map((one) => one.solver))].map((name) => solverOf(name, { uses, order: 2 }));
  return compareRuns(runOf(was, { solvers }), runOf(is, { solvers }), allow());
};

describe('totalsOf', () => {
  it('counts cost over pairs that both solved alone, and says over how many', () => {
    const was = [
      solve('secant', 'a', { evaluations: 100 }),
      solve('secant', 'b', { evaluations: 20 }),
      solve('secant', 'c', { evaluations: 7, outcome: 'refused' }),
    ];
    const is = [
      solve('secant', 'a', { evaluations: 103 }),
      solve('secant', 'b', { evaluations: 2, outcome: 'false claim' }),
      solve('secant', 'c', { evaluations: 9 }),
    ];
    const { totals, overall } = compare(was, is);
    expect(totals[0]).toMatchObject({
      reference: { solved: 2, of: 3 },
      candidate: { solved: 2, of: 3 },
      pairs: 1,
      evaluations: { reference: 100, candidate: 103, percent: 3 },
      changes: { costlier: 1, broke: 1, mended: 1 },
      claim: 2,
      uses: ['f'],
    });
    expect(overall).toMatchObject({ pairs: 1, evaluations: { reference: 100, candidate: 103, percent: 3 } });
  });

  it('counts rightly refused as solved, but not its cost', () => {
    const refusal = solve('secant', 'none', {
      outcome: 'refused',
      remarks: [{ code: 'rightly refused', text: '' }],
    });
    const { totals } = compare([refusal], [refusal]);
    expect(totals[0]).toMatchObject({
      candidate: { solved: 1, of: 1 },
      pairs: 0,
      evaluations: { reference: 0, candidate: 0, percent: null },
    });
  });

  it('weighs a case once whatever its starts, and a family once whatever its cases', () => {
    const side = (factor: number) => [
      solve('secant', 'lone', { evaluations: 10 * factor }),
      ...[0, 1, 2].map((i) => solve('secant', `kin/${i}`, { evaluations: 10 })),
      solve('secant', 'kin/3', { evaluations: 10, start: 0 }),
      solve('secant', 'kin/3', { evaluations: 30, start: 1 }),
    ];
    const [totals] = compare(side(1), side(2)).totals;
    // Sum: 80 → 90. Cases: lone +100 %, four others 0: mean 20 %. Families: +100 % and 0: mean 50 %.
    expect(totals?.evaluations).toEqual({ reference: 80, candidate: 90, percent: 12.5 });
    expect(totals?.perCase).toEqual({ reference: 12, candidate: 14, percent: 20 });
    expect(totals?.perFamily).toEqual({ reference: 11.25, candidate: 16.25, percent: 50 });
  });

  it('gives the share of solves with a finding on both sides', () => {
    const was = [solve('secant', 'a', { queryCheck: { repeated: 1 } }), solve('secant', 'b')];
    const is = [
      solve('secant', 'a', { queryCheck: { repeated: 4, late: 1 } }),
      solve('secant', 'b', { queryCheck: { repeated: 2 } }),
    ];
    const [totals] = compare(was, is).totals;
    expect(totals?.findings.repeated).toEqual({
      reference: { solves: 1, of: 2, evaluations: 1 },
      candidate: { solves: 2, of: 2, evaluations: 6 },
    });
    expect(totals?.findings.late.candidate).toEqual({ solves: 1, of: 2, evaluations: 1 });
  });

  it('gives the median of the orders that may be shown', () => {
    const is = [
      solve('secant', 'a', { order: order(1.6) }),
      solve('secant', 'b', { order: order(1.64) }),
      solve('secant', 'c', { order: { ...order(3), status: 'one ratio' } }),
      solve('secant', 'd'),
    ];
    const [totals] = compare(is, is).totals;
    expect(totals?.order.candidate).toEqual({ median: 1.62, count: 2 });
    expect(compare([solve('x', 'a')], [solve('x', 'a')]).totals[0]?.order.candidate).toEqual({
      median: null,
      count: 0,
    });
  });
});

describe('compareRuns', () => {
  it('does not slow down with the square of the number of pairs', () => {
    // 20 solvers on 200 cases; the work is counted in reads of a record, not in time.
    let reads = 0;
    const counting = (record: SolveRecord): SolveRecord => {
      return new Proxy(record, {
        get(target, key, receiver) {
          reads += 1;
          return Reflect.get(target, key, receiver);
        },
      });
    };
    const solves = (evaluations: number) => {
      return Array.from({ length: 4_000 }, (_, i) => {
        return counting(solve(`s${i % 20}`, `c${Math.floor(i / 20)}`, { evaluations }));
      });
    };
    const [was, is] = [runOf(solves(10)), runOf(solves(11))];
    reads = 0;
    const compared = compareRuns(was, is, allow());
    expect(compared.pairs).toHaveLength(4_000);
    expect(compared.changes).toEqual({ costlier: 4_000 });
    expect(reads).toBeLessThan(4_000 * 150);
  });
});
