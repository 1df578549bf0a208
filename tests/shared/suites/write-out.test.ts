import { describe, expect, it } from 'vitest';
import { fileCase } from '../../../shared/schemas/suite-file.ts';
import { memberId, sweepMembers } from '../../../shared/suites/sweep.ts';
import { writeOutCase } from '../../../shared/suites/write-out.ts';

function written(extra: Record<string, unknown>) {
  const source = fileCase.parse({ id: 'family', equation: 'x - n', source: 'Constructed', ...extra });
  return writeOutCase(source, ['cases', 0]);
}

describe('sweepMembers', () => {
  it('combines entries in every way, the last one changing fastest', () => {
    expect(sweepMembers({ a: ['1', '2'], b: ['3', '4'] })).toEqual([
      { a: '1', b: '3' },
      { a: '1', b: '4' },
      { a: '2', b: '3' },
      { a: '2', b: '4' },
    ]);
  });

  it('steps through ranges in exact decimals, both ends included', () => {
    const members = sweepMembers({ n: { from: '0.1', to: '0.5', step: '0.1' } });
    expect(members.map((member) => member.n)).toEqual(['0.1', '0.2', '0.3', '0.4', '0.5']);
    expect(sweepMembers({ n: { from: '3', to: '1', step: '-1' } }).length).toBe(3);
  });

  it('changes parameters together that one entry names together', () => {
    expect(
      sweepMembers({
        'a, b': [
          ['1', '2'],
          ['3', '4'],
        ],
      }),
    ).toEqual([
      { a: '1', b: '2' },
      { a: '3', b: '4' },
    ]);
  });

  it.each([
    [{ n: { from: '1', to: '9', step: '0' } }, /step does not lead/],
    [{ n: { from: '1', to: '9', step: '-1' } }, /step does not lead/],
    [{ n: { from: '1', to: '1e9', step: '1' } }, /at most 500 members/],
    [
      {
        a: Array.from({ length: 30 }, (_, i) => String(i)),
        b: Array.from({ length: 30 }, (_, i) => String(i)),
      },
      /at most 500 members/,
    ],
    [{ n: ['1', 'two'] }, /a number was expected/],
    [{ 'a, b': [['1', '2'], ['3']] }, /2 values a member/],
    [{ a: ['1'], 'a, b': [['1', '2']] }, /swept twice/],
  ])('refuses sweep %# for its reason', (sweep, message) => {
    expect(() => sweepMembers(sweep)).toThrow(message);
  });
});

describe('memberId', () => {
  it('is the family and the values, in lower case and without plus signs', () => {
    expect(memberId('f', { Re: '1e+5', n: '-2.5' })).toBe('f-re1e5-n-2.5');
  });
});

describe('writeOutCase', () => {
  it('puts the parameters of each member into bracket, starts and roots', () => {
    const { cases, problems } = written({
      sweep: { n: [4, 9] },
      bracket: ['n - 1', 'n + 1'],
      starts: [['sqrt(n)']],
      roots: [{ value: 'n' }],
    });
    expect(problems).toEqual([]);
    expect(cases.map(({ id, bracket, starts, roots }) => [id, bracket, starts, roots[0]?.value])).toEqual([
      ['family-n4', ['3', '5'], [['2']], '4'],
      ['family-n9', ['8', '10'], [['3']], '9'],
    ]);
  });

  it('takes one entry of a list for each member', () => {
    const { cases } = written({ sweep: { n: [1, 2] }, roots: [{ value: { each: ['1.00', 2] } }] });
    expect(cases.map((plain) => plain.roots[0]?.value)).toEqual(['1.00', '2']);
  });

  it('writes a root given as an expression to 50 digits', () => {
    const { cases } = written({ sweep: { n: [3] }, roots: [{ value: '1/n' }] });
    expect(cases[0]?.roots[0]?.value).toBe(`0.${'3'.repeat(50)}`);
  });

  it('refuses a list of the wrong length, once, and a list without a sweep', () => {
    const wrong = written({ sweep: { n: [1, 2, 3] }, roots: [{ value: { each: [1, 2] } }] });
    expect(wrong.problems.map((problem) => problem.message)).toEqual([
      '3 entries were expected, one for each member; here are 2',
    ]);
    const without = written({ parameters: { n: 1 }, roots: [{ value: { each: [1] } }] });
    expect(without.problems[0]?.message).toMatch(/belongs to a case with a sweep/);
  });

  it('refuses a parameter that is both given and swept', () => {
    const { problems } = written({ parameters: { n: 1 }, sweep: { n: [1] } });
    expect(problems[0]?.message).toMatch(/swept as well/);
  });
});
