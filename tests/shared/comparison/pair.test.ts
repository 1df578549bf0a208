import { describe, expect, it } from 'vitest';
import { compareRuns } from '../../../shared/comparison/compare.ts';
import { matchNames } from '../../../shared/comparison/pair.ts';
import { allow, caseOf, runOf, solve, solverOf } from '../../helpers/solve-records.ts';

const changesIn = (comparison: ReturnType<typeof compareRuns>) => {
  return comparison.pairs.map(({ solver, case: id, start, change }) => [solver, id, start, change]);
};

describe('matchSolves', () => {
  it('pairs by solver, case and start, and lists by solver, case and start of the candidate', () => {
    const ids = [
      ['newton', 'b', 1],
      ['newton', 'b', 0],
      ['bisection', 'a', null],
    ] as const;
    const solves = ids.map(([solver, id, start]) => solve(solver, id, { start }));
    const run = runOf(solves, { solvers: [solverOf('bisection'), solverOf('newton')] });
    expect(changesIn(compareRuns(run, run, allow()))).toEqual([
      ['bisection', 'a', null, 'same'],
      ['newton', 'b', 0, 'same'],
      ['newton', 'b', 1, 'same'],
    ]);
  });

  it('pairs a renamed solver with its earlier name', () => {
    const before = runOf([solve('secant_v1', 'a')]);
    const after = runOf([solve('secant', 'a', { evaluations: 12 })], {
      solvers: [solverOf('secant', { aliases: ['secant_v0', 'secant_v1'] })],
    });
    const { pairs, totals } = compareRuns(before, after, allow());
    expect(pairs).toHaveLength(1);
    expect(pairs[0]).toMatchObject({ solver: 'secant', formerly: 'secant_v1', change: 'costlier' });
    expect(totals[0]).toMatchObject({ solver: 'secant', formerly: 'secant_v1', presence: 'both' });
    const back = compareRuns(after, before, allow());
    expect(back.pairs[0]).toMatchObject({ solver: 'secant_v1', formerly: 'secant', change: 'cheaper' });
  });

  it('pairs by the own name before an alias, and never two solvers with one', () => {
    const names = matchNames(
      [solverOf('a'), solverOf('b')],
      [solverOf('c', { aliases: ['a', 'b'] }), solverOf('a'), solverOf('d', { aliases: ['b'] })],
    );
    expect([...names.before]).toEqual([
      ['a', 'a'],
      ['c', 'b'],
    ]);
  });

  it('sets aside a case that has changed, and compares the others', () => {
    const before = runOf([solve('secant', 'a'), solve('secant', 'b')]);
    const after = runOf([solve('secant', 'a', { evaluations: 99 }), solve('secant', 'b')], {
      cases: [caseOf('a', { hash: 'another' }), caseOf('b')],
    });
    const compared = compareRuns(before, after, allow());
    expect(changesIn(compared)).toEqual([['secant', 'b', null, 'same']]);
    expect(compared.notCompared).toEqual([
      { solver: 'secant', case: 'a', start: null, reason: 'case changed' },
    ]);
    expect(compared.verdict).toBe('within allowances');
    expect(compared.reasons).toEqual([
      'One case has changed in the suite since the reference and is not compared.',
    ]);
  });

  it('sets aside what applies in neither run, and calls the rest new or gone', () => {
    const no = { outcome: 'not applicable' } as const;
    const compared = compareRuns(
      runOf([solve('secant', 'a', no), solve('secant', 'b', no), solve('secant', 'c')]),
      runOf([solve('secant', 'a', no), solve('secant', 'b'), solve('secant', 'c', no)]),
      allow(),
    );
    expect(compared.notApplicable).toHaveLength(1);
    expect(changesIn(compared)).toEqual([
      ['secant', 'b', null, 'new'],
      ['secant', 'c', null, 'gone'],
    ]);
  });

  it('calls solvers and cases of one side new and gone', () => {
    const compared = compareRuns(
      runOf([solve('old', 'a'), solve('both', 'a'), solve('both', 'was')]),
      runOf([solve('both', 'a'), solve('both', 'is'), solve('fresh', 'a')]),
      allow(),
    );
    expect(changesIn(compared)).toEqual([
      ['both', 'a', null, 'same'],
      ['both', 'is', null, 'new'],
      ['both', 'was', null, 'gone'],
      ['fresh', 'a', null, 'new'],
      ['old', 'a', null, 'gone'],
    ]);
    expect(compared.totals.map((one) => [one.solver, one.presence])).toEqual([
      ['both', 'both'],
      ['fresh', 'new'],
      ['old', 'gone'],
    ]);
    expect(compared.verdict).toBe('within allowances');
  });

  it('does not call gone what the candidate has just not run, and cannot tell then', () => {
    const before = runOf([solve('secant', 'a'), solve('secant', 'b')]);
    const after = runOf([solve('secant', 'a')], { cases: before.cases });
    const compared = compareRuns(before, after, allow());
    expect(compared.notCompared).toEqual([{ solver: 'secant', case: 'b', start: null, reason: 'not run' }]);
    expect(compared.verdict).toBe('could not tell');
    expect(compared.reasons).toEqual(['The candidate has no result for one solve that the reference has.']);
  });

  it('is beyond allowances in spite of missing results where a breach is known', () => {
    const before = runOf([solve('secant', 'a'), solve('secant', 'b')]);
    const after = runOf([solve('secant', 'a', { outcome: 'crashed' })], { cases: before.cases });
    expect(compareRuns(before, after, allow()).verdict).toBe('beyond allowances');
  });

  it('calls solves gone of a solver that takes something else now', () => {
    const before = runOf([solve('secant', 'a')]);
    const after = runOf([solve('secant', 'a', { start: 0 })], {
      solvers: [solverOf('secant', { takes: 'start', starts: 2 })],
    });
    expect(changesIn(compareRuns(before, after, allow()))).toEqual([
      ['secant', 'a', null, 'gone'],
      ['secant', 'a', 0, 'new'],
    ]);
  });
});
