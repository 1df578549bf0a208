import { describe, expect, it } from 'vitest';
import { compareRuns } from '../../../shared/comparison/compare.ts';
import type { ComparableRun } from '../../../shared/comparison/comparison.ts';
import { plainText } from '../../../shared/comparison/rich-text.ts';
import { describeComparison, describeFailure } from '../../../shared/comparison/sentences.ts';
import type { AllowanceSet } from '../../../shared/schemas/allowances.ts';
import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import { allow, caseOf, order, runOf, solve, solverOf } from '../../helpers/solve-records.ts';

type Fields = Parameters<typeof solve>[2];

const caseNames = [
  'cubic-out',
  'orbit',
  'steep-20',
  'cos-fixed',
  'old-cubic',
  'log-mix',
  'two-cycle',
  'sqrt-three',
  'flat-shoulder',
  'faint-root',
  'triple',
  'no-root',
];

/** Twelve solves of a solver, or the first few. */
function solves(solver: string, fields: (i: number) => Fields = () => ({}), count = 12): SolveRecord[] {
  return caseNames.slice(0, count).map((name, i) => solve(solver, name, fields(i)));
}

function textOf(
  was: SolveRecord[],
  is: SolveRecord[],
  set: AllowanceSet = allow(),
  change: Partial<ComparableRun> = {},
) {
  const { verdict, lead, plain } = describeComparison(compareRuns(runOf(was), runOf(is, change), set));
  return { verdict: plainText(verdict), lead: lead.map(plainText), plain };
}

const others = [...solves('newton'), ...solves('bisection')];
const twice = { evaluations: 17, queryCheck: { repeated: 7 } };

describe('describeComparison where nothing got worse', () => {
  it('says that nothing changed to the last bit', () => {
    expect(textOf(others, others)).toEqual({
      verdict: 'Nothing changed: all 24 solves are the same to the last bit.',
      lead: [],
      plain: 'Nothing changed: all 24 solves are the same to the last bit.',
    });
    expect(textOf(solves('newton', undefined, 1), solves('newton', undefined, 1)).verdict).toBe(
      'Nothing changed: the one solve is the same to the last bit.',
    );
  });

  it('says which solver drifted and that its cost did not', () => {
    const is = [...solves('newton', (i) => (i < 3 ? { pathHash: 'x' } : {})), ...solves('bisection')];
    expect(textOf(others, is).verdict).toBe(
      'newton takes another path in 3 of its 12 solves at the same cost; everything else is the same to the last bit.',
    );
    const all = solves('newton', () => ({ pathHash: 'x' }));
    expect(textOf(solves('newton'), all).verdict).toBe(
      'newton takes another path in all its 12 solves at the same cost.',
    );
    const both = [...all, ...solves('bisection', (i) => (i === 0 ? { pathHash: 'x' } : {}))];
    expect(textOf(others, both).verdict).toBe(
      '2 solvers take another path in 13 of 24 solves at the same cost; everything else is the same to the last bit.',
    );
  });

  it('does not speak of the same cost where it was not compared', () => {
    const refused = (evaluations: number) => {
      return solves('newton', (i) => (i === 0 ? { outcome: 'refused', evaluations } : {}));
    };
    expect(textOf(refused(5), refused(50)).verdict).toBe(
      'newton takes another path in 1 of its 12 solves, at the same cost where it is compared; everything else is the same to the last bit.',
    );
  });

  it('names what got better, gravest first', () => {
    const was = [...solves('secant', (i) => (i < 2 ? { outcome: 'refused' } : {})), ...solves('newton')];
    const is = [...solves('secant'), ...solves('newton', (i) => (i === 4 ? { evaluations: 8 } : {}))];
    const { verdict, lead } = textOf(was, is);
    expect(verdict).toBe(
      'secant now solves cubic-out and orbit, where the reference does not, and newton is cheaper on old-cubic (10\u202f→\u202f8); nothing got worse.',
    );
    expect(lead).toEqual([]);
  });

  it('names gained order and digits', () => {
    const low = { digits: 12, error: 1e-12, exact: false, pathHash: 'a' };
    expect(
      textOf(
        solves('secant', (i) => (i === 0 ? { ...low, order: order(1.2) } : {})),
        solves('secant', (i) => (i === 0 ? { order: order(1.62), pathHash: 'b' } : {})),
      ).verdict,
    ).toBe(
      'secant gained order on cubic-out (1.20\u202f→\u202f1.62), and it ends with 4.0 digits more on cubic-out; nothing got worse.',
    );
  });

  it('gives the fall of a total where many cases are cheaper', () => {
    expect(
      textOf(
        solves('newton'),
        solves('newton', () => ({ evaluations: 8 })),
      ).verdict,
    ).toBe('newton needs 20\u202f% fewer evaluations; nothing got worse.');
  });
});

