import { describe, expect, it } from 'vitest';
import { allowanceSet, defaultAllowances } from '../../../shared/schemas/allowances.ts';
import type { RunDetail } from '../../../shared/schemas/runs.ts';
import type { SuiteRevisionView } from '../../../shared/schemas/suites.ts';
import {
  draftOf,
  limits,
  noLimit,
  readDraft,
  readLimit,
  writeLimits,
} from '../../../src/features/allowances/draft.ts';
import { comparableOf, rejudge } from '../../../src/features/allowances/rejudge.ts';
import { newestPairs } from '../../../src/features/libraries/newest-pairs.ts';
import { suggestSlug } from '../../../src/features/libraries/suggest-slug.ts';
import { someCase, someRun, someSolve, someSolver } from './builders.ts';

describe('readLimit', () => {
  it('reads figures with point or comma, and the words for none', () => {
    expect(readLimit(' 2.5 ', false)).toEqual({ kind: 'limit', limit: 2.5 });
    expect(readLimit('0,15', false)).toEqual({ kind: 'limit', limit: 0.15 });
    expect(readLimit('No limit', true)).toEqual({ kind: 'limit', limit: null });
    expect(readLimit('', true)).toEqual({ kind: 'empty' });
  });

  it('refuses what is no limit, and parts of what is counted', () => {
    for (const text of ['-1', 'x', '1e3', '0x10', '.', 'Infinity', '1 000'])
      expect(readLimit(text, false).kind, text).toBe('wrong');
    expect(readLimit('1.5', true).kind).toBe('wrong');
    expect(readLimit('9'.repeat(400), true).kind).toBe('wrong');
  });
});

describe('a draft of allowances', () => {
  const set = allowanceSet.parse({
    base: { ...defaultAllowances, digits: null },
    solvers: { hybrid: { caseEvaluations: 4, totalPercent: null } },
    traits: { 'flat start': { broke: 1 } },
  });

  it('comes back from the fields as it went in', () => {
    expect(readDraft(draftOf(set))).toEqual({ set, problems: null });
  });

  it('has a field for every limit of the schema', () => {
    expect(limits.map((limit) => limit.name)).toEqual(Object.keys(defaultAllowances));
  });

  it('writes no limit in words, and leaves empty what an exception does not say', () => {
    const [hybrid] = draftOf(set).exceptions;
    expect([hybrid?.texts.totalPercent, hybrid?.texts.broke]).toEqual([noLimit, '']);
  });

  it('names the field that cannot be read', () => {
    const draft = draftOf(set);
    const { problems } = readDraft({ ...draft, base: { ...draft.base, broke: '', orderUnder: 'much' } });
    expect(Object.keys(problems ?? {}).sort()).toEqual(['base.broke', 'base.orderUnder']);
  });

  it('refuses an exception that says nothing, and a second one for the same', () => {
    const draft = draftOf(allowanceSet.parse({}));
    const empty = { kind: 'solver' as const, name: 'secant', texts: writeLimits({}) };
    const full = { ...empty, texts: writeLimits({ broke: 1 }) };
    expect(readDraft({ ...draft, exceptions: [empty] }).problems).toHaveProperty(['exception.0']);
    expect(readDraft({ ...draft, exceptions: [full, full] }).problems).toHaveProperty(['exception.1']);
  });
});

describe('rejudge', () => {
  const detail = (label: string): RunDetail => ({
    ...someRun(),
    build: { id: 1, label, commit: null },
    environment: null,
    adapterText: null,
    log: '',
    solvers: [
      {
        declaration: someSolver(),
        outcomes: { solved: 1 },
        stored: 1,
        evaluations: 8,
        evaluationsSolved: 8,
        repeated: 0,
        unsteady: 0,
      },
    ],
  });
  const revision: SuiteRevisionView = {
    suite: 'traps',
    number: 1,
    hash: 'h',
    title: 'Traps',
    limits: { evaluations: 1000, seconds: 10 },
    caseCount: 1,
    note: '',
    createdAt: '2026-03-14T09:12:00.000Z',
    createdBy: 'ilse',
    source: '',
    cases: [someCase()],
  };
  const reference = comparableOf(detail('before'), [someSolve({ evaluations: 8 })], revision);
  const candidate = comparableOf(detail('after'), [someSolve({ evaluations: 12 })], revision);
  const now = allowanceSet.parse({});

  it('says beyond by the allowances that hold, and within by others that tolerate it', () => {
    const wide = allowanceSet.parse({ base: { totalPercent: 50, caseEvaluations: 4 } });
    const judged = rejudge({ reference, candidate }, now, wide);
    expect([judged.now.verdict, judged.proposed.verdict]).toEqual(['beyond allowances', 'within allowances']);
    expect(judged.now.breaches.map((breach) => breach.allowance)).toEqual([
      'totalPercent',
      'caseEvaluations',
    ]);
  });

  it('lets an exception for a trait hold for its cases', () => {
    const some = allowanceSet.parse({
      base: { totalPercent: null },
      traits: { polynomial: { caseEvaluations: 4 } },
    });
    expect(rejudge({ reference, candidate }, now, some).proposed.verdict).toBe('within allowances');
  });
});

describe('newestPairs', () => {
  const builds = [{ id: 3 }, { id: 2 }, { id: 1 }];
  const run = (id: number, build: number, given: Parameters<typeof someRun>[0] = {}) =>
    someRun({ id, build: { id: build, label: '', commit: null }, ...given });

  it('takes the newest finished run of each build, against the one of the build before', () => {
    const runs = [run(9, 3, { status: 'failed' }), run(8, 3), run(7, 2), run(6, 2), run(5, 1)];
    expect(newestPairs(builds, runs, 'traps', 9).map(({ run: own, base }) => [own.id, base])).toEqual([
      [8, { kind: 'run', run: 7 }],
      [7, { kind: 'run', run: 5 }],
    ]);
  });

  it('keeps to what the run was started against', () => {
    const runs = [run(8, 3, { against: { kind: 'reference', revision: 2 } })];
    expect(newestPairs(builds, runs, 'traps', 9)[0]?.base).toEqual({ kind: 'reference', revision: 2 });
  });

  it('looks at one suite, and at no more builds than were asked for', () => {
    const other = { slug: 'other', title: '', revision: 1, hash: '' };
    const runs = [run(8, 3, { suite: other }), run(7, 2), run(5, 1)];
    expect(newestPairs(builds, runs, 'traps', 9).map((pair) => pair.run.id)).toEqual([7]);
    expect(newestPairs(builds, runs, 'traps', 0)).toEqual([]);
  });
});

describe('suggestSlug', () => {
  it('makes a short name that addresses can have', () => {
    expect(suggestSlug('Larkmoor Roots, 2nd ed.')).toBe('larkmoor-roots-2nd-ed');
    expect(suggestSlug('  Élan – Wurzeln ')).toBe('elan-wurzeln');
    expect(suggestSlug(`${'a'.repeat(63)} b`)).toBe('a'.repeat(63));
    expect(suggestSlug('数')).toBe('');
  });
});
