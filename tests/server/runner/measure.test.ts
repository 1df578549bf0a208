import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { confirmSolves } from '../../../server/runner/confirm.ts';
import { describeEnvironment } from '../../../server/runner/environment.ts';
import { pathFromBytes, pathToBytes } from '../../../server/runner/path-bytes.ts';
import { columnsToPath, PathRecorder } from '../../../server/runner/path-recorder.ts';
import { planSolves } from '../../../server/runner/plan-solves.ts';
import { environment } from '../../../shared/schemas/measurement.ts';
import { type PathEvent, pathKinds } from '../../../shared/schemas/path.ts';
import { type SolveRecord, solveKey, solveRecord } from '../../../shared/schemas/solve.ts';
import {
  adapterFolder,
  caseOf,
  measureUnruly,
  measureWith,
  remarkOf,
  shortLimits,
  solverOf,
} from '../../helpers/measuring.ts';

/** What must be the same whatever the lanes: all but the time. */
function comparable(records: SolveRecord[]): unknown[] {
  return records
    .map((record) => ({ ...record, elapsedMs: 0 }))
    .sort((a, b) => solveKey(a).localeCompare(solveKey(b)));
}

describe('planSolves', () => {
  const plan = (solver: Parameters<typeof solverOf>[1], changes: Parameters<typeof caseOf>[1]) =>
    planSolves([solverOf('s', solver)], [caseOf('c', changes)]).map(({ start, bracket, starts, why }) => ({
      start,
      bracket,
      starts,
      why,
    }));

  it('gives a solver that takes a bracket one solve', () => {
    expect(plan({ takes: 'bracket', starts: 0 }, { starts: [['1'], ['2']] })).toEqual([
      { start: null, bracket: [0, 3], starts: [], why: null },
    ]);
  });

  it('runs once from each list and cuts longer ones', () => {
    expect(plan({ starts: 1 }, { starts: [['1', '2'], ['0.5']] })).toMatchObject([
      { start: 0, bracket: null, starts: [1] },
      { start: 1, bracket: null, starts: [0.5] },
    ]);
  });

  it("takes the bracket's ends where a list has one start and two are taken, once for all such lists", () => {
    expect(plan({ starts: 2 }, { starts: [['1'], ['1', '2'], ['2']] })).toMatchObject([
      { start: 0, starts: [0, 3], why: null },
      { start: 1, starts: [1, 2], why: null },
    ]);
    expect(plan({ starts: 2 }, { starts: [] })).toMatchObject([{ start: null, starts: [0, 3], why: null }]);
  });

  it('gives a solver that takes both the bracket and a list', () => {
    expect(plan({ takes: 'both', starts: 1 }, {})).toMatchObject([
      { start: 0, bracket: [0, 3], starts: [2] },
    ]);
  });

  it.each([
    [
      { takes: 'bracket' as const, starts: 0 },
      { bracket: null },
      'the solver takes a bracket; the case offers none',
    ],
    [{ takes: 'both' as const }, { bracket: null }, 'the solver takes a bracket; the case offers none'],
    [{ starts: 1 }, { starts: [] }, 'the solver takes one start; the case offers none'],
    [{ starts: 2 }, { bracket: null }, 'the solver takes 2 starts; the list has 1'],
    [{ starts: 3 }, { starts: [['1', '2']] }, 'the solver takes 3 starts; the list has 2'],
    [
      { takes: 'point' as const, starts: 0 },
      {},
      'the solver takes the point of a system; the case is one equation',
    ],
    [{ uses: ['f' as const, 'jac' as const] }, {}, 'the solver uses a Jacobian; the case is one equation'],
  ])('says why a pair is not applicable: %o on %o', (solver, changes, why) => {
    expect(plan(solver, changes)).toMatchObject([{ why }]);
  });
});

describe('measure', () => {
  const names = ['good', 'silent-fail', 'exit-3', 'steps', 'junk-after-end', 'overspends'];

  it('gives the same records on two lanes as on one, each once', async () => {
    const alone = await measureUnruly(names, 12);
    const beside = await measureUnruly(names, 12, { lanes: 2 });
    expect(alone.records).toHaveLength(72);
    expect(comparable(beside.records)).toEqual(comparable(alone.records));
    expect(alone.records.filter((record) => remarkOf(record, 'not tried'))).toHaveLength(2);
  });

  it('leaves out what is done already', async () => {
    const whole = await measureUnruly(['good', 'steps'], 4);
    const done = new Set(whole.records.slice(0, 5).map(solveKey));
    const rest = await measureUnruly(['good', 'steps'], 4, { isDone: (key) => done.has(key) });
    expect(comparable(rest.records)).toEqual(comparable(whole.records.slice(5)));
    const nothing = await measureUnruly(['good'], 1, { isDone: () => true });
    expect(nothing).toMatchObject({ stopped: null, records: [], started: [] });
  });

  it('starts a fresh adapter for every solve where asked to', async () => {
    const { outcomes, started } = await measureUnruly(['good', 'steps'], 2, { fresh: true });
    expect(outcomes).toEqual(['solved', 'solved', 'solved', 'solved']);
    expect(started).toHaveLength(4);
  });

  it('records pairs that are not applicable without running them', async () => {
    const { records, started } = await measureWith('false', [solverOf('s', { starts: 3 })], [caseOf('c')]);
    expect(records).toMatchObject([{ outcome: 'not applicable', start: 0, evaluations: 0 }]);
    expect(remarkOf(records[0], 'why')).toBe('Not applicable: the solver takes 3 starts; the list has 1.');
    expect(started).toEqual([]);
  });

  it('gives records and starts that keep their contract', async () => {
    const begun: string[] = [];
    const { records } = await measureUnruly(names, 2, {
      onStart: (solver, one) => begun.push(`${solver.name} ${one.id}`),
    });
    for (const record of records) expect(solveRecord.parse(record)).toEqual(record);
    expect(begun).toHaveLength(12);
    expect(begun[1]).toBe('silent-fail case-1');
  });

  it('keeps the beginning of a long path and counts the rest, which the hash still covers', async () => {
    const limits = { evaluations: 50, pathLines: 20 };
    const short = await measureUnruly(['overspends'], 1, { limits });
    expect(short.solves[0]?.path?.events).toHaveLength(20);
    expect(short.solves[0]?.path?.cut).toBe(30);
    expect(remarkOf(short.records[0], 'path cut')).toContain('30 lines');
    const whole = await measureUnruly(['overspends'], 1, { limits: { evaluations: 50 } });
    expect(short.records[0]?.pathHash).toBe(whole.records[0]?.pathHash);
  });

  it('rejects where the sandbox is asked for, which is not there', async () => {
    await expect(measureUnruly(['good'], 1, { confinement: 'sandboxed' })).rejects.toMatchObject({
      code: 'unavailable',
    });
  });
});