describe('describeComparison where something got worse', () => {
  it('leads with a broken case even where another solver costs far more, and names the lost stored value', () => {
    const was = [
      ...solves('secant'),
      ...solves('hybrid', (i) => ({ evaluations: i === 2 ? 30 : 18 })),
      ...others,
      ...solves('illinois'),
    ];
    const is = [
      ...solves('secant', () => twice),
      ...solves('hybrid', (i) => {
        if (i === 8) return { outcome: 'refused', evaluations: 102 };
        return { evaluations: i === 2 ? 16 : i === 4 ? 11 : 18 };
      }),
      ...others,
      ...solves('illinois', () => ({ pathHash: 'z' })),
    ];
    const { verdict, lead } = textOf(was, is);
    expect(verdict).toBe(
      'hybrid no longer solves flat-shoulder, and secant needs 70\u202f% more evaluations: in all 12 of its solves it asks for f again at an x it already has.',
    );
    expect(lead).toEqual([
      'In return, hybrid is cheaper on 2 cases (steep-20 30\u202f→\u202f16 and old-cubic 18\u202f→\u202f11).',
      'newton and bisection are the same to the last bit.',
      'illinois takes another path in some solves, without a change in cost.',
    ]);
  });

  it('leads with the case of a solver that is cheaper in total', () => {
    const is = solves('hybrid', (i) => (i === 8 ? { outcome: 'refused' } : { evaluations: 5 }));
    const { verdict, lead } = textOf(solves('hybrid'), is);
    expect(verdict).toBe('hybrid no longer solves flat-shoulder.');
    expect(lead).toEqual(['In return, hybrid needs 50\u202f% fewer evaluations.']);
  });

  it.each([
    ['false claim', 'newton now claims a false root on orbit.'],
    ['crashed', 'newton now crashes on orbit.'],
    ['other root', 'newton now ends at a root that is not asked for on orbit.'],
    ['timed out', 'newton no longer solves orbit.'],
  ] as const)('says how a case broke: %s', (outcome, sentence) => {
    expect(
      textOf(
        solves('newton'),
        solves('newton', (i) => (i === 1 ? { outcome } : {})),
      ).verdict,
    ).toBe(sentence);
  });

  it('says that a case without root is no longer refused', () => {
    const remarks: SolveRecord['remarks'] = [{ code: 'rightly refused', text: '' }];
    expect(
      textOf(
        [solve('newton', 'no-root', { outcome: 'refused', remarks })],
        [solve('newton', 'no-root', { outcome: 'false claim' })],
      ).verdict,
    ).toBe('newton no longer refuses no-root, where there is no root.');
  });

  it('does not name a solver twice in one sentence', () => {
    const is = solves('secant', (i) => (i === 0 ? { outcome: 'crashed' } : twice));
    expect(textOf(solves('secant'), is).verdict).toBe(
      'secant now crashes on cubic-out, and it needs 70\u202f% more evaluations: in 11 of its 12 solves it asks for f again at an x it already has.',
    );
  });

  it('counts cases beyond three and names the first', () => {
    const is = solves('newton', (i) => (i < 5 ? { outcome: 'refused' } : {}));
    expect(textOf(solves('newton'), is).verdict).toBe(
      'newton no longer solves 5 cases, among them cubic-out.',
    );
  });

  it('names the start where a case has several', () => {
    const starts = (broken: number | null) => {
      return [0, 1, 2].map((start) => {
        return solve('newton', 'orbit', start === broken ? { start, outcome: 'refused' } : { start });
      });
    };
    expect(textOf(starts(null), starts(1)).verdict).toBe('newton no longer solves orbit from its start 2.');
  });

  it('says that a root moved and that a solver does not repeat itself', () => {
    const is = [
      ...solves('newton', (i) => (i === 0 ? { nearest: 1, pathHash: 'x' } : {})),
      ...solves('bisection', (i) => (i === 3 ? { steady: false } : {})),
    ];
    expect(textOf(others, is).verdict).toBe(
      'newton now ends at another root on cubic-out, and bisection does not repeat itself on cos-fixed.',
    );
  });

  it('gives both orders where one was lost', () => {
    const two = solves('newton', () => ({ order: order(2) }));
    const lost = (count: number) => {
      return solves('newton', (i) => (i < count ? { order: order(1), pathHash: 'x' } : { order: order(2) }));
    };
    expect(textOf(two, lost(1)).verdict).toBe('newton lost its order on cubic-out (2.00\u202f→\u202f1.00).');
    expect(textOf(two, lost(2)).verdict).toBe(
      'newton lost its order on cubic-out and orbit (2.00\u202f→\u202f1.00 on cubic-out).',
    );
    expect(textOf(two, lost(5)).verdict).toBe(
      'newton lost its order on 5 cases, among them cubic-out (2.00\u202f→\u202f1.00).',
    );
  });

  it('gives the digits that were lost', () => {
    const less = (i: number): Fields => ({ digits: 12.1 - i, error: 1e-11, exact: false, pathHash: 'x' });
    const is = (count: number) => solves('newton', (i) => (i < count ? less(i) : {}));
    expect(textOf(solves('newton'), is(1)).verdict).toBe('newton ends with 3.9 digits fewer on cubic-out.');
    expect(textOf(solves('newton'), is(2)).verdict).toBe(
      'newton ends with up to 4.9 digits fewer on orbit and cubic-out.',
    );
  });

  it('says that the allowances permit what they permit', () => {
    const is = (count: number) => solves('newton', (i) => (i < count ? { evaluations: 11 } : {}));
    expect(textOf(solves('newton'), is(1)).verdict).toBe(
      'newton needs 1 more evaluation on cubic-out; the allowances permit it.',
    );
    const both = [...is(1), ...solves('bisection', (i) => (i === 1 ? { steady: false } : {}))];
    expect(textOf(others, both, allow({ unsteady: 1 })).verdict).toBe(
      'newton needs 1 more evaluation on cubic-out, and bisection does not repeat itself on orbit; the allowances permit both.',
    );
  });

  it('says over how many solves where they are few', () => {
    const rows = (count: number, fields: Fields = {}) => solves('secant', () => fields, count);
    expect(textOf(rows(3), rows(3, { evaluations: 17 })).verdict).toBe(
      'secant needs 70\u202f% more evaluations over the 3 solves that both complete.',
    );
    expect(textOf(rows(1), rows(1, twice)).verdict).toBe(
      'secant needs 70\u202f% more evaluations on the one solve that both complete: it asks for f again at an x it already has.',
    );
    expect(textOf(rows(2), rows(2, twice)).verdict).toContain('in both of its solves it asks for f again');
  });

  it('groups many solvers in one sentence', () => {
    const names = ['a', 'b', 'c', 'd', 'e'];
    const was = names.flatMap((name) => solves(name));
    const is = names.flatMap((name) => {
      return solves(name, (i) => (i < (name === 'a' ? 1 : 2) ? { outcome: 'refused' } : twice));
    });
    const { verdict, lead } = textOf(was, is);
    expect(verdict).toBe(
      '5 solvers no longer solve what they solved: a on cubic-out, b on 2 cases, c on 2 cases and 2 others.',
    );
    expect(lead).toEqual([
      '5 solvers need more evaluations: a 70\u202f%, b 70\u202f%, c 70\u202f% and 2 others; all of them ask again at an x they already have.',
    ]);
  });
});

