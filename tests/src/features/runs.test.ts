import { describe, expect, it } from 'vitest';
import { plainText } from '../../../src/components/ui/rich-text.tsx';
import { countPlanned } from '../../../src/features/runs/planned-solves.ts';
import { tallyStrokes, thinOut } from '../../../src/features/runs/run-progress.tsx';
import { countOutcomes, runSentence } from '../../../src/features/runs/run-sentence.ts';
import { buildMatrix, filterMatrix, outcomeWord } from '../../../src/features/runs/solve-matrix.ts';
import { pitchFor, solversThatFit } from '../../../src/features/runs/solve-table.tsx';
import { newestRuns, suitesByUse } from '../../../src/routes/library/newest-runs.ts';
import { rightRefusal, someCase, someRun, someSolve, someSolver } from './builders.ts';

describe('sentence of a run', () => {
  it('leads with the gravest failure and says how many more there are', () => {
    const solves = [
      someSolve({ outcome: 'refused', case: 'flat' }),
      someSolve({ outcome: 'false claim', solver: 'hybrid', case: 'pole' }),
      someSolve(),
    ];
    expect(plainText(runSentence(someRun(), solves))).toBe(
      'hybrid claims a root that is none on pole, and 1 more is not solved; 1 of 3 is.',
    );
  });

  it('counts a right refusal as a success and what does not apply not at all', () => {
    const solves = [
      someSolve(),
      someSolve(rightRefusal),
      someSolve({ outcome: 'not applicable', evaluations: 0 }),
    ];
    expect(countOutcomes(solves)).toMatchObject({ total: 2, success: 2, rightly: 1 });
    expect(plainText(runSentence(someRun(), solves))).toBe(
      'All 2 solves are solved or rightly refused, in 16 evaluations.',
    );
  });

  it('says what has come of the solves while the run goes on', () => {
    const run = someRun({ status: 'running', phase: 'measuring' });
    const solves = [someSolve(), someSolve(rightRefusal), someSolve({ outcome: 'refused' })];
    expect(plainText(runSentence(run, solves))).toBe(
      '4 of 4 solves done: 1 solved, 1 rightly refused, 1 refused.',
    );
  });

  it('says that nothing was run where no solver takes what the suite gives', () => {
    expect(plainText(runSentence(someRun(), [someSolve({ outcome: 'not applicable' })]))).toContain(
      'nothing was run',
    );
  });
});

describe('progress tallies', () => {
  it('show failures where they happened, then the one at work, then those that wait', () => {
    const solves = [someSolve(), someSolve({ outcome: 'crashed' })];
    expect(tallyStrokes(solves, 5, true)).toEqual(['done', 'failed', 'now', 'waiting', 'waiting']);
    expect(tallyStrokes(solves, 5, false)).toEqual(['done', 'failed', 'waiting', 'waiting', 'waiting']);
  });

  it('never hide a failure where a stroke stands for several solves', () => {
    expect(thinOut(['done', 'done', 'done', 'failed', 'done', 'waiting'], 3)).toEqual(['done', 'failed']);
  });
});

describe('countPlanned', () => {
  it('is one for a bracket, one for each start list that is long enough', () => {
    const suiteCase = someCase({ bracket: null, starts: [['1', '2'], ['3', '4'], ['5']] });
    expect(countPlanned(someSolver({ takes: 'bracket', starts: 0 }), suiteCase)).toBe(1);
    expect(countPlanned(someSolver({ starts: 1 }), suiteCase)).toBe(3);
    expect(countPlanned(someSolver({ starts: 2 }), suiteCase)).toBe(3);
  });

  it('gives the ends of the bracket once for all lists that are too short', () => {
    const suiteCase = someCase({ starts: [['1'], ['2'], ['3', '4']] });
    expect(countPlanned(someSolver({ starts: 2 }), suiteCase)).toBe(2);
  });
});

describe('table of a run', () => {
  const cases = [
    someCase({ id: 'b', traits: ['pole'] }),
    someCase({ id: 'a', equation: 'cos(x) - x', traits: ['transcendental'] }),
  ];
  const solves = [
    someSolve({ case: 'a', start: 1 }),
    someSolve({ case: 'a', start: 0 }),
    someSolve({ case: 'a', solver: 'bisection', start: null, outcome: 'crashed' }),
    someSolve({ case: 'b', ...rightRefusal }),
  ];
  const rows = buildMatrix(cases, solves);
  const filter = { text: '', trait: '', outcomes: [], solvers: ['secant', 'bisection'] };

  it('has the cases in the suite’s order and a row for each start', () => {
    expect(rows.map((row) => [row.caseId, row.part])).toEqual([
      ['b', 0],
      ['a', 0],
      ['a', 1],
    ]);
    expect(rows[1]?.solves.get('secant')?.start).toBe(0);
    expect(rows[1]?.solves.get('bisection')?.outcome).toBe('crashed');
    expect(rows[2]?.solves.has('bisection')).toBe(false);
  });

  it('keeps a case that the suite does not have any more', () => {
    expect(buildMatrix([], [someSolve({ case: 'old' })]).map((row) => row.caseId)).toEqual(['old']);
  });

  it('is narrowed by every word of the text, in name, equation or trait', () => {
    expect(filterMatrix(rows, { ...filter, text: 'cos trans' })).toHaveLength(2);
    expect(filterMatrix(rows, { ...filter, text: 'cos pole' })).toHaveLength(0);
    expect(filterMatrix(rows, { ...filter, trait: 'pole' })).toHaveLength(1);
  });

  it('is narrowed by outcome among the solvers shown, a right refusal being one of its own', () => {
    expect(filterMatrix(rows, { ...filter, outcomes: ['rightly refused'] }).map((row) => row.caseId)).toEqual(
      ['b'],
    );
    expect(filterMatrix(rows, { ...filter, outcomes: ['refused'] })).toEqual([]);
    expect(filterMatrix(rows, { ...filter, outcomes: ['crashed'], solvers: ['secant'] })).toEqual([]);
    expect(outcomeWord(someSolve(rightRefusal))).toBe('rightly refused');
  });

  it('lets the pitch fall to 8 and 7 px where columns are many, and takes 10 where rows are stacked', () => {
    expect([5, 6, 8].map((columns) => pitchFor(1200, columns))).toEqual([10, 8, 7]);
    expect(pitchFor(350, 6)).toBe(10);
    expect(solversThatFit(1160)).toBe(6);
  });
});

describe('newestRuns', () => {
  it('takes the first finished run of each build on the suite', () => {
    const at = (id: number, build: number, rest = {}) =>
      someRun({ id, build: { id: build, label: 'x', commit: null }, ...rest });
    const runs = [
      at(5, 1, { status: 'running' }),
      at(4, 1),
      at(3, 1),
      at(2, 2, { suite: { slug: 'brackets', title: '', revision: 1, hash: '' } }),
    ];
    expect([...newestRuns(runs, 'traps')].map(([build, run]) => [build, run.id])).toEqual([[1, 4]]);
  });
});

describe('suitesByUse', () => {
  it('has the suite with the most builds first, of equals the one run last', () => {
    const on = (slug: string, build: number) =>
      someRun({
        suite: { slug, title: '', revision: 1, hash: '' },
        build: { id: build, label: 'x', commit: null },
      });
    const runs = [on('brackets', 3), on('traps', 2), on('traps', 1), on('starts', 1)];
    expect(suitesByUse(runs)).toEqual(['traps', 'brackets', 'starts']);
  });
});
