import { describe, expect, it } from 'vitest';
import { compareRuns } from '../../../shared/comparison/compare.ts';
import type { ComparableRun, Pair } from '../../../shared/comparison/comparison.ts';
import { emptyEstimate } from '../../../shared/numerics/estimate-order.ts';
import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import { allow, caseOf, order, runOf, solve, solverOf } from '../../helpers/solve-records.ts';

type Fields = Parameters<typeof solve>[2];

function pairOf(was: Fields, is: Fields, change: Partial<ComparableRun> = {}, base = {}): Pair {
  const [reference, candidate] = [solve('secant', 'cubic', was), solve('secant', 'cubic', is)];
  const compared = compareRuns(runOf([reference]), runOf([candidate], change), allow(base));
  const [pair] = compared.pairs;
  if (pair === undefined) throw new Error('no pair');
  return pair;
}

const rightly: SolveRecord['remarks'] = [{ code: 'rightly refused', text: 'There is no root.' }];
const off = (digits: number): Fields => ({ digits, error: 10 ** -digits, exact: false, evaluations: 10 });

describe('changesOf', () => {
  it('calls a pair with the same path the same', () => {
    expect(pairOf({}, {})).toMatchObject({ change: 'same', others: [], difference: 0, digits: 0 });
  });

  it('calls another path at the same cost drifted', () => {
    expect(pairOf({ pathHash: 'a' }, { pathHash: 'b' })).toMatchObject({ change: 'drifted', difference: 0 });
  });

  it.each([
    'other root',
    'refused',
    'false claim',
    'over budget',
    'timed out',
    'crashed',
    'garbled',
  ] as const)('calls solved → %s broke and the way back mended, without a cost', (outcome) => {
    expect(pairOf({}, { outcome, evaluations: 3 })).toMatchObject({ change: 'broke', difference: null });
    expect(pairOf({ outcome, evaluations: 30 }, {})).toMatchObject({ change: 'mended', difference: null });
  });

  it('never calls a build cheaper that became so by claiming falsely', () => {
    const pair = pairOf({ evaluations: 100 }, { outcome: 'false claim', evaluations: 2 });
    expect([pair.change, ...pair.others]).toEqual(['broke']);
  });

  it('calls the end of a right refusal broke and its return mended', () => {
    const refusal = { outcome: 'refused', remarks: rightly } as const;
    expect(pairOf(refusal, { outcome: 'false claim' }).change).toBe('broke');
    expect(pairOf({ outcome: 'false claim' }, refusal).change).toBe('mended');
    expect(pairOf(refusal, { outcome: 'refused' }).change).toBe('broke');
  });

  it('does not compare the cost of two refusals', () => {
    const refusal = { outcome: 'refused', remarks: rightly } as const;
    expect(pairOf({ ...refusal, evaluations: 5 }, { ...refusal, evaluations: 500 })).toMatchObject({
      change: 'drifted',
      difference: null,
    });
    expect(pairOf(refusal, refusal).change).toBe('same');
  });

  it('calls one failure that became another drifted, both outcomes kept', () => {
    const pair = pairOf({ outcome: 'refused' }, { outcome: 'crashed' });
    expect(pair).toMatchObject({ change: 'drifted', others: [] });
    expect(pair.reference?.outcome).toBe('refused');
    expect(pair.candidate?.outcome).toBe('crashed');
    expect(pairOf({ outcome: 'refused' }, { outcome: 'refused', evaluations: 11 }).change).toBe('drifted');
    expect(pairOf({ outcome: 'refused' }, { outcome: 'refused' }).change).toBe('same');
  });

  it('calls another allowed root a moved one, by the nearest certified root', () => {
    expect(pairOf({ nearest: 0, pathHash: 'a' }, { nearest: 1, pathHash: 'b' }).change).toBe('root moved');
    expect(pairOf({ nearest: 0, pathHash: 'a' }, { nearest: null, pathHash: 'b' }).change).toBe('drifted');
  });

  it('calls one evaluation more costlier and one less cheaper', () => {
    expect(pairOf({ evaluations: 10 }, { evaluations: 11 })).toMatchObject({
      change: 'costlier',
      difference: 1,
    });
    expect(pairOf({ evaluations: 10 }, { evaluations: 9 })).toMatchObject({
      change: 'cheaper',
      difference: -1,
    });
  });

  it('calls over half a digit fewer less accurate, exactly half a digit not', () => {
    expect(pairOf({ ...off(12), pathHash: 'a' }, { ...off(11.5), pathHash: 'b' }).change).toBe('drifted');
    expect(pairOf({ ...off(12), pathHash: 'a' }, { ...off(11.49), pathHash: 'b' }).change).toBe(
      'less accurate',
    );
    expect(pairOf({ ...off(11.5), pathHash: 'a' }, { ...off(12), pathHash: 'b' }).change).toBe('drifted');
    expect(pairOf({ ...off(11.49), pathHash: 'a' }, { ...off(12), pathHash: 'b' }).change).toBe(
      'more accurate',
    );
  });

  it('notices fewer digits where the team allows fewer', () => {
    const [was, is] = [
      { ...off(12), pathHash: 'a' },
      { ...off(11.7), pathHash: 'b' },
    ];
    expect(pairOf(was, is, {}, { digits: 0.2 }).change).toBe('less accurate');
    expect(pairOf(was, is, {}, { digits: 2 }).change).toBe('drifted');
    expect(pairOf(was, { ...off(11), pathHash: 'b' }, {}, { digits: null }).change).toBe('less accurate');
  });

  it('does not miss digits that the case cannot give', () => {
    const cases = [caseOf('cubic', { roots: [{ attainable: 1e-11 }] })];
    const [was, is] = [
      { ...off(16), pathHash: 'a' },
      (digits: number) => ({ ...off(digits), pathHash: 'b' }),
    ];
    // Twice 1e-11, relative to the root: 10.699 digits.
    expect(pairOf(was, is(10.71), { cases }).change).toBe('drifted');
    expect(pairOf(was, is(10.69), { cases }).change).toBe('less accurate');
  });

  it('calls the order lost where the intervals lie apart, never on the values alone', () => {
    const run = (from: SolveRecord['order'], to: SolveRecord['order']) => {
      return pairOf({ order: from, pathHash: 'a' }, { order: to, pathHash: 'b' });
    };
    expect(run(order(2), order(1.618)).change).toBe('order lost');
    expect(run(order(1.618), order(2)).change).toBe('order gained');
    expect(run(order(2, 0.2), order(1.618, 0.2)).change).toBe('drifted');
    expect(run(order(2, 0.25), order(1.5, 0.25)).change).toBe('drifted');
    expect(run(order(2, 0.24), order(1.5, 0.25)).change).toBe('order lost');
  });

  it('does not compare an order with none, nor a single ratio', () => {
    const run = (from: SolveRecord['order'], to: SolveRecord['order']) => {
      return pairOf({ order: from, pathHash: 'a' }, { order: to, pathHash: 'b' }).change;
    };
    expect(run(order(2), emptyEstimate('not enough steps'))).toBe('drifted');
    expect(run(order(2), { ...order(1.2), status: 'one ratio' })).toBe('drifted');
    expect(run(order(2), { ...order(1.2), status: 'undecided' })).toBe('drifted');
    const linear = { ...emptyEstimate('linear', 20), value: 1, low: 0.98, high: 1.02, rate: 0.5 };
    expect(run(order(2), linear)).toBe('order lost');
  });

  it('calls the order lost that falls below the claim by more than the allowance', () => {
    const solvers = [solverOf('secant', { order: 2 })];
    const run = (to: SolveRecord['order'], from = order(2, 0.3)) => {
      return pairOf({ order: from, pathHash: 'a' }, { order: to, pathHash: 'b' }, { solvers }).change;
    };
    expect(run(order(1.75, 0.1))).toBe('drifted');
    expect(run(order(1.75, 0.09))).toBe('order lost');
    expect(run(order(1.75, 0.09), order(1.75, 0.09))).toBe('drifted');
  });

  it('calls a candidate unsteady that a fresh process did not repeat', () => {
    expect(pairOf({}, { steady: false }).change).toBe('unsteady');
    expect(pairOf({}, { steady: true }).change).toBe('same');
    expect(pairOf({ steady: false }, { steady: true }).change).toBe('same');
    expect(pairOf({}, { steady: false, outcome: 'crashed' })).toMatchObject({
      change: 'broke',
      others: ['unsteady'],
    });
  });

  it('gives one pair its gravest change and lists the others after it', () => {
    const was: Fields = { ...off(12), order: order(2), nearest: 0, evaluations: 10 };
    const is: Fields = { ...off(8), order: order(1), nearest: 1, evaluations: 20, steady: false };
    const pair = pairOf(was, is);
    expect(pair.change).toBe('root moved');
    expect(pair.others).toEqual(['order lost', 'less accurate', 'costlier', 'unsteady']);
    const back = pairOf({ ...is, nearest: 0, steady: null }, was);
    expect(back.change).toBe('order gained');
    expect(back.others).toEqual(['more accurate', 'cheaper']);
  });

  it('puts a loss before a gain', () => {
    const pair = pairOf({ ...off(8), evaluations: 10 }, { ...off(12), evaluations: 12 });
    expect(pair).toMatchObject({ change: 'costlier', others: ['more accurate'] });
  });

  it('does not call pairs drifted that were run in different arithmetic', () => {
    const other = { fingerprint: 'node 24' };
    expect(pairOf({ pathHash: 'a' }, { pathHash: 'b' }, other).change).toBe('same');
    expect(pairOf({ outcome: 'refused' }, { outcome: 'refused', evaluations: 11 }, other).change).toBe(
      'same',
    );
    expect(pairOf({ outcome: 'refused' }, { outcome: 'crashed' }, other).change).toBe('drifted');
    expect(pairOf({ evaluations: 10 }, { evaluations: 11 }, other).change).toBe('costlier');
  });

  it('says how many more evaluations of a costlier pair repeat an x', () => {
    const pair = pairOf(
      { evaluations: 10, queryCheck: { repeated: 1 } },
      { evaluations: 15, queryCheck: { repeated: 6 } },
    );
    expect(pair.repeatedMore).toBe(5);
    expect(pairOf({}, { evaluations: 9, queryCheck: { repeated: 3 } }).repeatedMore).toBe(0);
  });
});
