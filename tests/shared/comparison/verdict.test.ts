import { describe, expect, it } from 'vitest';
import { compareRuns } from '../../../shared/comparison/compare.ts';
import { effectiveLimit } from '../../../shared/comparison/verdict.ts';
import type { AllowanceSet } from '../../../shared/schemas/allowances.ts';
import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../../shared/schemas/solver.ts';
import { allow, caseOf, order, runOf, solve, solverOf } from '../../helpers/solve-records.ts';

type Fields = Parameters<typeof solve>[2];

interface Row {
  solver?: string;
  case?: string;
  was?: Fields;
  is?: Fields;
}

const loose = { totalPercent: null, caseEvaluations: null };

function compare(
  rows: Row[],
  set: AllowanceSet,
  traits: Record<string, string[]> = {},
  solvers?: SolverDeclaration[],
) {
  const side = (fields: (row: Row) => Fields): SolveRecord[] => {
    return rows.map((row, i) => solve(row.solver ?? 'secant', row.case ?? `case ${i}`, fields(row)));
  };
  const [reference, candidate] = [runOf(side((row) => row.was)), runOf(side((row) => row.is))];
  const cases = candidate.cases.map(({ id }) => caseOf(id, { traits: traits[id] ?? [] }));
  const own = solvers === undefined ? {} : { solvers };
  return compareRuns({ ...reference, cases, ...own }, { ...candidate, cases, ...own }, set);
}

const broken: Row = { is: { outcome: 'refused' } };
const moved: Row = { was: { pathHash: 'a' }, is: { nearest: 1, pathHash: 'b' } };
const unsteady: Row = { is: { steady: false } };

describe('breachesOf', () => {
  it.each([
    ['broke', broken],
    ['rootMoved', moved],
    ['unsteady', unsteady],
  ] as const)('lets as many pairs be %s as the allowance says, and one more is beyond', (name, row) => {
    expect(compare([row, {}], allow()).breaches).toMatchObject([{ allowance: name, limit: 0, figure: 1 }]);
    expect(compare([row, {}], allow({ [name]: 1 })).breaches).toEqual([]);
    const beyond = compare([row, row, {}], allow({ [name]: 1 }));
    expect(beyond.breaches).toMatchObject([{ allowance: name, limit: 1, figure: 2 }]);
    expect(beyond.breaches[0]?.pairs).toHaveLength(2);
    expect(beyond.verdict).toBe('beyond allowances');
    const free = compare([row, row], allow({ [name]: null }));
    expect(free.breaches).toEqual([]);
    expect(free.verdict).toBe('within allowances');
  });

  it('lets the total of a solver rise by the percentage exactly, and no evaluation more', () => {
    const rows = (more: number): Row[] => [
      { was: { evaluations: 50 }, is: { evaluations: 50 } },
      { was: { evaluations: 100 }, is: { evaluations: 100 + more } },
    ];
    const set = allow({ caseEvaluations: null });
    expect(compare(rows(3), set).breaches).toEqual([]);
    expect(compare(rows(4), set).breaches).toMatchObject([
      { allowance: 'totalPercent', limit: 2, figure: 400 / 150, scope: { solver: 'secant', trait: null } },
    ]);
    expect(compare(rows(400), allow(loose)).breaches).toEqual([]);
  });

  it('counts the total of each solver alone, over pairs that both solved', () => {
    const rows: Row[] = [
      { solver: 'secant', was: { evaluations: 100 }, is: { evaluations: 110 } },
      { solver: 'newton', was: { evaluations: 100 }, is: { evaluations: 90 } },
      { solver: 'newton', was: { evaluations: 10, outcome: 'refused' }, is: { evaluations: 500 } },
    ];
    const compared = compare(rows, allow({ caseEvaluations: null }));
    expect(compared.breaches.map((one) => one.scope.solver)).toEqual(['secant']);
    expect(compared.breaches[0]?.pairs).toHaveLength(1);
  });

  it('lets one case cost the allowance more, and one evaluation beyond that not', () => {
    const set = allow({ totalPercent: null });
    expect(compare([{ is: { evaluations: 12 } }], set).breaches).toEqual([]);
    const beyond = compare([{ is: { evaluations: 13 } }, { is: { evaluations: 15 } }], set);
    expect(beyond.breaches).toMatchObject([{ allowance: 'caseEvaluations', limit: 2, figure: 5 }]);
    expect(beyond.breaches[0]?.pairs).toEqual([beyond.pairs[1]?.key, beyond.pairs[0]?.key]);
  });

  it('lets an order lie under the claim by the allowance exactly', () => {
    const solvers = [solverOf('secant', { order: 2 })];
    const row = (high: number): Row => ({
      was: { order: order(2, 0.01), pathHash: 'a' },
      is: { order: { ...order(high - 0.01, 0.01), high }, pathHash: 'b' },
    });
    expect(compare([row(1.75)], allow({ orderUnder: 0.25 }), {}, solvers).breaches).toEqual([]);
    const beyond = compare([row(1.5)], allow({ orderUnder: 0.25 }), {}, solvers);
    expect(beyond.breaches).toMatchObject([{ allowance: 'orderUnder', limit: 0.25, figure: 0.5 }]);
    expect(compare([row(1.5)], allow({ orderUnder: null }), {}, solvers).breaches).toEqual([]);
  });

  it('measures a lost order against the reference where the solver claims none', () => {
    const row: Row = { was: { order: order(2), pathHash: 'a' }, is: { order: order(1), pathHash: 'b' } };
    const [breach] = compare([row], allow()).breaches;
    expect(breach?.allowance).toBe('orderUnder');
    expect(breach?.figure).toBeCloseTo(0.98, 12);
  });

  it('lets a pair lose the digits allowed exactly, and more not', () => {
    const row = (digits: number): Row => ({
      was: { digits: 12, error: 1e-12, exact: false, pathHash: 'a' },
      is: { digits, error: 10 ** -digits, exact: false, pathHash: 'b' },
    });
    expect(compare([row(11.5)], allow()).breaches).toEqual([]);
    expect(compare([row(11.45)], allow()).breaches).toMatchObject([{ allowance: 'digits', limit: 0.5 }]);
    expect(compare([row(11)], allow({ digits: 1 })).breaches).toEqual([]);
    expect(compare([row(10.9)], allow({ digits: 1 })).breaches).toHaveLength(1);
    expect(compare([row(3)], allow({ digits: null })).breaches).toEqual([]);
  });

  it('takes the pairs of an exception out of the count of the base', () => {
    const set = allow({}, { solvers: { newton: { broke: 1 } }, traits: { flat: { broke: null } } });
    const rows: Row[] = [
      { ...broken, solver: 'newton', case: 'a' },
      { ...broken, solver: 'secant', case: 'b' },
    ];
    expect(compare(rows, set, { b: ['flat'] }).breaches).toEqual([]);
    expect(compare(rows, set).breaches).toMatchObject([
      { allowance: 'broke', limit: 0, figure: 1, scope: { solver: null, trait: null } },
    ]);
    const more = [...rows, { ...broken, solver: 'newton', case: 'c' }];
    expect(compare(more, set, { b: ['flat'] }).breaches).toMatchObject([
      { allowance: 'broke', limit: 1, figure: 2, scope: { solver: 'newton', trait: null } },
    ]);
  });
});