describe('the query check in sentences', () => {
  it('compares with a reference that asks again, too', () => {
    const was = solves('secant', (i) => (i < 5 ? { queryCheck: { repeated: 1 } } : {}));
    expect(
      textOf(
        was,
        solves('secant', () => twice),
      ).verdict,
    ).toBe(
      'secant needs 70\u202f% more evaluations: in all 12 of its solves it asks for f again at an x it already has, 84 times in all (reference: 5).',
    );
  });

  it('names no cause where not more than half of the solves ask again, or no more than before', () => {
    const half = solves('secant', (i) => (i < 6 ? twice : { evaluations: 17 }));
    expect(textOf(solves('secant'), half).verdict).toBe('secant needs 70\u202f% more evaluations.');
    const seven = solves('secant', (i) => (i < 7 ? twice : { evaluations: 17 }));
    expect(textOf(solves('secant'), seven).verdict).toContain(': in 7 of its 12 solves it asks for f again');
    const before = solves('secant', () => ({ queryCheck: { repeated: 7 } }));
    const { verdict, lead } = textOf(
      before,
      solves('secant', () => twice),
    );
    expect(verdict).toBe('secant needs 70\u202f% more evaluations.');
    expect(lead).toEqual([
      'secant asks for f again at an x it already has in all its 12 solves, as the reference does.',
    ]);
  });

  it('names what is asked again at the same cost after the verdict', () => {
    const is = solves('secant', () => ({ queryCheck: { repeated: 2 }, pathHash: 'q' }));
    expect(textOf(solves('secant'), is).lead).toEqual([
      'secant asks for f again at an x it already has in all its 12 solves, which the reference never does.',
    ]);
  });

  it('does not say f of a solver that asks for more than f', () => {
    const solvers = [solverOf('secant', { uses: ['f', 'df'] })];
    expect(
      textOf(
        solves('secant'),
        solves('secant', () => twice),
        allow(),
        { solvers },
      ).verdict,
    ).toContain('it asks again at an x it already has');
  });
});