describe('confirmSolves', () => {
  it('says of each solve whether a fresh process repeats it', async () => {
    const solvers = [solverOf('secant', { starts: 2 }), solverOf('refuse')];
    const cases = [caseOf('square', { equation: 'x^2 - 2', starts: [['1', '2']] }), caseOf('line')];
    const limits = { ...shortLimits, evaluations: 100, readyMs: 10_000, closeMs: 3000 };
    const { records } = await measureWith('node $A/kit.mjs', solvers, cases, { limits });
    const options = {
      folder: adapterFolder,
      adapter: 'node kit.mjs',
      environment: {},
      solvers,
      cases,
      limits,
      lanes: 1,
      fresh: false,
      confinement: 'unconfined' as const,
    };
    const [first, ...others] = records;
    if (!first) throw new Error('nothing was measured');
    const steady = await confirmSolves(options, [{ ...first, pathHash: 'another' }, ...others]);
    expect(steady.size).toBe(4);
    expect([...steady.entries()].filter(([, isSteady]) => !isSteady).map(([key]) => key)).toEqual([
      solveKey(first),
    ]);
  });
});

describe('describeEnvironment', () => {
  it('keeps its contract', () => {
    expect(environment.parse(describeEnvironment('unconfined'))).toMatchObject({
      node: process.versions.node,
    });
  });
});

describe('paths as bytes', () => {
  const number = fc.double();
  const event = fc.record({ kind: fc.constantFrom(...pathKinds), x: number, a: number, b: number });

  it('read back to the same bits', () => {
    fc.assert(
      fc.property(fc.array(event, { maxLength: 40 }), fc.nat(1000), (events, cut) => {
        expect(pathFromBytes(pathToBytes({ events, cut }))).toEqual({ events, cut });
      }),
      { seed: 7, numRuns: 300 },
    );
  });

  it('are refused where they are none', () => {
    expect(() => pathFromBytes(Buffer.of(2, 0))).toThrow(RangeError);
    expect(() => pathFromBytes(pathToBytes({ events: [], cut: 0 }).subarray(0, 3))).toThrow();
  });
});

describe('PathRecorder', () => {
  const record = (events: PathEvent[], root: number | null, limit = 20_000) => {
    const recorder = new PathRecorder(limit);
    for (const { kind, x, a, b } of events) recorder.add(kind, x, a, b);
    return { path: columnsToPath(recorder.columns()), hash: recorder.hash(root) };
  };
  const f = (x: number, kind: PathEvent['kind'] = 'f'): PathEvent => ({ kind, x, a: 0, b: Number.NaN });

  it('keeps what it is given, more than it had room for', () => {
    const events = Array.from({ length: 3000 }, (_, at) => f(at));
    expect(record(events, null).path).toEqual({ events, cut: 0 });
  });

  it('hashes the kind and bits of evaluations and the root, not steps and answers', () => {
    const hash = record([f(1), f(2)], 3).hash;
    expect(record([f(1), f(9, 'step'), { ...f(2), a: 7 }], 3).hash).toBe(hash);
    expect(record([f(1), f(2, 'df')], 3).hash).not.toBe(hash);
    expect(record([f(1), f(2)], null).hash).not.toBe(hash);
    expect(record([f(1), f(2 + 2 ** -51)], 3).hash).not.toBe(hash);
    expect(record([f(0)], null).hash).not.toBe(record([f(-0)], null).hash);
  });

  it('counts fdf as f and then df', () => {
    expect(record([f(1, 'fdf')], 1).hash).toBe(record([f(1), f(1, 'df')], 1).hash);
  });

  it('hashes long paths whole, kept or not', () => {
    const events = Array.from({ length: 5000 }, (_, at) => f(at));
    expect(record(events, 1, 10).hash).toBe(record(events, 1).hash);
    expect(record([...events.slice(0, -1), f(-1)], 1, 10).hash).not.toBe(record(events, 1).hash);
  });
});