describe('effectiveLimit', () => {
  const set = allow(
    { digits: 0.5 },
    {
      solvers: { newton: { digits: 0.1 } },
      traits: { flat: { digits: 2 }, 'multiple root': { digits: 3 }, free: { digits: null } },
    },
  );
  const limit = (solver: string, traits: string[]) => effectiveLimit(set, 'digits', solver, traits).limit;

  it('takes the solver’s exception before a trait’s, and a trait’s before the base', () => {
    expect(limit('newton', ['flat'])).toBe(0.1);
    expect(limit('secant', ['flat'])).toBe(2);
    expect(limit('secant', [])).toBe(0.5);
  });

  it('takes the most tolerant of several traits', () => {
    expect(limit('secant', ['flat', 'multiple root'])).toBe(3);
    expect(limit('secant', ['multiple root', 'flat'])).toBe(3);
    expect(limit('secant', ['free', 'flat'])).toBeNull();
    expect(limit('secant', ['flat', 'free'])).toBeNull();
  });
});

describe('the verdict', () => {
  it('is within allowances where nothing changed', () => {
    expect(compare([{}], allow())).toMatchObject({ verdict: 'within allowances', breaches: [], reasons: [] });
  });

  it('cannot be told where nothing can be compared, and says why', () => {
    const verdict = (a: SolveRecord[], b: SolveRecord[]) => {
      const { verdict: word, reasons } = compareRuns(runOf(a), runOf(b), allow());
      return [word, reasons.at(-1)];
    };
    const one = [solve('secant', 'a')];
    expect(verdict(one, [])).toEqual(['could not tell', 'The candidate has no results.']);
    expect(verdict([], one)).toEqual(['could not tell', 'The reference has no results.']);
    expect(verdict(one, [solve('secant', 'b')])).toEqual([
      'could not tell',
      'The two runs have no case in common.',
    ]);
    expect(verdict(one, [solve('newton', 'a')])).toEqual([
      'could not tell',
      'The two runs have no solve in common.',
    ]);
    const changed = runOf(one, { cases: [caseOf('a', { hash: 'x' })] });
    expect(compareRuns(runOf(one), changed, allow()).reasons.at(-1)).toBe(
      'No case is the same in both runs.',
    );
  });

  it('is given in different arithmetic, too, with the reason on top', () => {
    const other = runOf([solve('secant', 'a')], { fingerprint: 'node 24' });
    const compared = compareRuns(runOf([solve('secant', 'a')]), other, allow());
    expect(compared).toMatchObject({ verdict: 'within allowances', exact: false });
    expect(compared.reasons[0]).toContain('different arithmetic');
  });
});
