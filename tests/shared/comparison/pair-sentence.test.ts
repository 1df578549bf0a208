import { describe, expect, it } from 'vitest';
import { compareRuns } from '../../../shared/comparison/compare.ts';
import { describePair } from '../../../shared/comparison/pair-sentence.ts';
import { plainText } from '../../../shared/comparison/rich-text.ts';
import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import { allow, order, runOf, solve } from '../../helpers/solve-records.ts';

type Fields = Parameters<typeof solve>[2];

function sentence(was: Fields | null, is: Fields | null, fingerprint = 'node 20'): string {
  const reference = was === null ? [] : [solve('secant', 'orbit', was)];
  const candidate = is === null ? [] : [solve('secant', 'orbit', is)];
  const [pair] = compareRuns(runOf(reference), runOf(candidate, { fingerprint }), allow()).pairs;
  if (pair === undefined) throw new Error('no pair');
  return plainText(describePair(pair));
}

const rightly: SolveRecord['remarks'] = [{ code: 'rightly refused', text: '' }];
const low: Fields = { digits: 12, error: 1e-12, exact: false, pathHash: 'low' };

describe('describePair', () => {
  it.each<[string, Fields | null, Fields | null, string]>([
    ['same', {}, {}, 'The same to the last bit.'],
    [
      'drifted',
      { pathHash: 'a' },
      { pathHash: 'b' },
      'Another path to the same root, at the same 10 evaluations.',
    ],
    ['cheaper', { evaluations: 30 }, { evaluations: 16 }, 'The same root for 16 evaluations instead of 30.'],
    ['costlier', { evaluations: 9 }, { evaluations: 14 }, 'The same root for 14 evaluations instead of 9.'],
    [
      'costlier by repeats',
      { evaluations: 15 },
      { evaluations: 26, queryCheck: { repeated: 12 } },
      'The same root for 26 evaluations instead of 15: it asks for f again at an x it already has, 12 times.',
    ],
    [
      'costlier by one repeat more',
      { evaluations: 15, queryCheck: { repeated: 1 } },
      { evaluations: 16, queryCheck: { repeated: 2 } },
      'The same root for 16 evaluations instead of 15: it asks for f again at an x it already has, 2 times, where the reference did so once.',
    ],
    ['less accurate', {}, low, '4.0 correct digits fewer: 12.0 instead of 16.0.'],
    ['more accurate', low, {}, '4.0 correct digits more: 16.0 instead of 12.0.'],
    [
      'order lost',
      { order: order(2), pathHash: 'a' },
      { order: order(1), pathHash: 'b' },
      'The order found is 1.00; it was 2.00.',
    ],
    [
      'root moved',
      { root: 1, pathHash: 'a' },
      { root: -1.5e-7, nearest: 1, pathHash: 'b' },
      'Both solve it, at different roots: the candidate ends at −1.5e−7, the reference at 1.',
    ],
    [
      'unsteady',
      {},
      { steady: false },
      'A fresh process did not repeat the candidate’s path to the last bit.',
    ],
    [
      'broke',
      { evaluations: 15 },
      { outcome: 'refused', evaluations: 102, remarks: [{ code: 'said', text: 'too many steps' }] },
      'The reference solves it with 15 evaluations; the candidate refuses after 102 evaluations: “too many steps”.',
    ],
    [
      'mended',
      { outcome: 'false claim', evaluations: 1 },
      { evaluations: 15 },
      'The reference claims a root where there is none, after 1 evaluation; the candidate solves it with 15 evaluations.',
    ],
    [
      'one failure for another',
      { outcome: 'over budget', evaluations: 200 },
      { outcome: 'crashed', evaluations: 3 },
      'Neither solves it: the reference is over budget after 200 evaluations; the candidate crashes after 3 evaluations.',
    ],
    [
      'two right refusals',
      { outcome: 'refused', remarks: rightly },
      { outcome: 'refused', remarks: rightly, evaluations: 4 },
      'Another path; both rightly refuse, so cost is not compared.',
    ],
    [
      'two failures',
      { outcome: 'refused' },
      { outcome: 'refused', evaluations: 4 },
      'Another path; neither solves it, so cost is not compared.',
    ],
    ['new', null, { evaluations: 8 }, 'Only the candidate has it: solved with 8 evaluations.'],
    [
      'gone',
      { outcome: 'timed out' },
      null,
      'Only the reference has it: ran out of time after 10 evaluations.',
    ],
  ])('explains %s', (_, was, is, expected) => {
    expect(sentence(was, is)).toBe(expected);
  });

  it('says that different arithmetic keeps equal pairs from being compared to the last bit', () => {
    expect(sentence({ pathHash: 'a' }, { pathHash: 'b' }, 'node 24')).toBe(
      'The same outcome at the same cost; the two runs were made in different arithmetic.',
    );
  });
});