describe('describeComparison where not everything could be compared', () => {
  it('says that it could not tell and why', () => {
    expect(textOf(others, [])).toMatchObject({
      verdict: 'Nothing could be compared. The candidate has no results.',
      lead: [],
    });
    const { solvers, cases } = runOf(others);
    expect(textOf(others, others.slice(0, 20), allow(), { solvers, cases })).toMatchObject({
      verdict:
        'The candidate has no result for 4 of 24 solves, so it could not be told whether it is as good as the reference.',
      lead: [],
    });
  });

  it('says that nothing was compared where a build failed', () => {
    const { verdict, plain } = describeFailure('Build 5e07d1b did not prepare: npm ci ended with status 1.');
    expect(plainText(verdict)).toBe('Nothing was compared, and the reference stays as it is.');
    expect(plain).toContain('did not prepare');
  });

  it('puts different arithmetic on top', () => {
    const is = [...solves('newton', () => ({ pathHash: 'y' })), ...solves('bisection')];
    const { verdict, lead } = textOf(others, is, allow(), { fingerprint: 'node 24' });
    expect(verdict).toBe(
      'Outcome and cost are the same in all 24 solves; different arithmetic does not let them be compared to the last bit.',
    );
    expect(lead[0]).toContain('run the reference again');
  });

  it('says which cases have changed', () => {
    const cases = caseNames.map((name, i) => caseOf(name, i < 2 ? { hash: 'another' } : {}));
    expect(textOf(others, others, allow(), { cases })).toMatchObject({
      verdict: 'Nothing changed: all 20 solves that could be compared are the same to the last bit.',
      lead: ['2 cases have changed in the suite since the reference and are not compared.'],
    });
  });

  it('says which solvers are new, gone and renamed', () => {
    const was = [...solves('secant_v1'), ...solves('ridders'), ...solves('newton')];
    const is = [...solves('secant'), ...solves('pegasus'), ...solves('newton')];
    const solvers = [solverOf('secant', { aliases: ['secant_v1'] }), solverOf('pegasus'), solverOf('newton')];
    expect(textOf(was, is, allow(), { solvers }).lead).toEqual([
      'pegasus is new and solves 12 of 12.',
      'ridders is gone.',
      'secant was called secant_v1.',
    ]);
  });

  it('counts new and gone solves of solvers that stay', () => {
    expect(textOf(solves('newton', undefined, 10), solves('newton')).lead).toEqual(['2 solves are new.']);
    const gone = textOf(solves('newton'), solves('newton', undefined, 11));
    expect(gone.lead).toEqual(['One solve is gone.']);
  });
});

describe('the marks in a sentence', () => {
  const { verdict } = describeComparison(
    compareRuns(runOf(solves('secant')), runOf(solves('secant', () => twice)), allow()),
  );

  it('sets names strong and digits as figures, and nothing else', () => {
    expect(verdict.filter((span) => span.strong).map((span) => span.text)).toEqual(['secant']);
    expect(verdict.filter((span) => span.figure).map((span) => span.text)).toEqual(['70', '12']);
  });

  it('never leaves two plain stretches side by side', () => {
    for (const [i, span] of verdict.entries()) {
      const before = verdict[i - 1];
      const arePlain = !span.strong && !span.figure && before && !before.strong && !before.figure;
      expect(arePlain ?? false).toBe(false);
    }
  });
});
