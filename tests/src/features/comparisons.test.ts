import { describe, expect, it } from 'vitest';
import { plainText } from '../../../src/components/ui/rich-text.tsx';
import { breachSentence } from '../../../src/features/comparisons/breach-sentences.ts';
import { readBase, writeBase } from '../../../src/features/comparisons/comparisons.queries.ts';
import { findingLines } from '../../../src/features/comparisons/finding-sentences.ts';
import { countWords, groupPairs } from '../../../src/features/comparisons/pair-groups.ts';
import { somePair } from './builders.ts';

describe('groupPairs', () => {
  const pairs = [
    somePair({ change: 'costlier', difference: 4, case: 'near' }),
    somePair({ change: 'costlier', difference: 39, case: 'far' }),
    somePair({ change: 'broke', difference: null, solver: 'hybrid', others: [] }),
    somePair({ change: 'more accurate', others: ['cheaper'], difference: -14 }),
    somePair({ change: 'same' }),
  ];
  const groups = (filter = {}) =>
    groupPairs(pairs, { text: '', changes: [], sort: 'gravity', ...filter }).map((group) => [
      group.change,
      group.pairs.map((pair) => pair.case),
    ]);

  it('has the gravest change first, the dearest pair first, and leaves out what is the same', () => {
    expect(groups()).toEqual([
      ['broke', ['sqrt-three']],
      ['costlier', ['far', 'near']],
      ['more accurate', ['sqrt-three']],
    ]);
  });

  it('keeps the suite’s order within a change where that is asked for', () => {
    expect(groups({ sort: 'suite' })[1]).toEqual(['costlier', ['near', 'far']]);
  });

  it('shows a pair for its other changes too', () => {
    expect(groups({ changes: ['cheaper'] })).toEqual([['more accurate', ['sqrt-three']]]);
  });

  it('narrows by every word in solver, case or trait', () => {
    expect(groups({ text: 'hybrid poly' })).toEqual([['broke', ['sqrt-three']]]);
    expect(groups({ text: 'hybrid far' })).toEqual([]);
  });

  it('counts each pair under its gravest change', () => {
    expect(countWords(pairs).map(({ change, count }) => `${change} ${count}`)).toEqual([
      'broke 1',
      'costlier 2',
      'more accurate 1',
      'same 1',
    ]);
  });
});

describe('what a comparison is made against', () => {
  it('is written into an address and read back', () => {
    for (const base of [
      { kind: 'run', run: 12 },
      { kind: 'reference', revision: 3 },
    ] as const) {
      expect(readBase(writeBase(base))).toEqual(base);
    }
  });

  it('is nothing where the address has something else', () => {
    expect(['', 'run:', 'run:0', 'run:-1', 'reference:x', 'build:3'].map(readBase)).toEqual(
      Array(6).fill(null),
    );
  });
});

describe('sentences of a comparison', () => {
  const scope = { solver: null, trait: null };

  it('say how far a solver is beyond its allowance', () => {
    const breach = {
      allowance: 'totalPercent',
      limit: 2,
      figure: 68.75,
      scope: { solver: 'secant', trait: null },
      pairs: [],
    } as const;
    expect(plainText(breachSentence({ ...breach, pairs: [] }))).toBe(
      'secant: +68.8\u202f% evaluations in total; allowed are +2\u202f%.',
    );
  });

  it('say how many pairs broke where none may', () => {
    expect(plainText(breachSentence({ allowance: 'broke', limit: 0, figure: 1, scope, pairs: ['a'] }))).toBe(
      '1 pair; none is allowed.',
    );
  });

  it('compare the query check with the reference, which may do the same', () => {
    const none = { solves: 0, of: 11, evaluations: 0 };
    const both = { reference: none, candidate: none };
    const count = { solved: 11, of: 12 };
    const cost = { reference: 1, candidate: 1, percent: 0 };
    const totals = {
      solver: 'secant',
      formerly: null,
      presence: 'both' as const,
      claim: null,
      uses: ['f' as const],
      reference: count,
      candidate: count,
      pairs: 11,
      evaluations: cost,
      perCase: cost,
      perFamily: cost,
      findings: {
        repeated: {
          reference: { solves: 3, of: 12, evaluations: 5 },
          candidate: { solves: 12, of: 12, evaluations: 98 },
        },
        outside: both,
        late: both,
        unused: both,
        nonFinite: both,
      },
      order: { reference: { median: null, count: 0 }, candidate: { median: null, count: 0 } },
      changes: {},
    };
    const lines = findingLines([totals]);
    expect(lines.map((line) => [line.term, line.sentences.length])).toEqual([
      ['asked again', 1],
      ['outside', 0],
      ['late', 0],
      ['unused', 0],
      ['non-finite', 0],
    ]);
    expect(plainText(lines[0]?.sentences[0]?.pieces ?? [])).toBe(
      'secant asks again at a bit-identical x in 12 of 12 solves, 98 evaluations in all (reference: 5).',
    );
  });
});
