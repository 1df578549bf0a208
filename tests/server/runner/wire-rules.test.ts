import { describe, expect, it } from 'vitest';
import {
  caseOf,
  isRunning,
  measureUnruly,
  measureWith,
  remarkOf,
  solverOf,
} from '../../helpers/measuring.ts';

describe('a solve that breaks the wire', () => {
  it.each([
    ['unknown-verb', 'an unknown verb "hello": hello there'],
    ['few-fields', 'f needs a number: f'],
    ['many-fields', 'f takes one number here, this line has 2: f 1 2'],
    ['no-number', '"1,5" is no number: f 1,5'],
    ['not-offered', 'df was not offered: df 1'],
    ['half-offered', 'fdf was not offered: fdf 1'],
    ['jacobian', 'jac was not offered: jac 1'],
    ['other-id', 'an end line for solve 4711 in solve 2: root 4711 1'],
    ['two-numbers', 'step takes one or three numbers here, this line has 2: step 1 2'],
    ['ready-again', 'ready in the middle of a solve: ready 1'],
    ['nul', 'a NUL byte: f 1\\x00'],
    ['latin-1', 'bytes that are no UTF-8: # \\xe9'],
    ['half-count', 'iterations takes an integer: iterations 1.5'],
    ['many-lines', 'more than 1050 lines that are no evaluations: # nothing to say'],
    ['long-line', `a line over 1 MiB: ${'1'.repeat(200)}`],
  ])('is garbled, keeps the line and leaves the next solve to a fresh adapter: %s', async (name, line) => {
    const { records, outcomes, started } = await measureUnruly(['good', name, 'good'], 1);
    expect(outcomes).toEqual(['solved', 'garbled', 'solved']);
    expect(remarkOf(records[1], 'line')).toBe(line);
    expect(started).toHaveLength(2);
    expect(started.filter(isRunning)).toEqual([]);
  });
});

describe('an adapter that ends during a solve', () => {
  it.each([
    ['exit-3', 'exit status 3; its log ends:\nout of luck'],
    ['segv', 'ended by signal SIGSEGV'],
    ['half-line', 'exit status 0'],
    ['holds-pipe', 'exit status 4'],
    ['flees', 'exit status 4'],
    ['closes-output', 'closed its output without ending'],
  ])('has crashed, with how it ended and the end of its log: %s', async (name, text) => {
    const { records, outcomes, started, children } = await measureUnruly(['good', name, 'good'], 1);
    expect(outcomes).toEqual(['solved', 'crashed', 'solved']);
    expect(remarkOf(records[1], 'exit')).toContain(text);
    expect(started).toHaveLength(2);
    expect([...started, ...children].filter(isRunning)).toEqual([]);
  });

  it('is shown with the signal that a status above 128 of a shell stands for', async () => {
    const { records } = await measureWith(
      'true; sh $A/unruly.sh',
      [solverOf('status-of-shell')],
      [caseOf('one')],
    );
    expect(remarkOf(records[0], 'exit')).toContain('ended by signal SIGSEGV');
    const plain = await measureUnruly(['status-of-shell']);
    expect(remarkOf(plain.records[0], 'exit')).toContain('exit status 139');
  });

  it('keeps the evaluations that it had asked for', async () => {
    const { solves } = await measureUnruly(['exit-3']);
    expect(solves[0]?.record).toMatchObject({ evaluations: 1, f: 1, root: null });
    expect(solves[0]?.path?.events).toEqual([{ kind: 'f', x: 1, a: 0, b: Number.NaN }]);
  });
});

describe('the budget', () => {
  it('ends a solve as over budget, whatever is written after stop, and the adapter goes on', async () => {
    const { records, outcomes, started } = await measureUnruly(['overspends', 'overspends-garbage', 'good']);
    expect(outcomes).toEqual(['over budget', 'over budget', 'solved']);
    expect(records[0]).toMatchObject({ evaluations: 5, root: null, iterations: null });
    expect(started).toHaveLength(1);
  });

  it('lets an adapter exit after stop, and ends one that gives no end line in time', async () => {
    const { records, outcomes, started } = await measureUnruly([
      'overspends-exit',
      'overspends-deaf',
      'endless',
      'good',
    ]);
    expect(outcomes).toEqual(['over budget', 'over budget', 'over budget', 'solved']);
    expect(records.flatMap((record) => record.remarks)).toEqual([]);
    expect(started).toHaveLength(4);
  });

  it('does not answer fdf where only one evaluation is left', async () => {
    const pairs = solverOf('pairs', { uses: ['f', 'df'] });
    const { solves } = await measureWith('sh $A/unruly.sh', [pairs], [caseOf('one')]);
    expect(solves[0]?.record).toMatchObject({ outcome: 'over budget', evaluations: 4, f: 2, df: 2 });
    expect(solves[0]?.path?.events).toHaveLength(2);
    expect(solves[0]?.path?.events[0]).toEqual({ kind: 'fdf', x: 2, a: 1, b: 1 });
  });
});

describe('the time of a solve', () => {
  it.each(['hang', 'talks-on', 'no-reader'])('ends it as timed out whatever it does: %s', async (name) => {
    const limits = { seconds: 0.3, evaluations: 100_000 };
    const { records, outcomes, started } = await measureUnruly(['good', name, 'good'], 1, { limits });
    expect(outcomes).toEqual(['solved', 'timed out', 'solved']);
    expect(remarkOf(records[1], 'time')).toBe('0.3 s');
    expect(started).toHaveLength(2);
  });

  it('ends an adapter and its children although they ignore SIGTERM', async () => {
    const { outcomes, started, children } = await measureUnruly(['stubborn', 'good'], 1, {
      limits: { seconds: 0.3 },
    });
    expect(outcomes).toEqual(['timed out', 'solved']);
    expect(children).toHaveLength(1);
    expect([...started, ...children].filter(isRunning)).toEqual([]);
  });
});

describe('starting', () => {
  it('stops the run at once where the adapter speaks another version', async () => {
    const { stopped, records, started } = await measureUnruly(['good'], 2, {}, 'other-version');
    expect(stopped).toBe('The adapter speaks wire 2, not 1.');
    expect(records).toEqual([]);
    expect(started).toHaveLength(1);
  });

  it.each([
    ['chatty', 'The adapter said "Welcome to my library" instead of ready.'],
    ['no-version', 'The adapter said "ready steady" instead of ready 1.'],
  ])('stops the run at once where the first line is another: %s', async (start, reason) => {
    const { stopped, started } = await measureUnruly(['good'], 2, {}, start);
    expect(stopped).toBe(reason);
    expect(started).toHaveLength(1);
  });

  it('is tried three times, then the run stops and says what the log says', async () => {
    const { stopped, log, started } = await measureUnruly(['good'], 2, {}, 'exit');
    expect(stopped).toBe('The adapter does not start: exit status 3; its log ends:\ncannot find my library');
    expect(log).toContain('cannot find my library');
    expect(started).toHaveLength(3);
  });

  it('has a time limit', async () => {
    const { stopped, started } = await measureUnruly(['good'], 1, { limits: { readyMs: 150 } }, 'hang');
    expect(stopped).toContain('The adapter does not start: no ready within 0.15 s');
    expect(started).toHaveLength(3);
    expect(started.filter(isRunning)).toEqual([]);
  });

  it('may fail twice', async () => {
    const { stopped, outcomes, started } = await measureUnruly(['good'], 1, {}, 'exit-twice');
    expect(stopped).toBeNull();
    expect(outcomes).toEqual(['solved']);
    expect(started).toHaveLength(3);
  });

  it('stops the run where the command does not exist', async () => {
    const { stopped } = await measureWith('no-such-program-here', [solverOf('good')], [caseOf('one')]);
    expect(stopped).toContain('The adapter does not start: exit status 127');
  });

  it('keeps the text behind ready, which may be empty', async () => {
    expect((await measureUnruly(['good'])).adapterText).toBe('unruly 0.1');
    expect((await measureUnruly(['good'], 1, {}, 'comment')).adapterText).toBe('');
  });
});

describe('an adapter that speaks out of turn', () => {
  it('is started afresh once when it asks before go in its first solve', async () => {
    const { records, outcomes, started } = await measureUnruly(['early-once', 'good']);
    expect(outcomes).toEqual(['solved', 'solved']);
    expect(remarkOf(records[0], 'fresh start')).toBe('It wrote "f 1" before go; it was started afresh.');
    expect(started).toHaveLength(2);
  });

  it('is garbled when it asks before go a second time', async () => {
    const { records, outcomes, started } = await measureUnruly(['early', 'good']);
    expect(outcomes).toEqual(['garbled', 'solved']);
    expect(remarkOf(records[0], 'line')).toBe('a line before go, twice: f 1');
    expect(started).toHaveLength(3);
  });

  it.each([
    ['junk-after-end', 'After its end line it wrote "f 5".'],
    ['exit-after-end', 'After its end line it ended.'],
  ])(
    'after its end line keeps that result with a remark, and does not touch the next: %s',
    async (name, text) => {
      const { records, outcomes, started } = await measureUnruly([name, 'good', name]);
      expect(outcomes).toEqual(['solved', 'solved', 'solved']);
      expect(records.map((record) => remarkOf(record, 'after end'))).toEqual([text, undefined, text]);
      expect(records.every((record) => record.evaluations === 1)).toBe(true);
      expect(started).toHaveLength(2);
    },
  );

  it('with a second end line after the next go keeps the first result with a remark', async () => {
    const { records, outcomes, started } = await measureUnruly(['end-twice'], 2);
    expect(outcomes).toEqual(['solved', 'solved']);
    expect(remarkOf(records[0], 'after end')).toBe('After its end line it wrote "root 1 1".');
    expect(started).toHaveLength(2);
  });

  it('with comments after its end line has done nothing wrong', async () => {
    const { records, started } = await measureUnruly(['comment-after-end', 'good']);
    expect(records.flatMap((record) => record.remarks)).toEqual([]);
    expect(started).toHaveLength(1);
  });

  it('has crashed where it ends after ready', async () => {
    const { outcomes, records } = await measureUnruly(['good'], 1, {}, 'exit-after-ready');
    expect(outcomes).toEqual(['crashed']);
    expect(remarkOf(records[0], 'exit')).toContain('exit status 5');
  });
});

describe('ten solves in a row that went wrong', () => {
  it('leave the others of that solver not tried, with the same outcome, and other solvers go on', async () => {
    const { records, started } = await measureUnruly(['exit-3', 'good'], 13);
    const crashed = records.filter((record) => record.solver === 'exit-3');
    expect(crashed.map((record) => record.outcome)).toEqual(new Array(13).fill('crashed'));
    expect(crashed.map((record) => remarkOf(record, 'not tried') !== undefined)).toEqual([
      ...new Array<boolean>(10).fill(false),
      ...new Array<boolean>(3).fill(true),
    ]);
    const others = records.filter((record) => record.solver === 'good');
    expect(others.map((record) => record.outcome)).toEqual(new Array(13).fill('solved'));
    expect(started).toHaveLength(11);
  });
});

describe('what a solve may do', () => {
  it('writes CR LF, blanks, comments and hexadecimal numbers', async () => {
    const { solves } = await measureUnruly(['cr-lf']);
    expect(solves[0]?.record).toMatchObject({ outcome: 'solved', evaluations: 1, root: 1 });
  });

  it('asks outside the domain and is answered nan', async () => {
    const sqrt = caseOf('root', { equation: 'sqrt(x) - 1' });
    const { records, solves } = await measureWith(
      'sh $A/unruly.sh',
      [solverOf('domain'), solverOf('nan-root')],
      [sqrt],
    );
    expect(records[0]).toMatchObject({ outcome: 'refused', evaluations: 1, queryCheck: { nonFinite: 1 } });
    expect(remarkOf(records[0], 'said')).toBe('it said = nan');
    expect(solves[0]?.path?.events).toEqual([
      { kind: 'f', x: Number.NEGATIVE_INFINITY, a: Number.NaN, b: Number.NaN },
    ]);
    expect(records[1]).toMatchObject({
      outcome: 'false claim',
      root: null,
      remarks: [{ code: 'claimed non-finite' }],
    });
  });

  it('fails without a text', async () => {
    const { records } = await measureUnruly(['silent-fail']);
    expect(records[0]).toMatchObject({ outcome: 'refused', remarks: [], evaluations: 0 });
  });

  it('is rightly refused where there is no root', async () => {
    const none = caseOf('none', { equation: 'x^2 + 1', roots: [], expectation: 'none' });
    const { records } = await measureWith(
      'sh $A/unruly.sh',
      [solverOf('silent-fail'), solverOf('good')],
      [none],
    );
    expect(records[0]).toMatchObject({ outcome: 'refused', remarks: [{ code: 'rightly refused' }] });
    expect(records[1]).toMatchObject({
      outcome: 'false claim',
      root: 1,
      residual: 2,
      nearest: null,
      digits: null,
    });
  });

  it('floods its log, of which the end is kept', async () => {
    const { outcomes, log } = await measureUnruly(['floods-log']);
    expect(outcomes).toEqual(['solved']);
    expect(log.length).toBeLessThan(66_000);
    expect(log.trimEnd().endsWith('the end')).toBe(true);
  });

  it('reports iterations, of which the last line counts and a wild one is not believed', async () => {
    const { records } = await measureUnruly(['counts-well', 'counts-badly', 'steps', 'good']);
    expect(records.map(({ iterations, iterationsFrom }) => [iterations, iterationsFrom])).toEqual([
      [1, 'reported'],
      [null, 'reported'],
      [2, 'counted'],
      [null, null],
    ]);
    expect(remarkOf(records[1], 'iterations not credible')).toBe(
      'It reported -5 iterations with 1 evaluations.',
    );
  });

  it('finds an empty home and no variables but its own', async () => {
    const { records } = await measureUnruly(['reads-home'], 1, { environment: { THREADS: '1' } });
    expect(remarkOf(records[0], 'said')).toBe('0 HOME LC_ALL PATH TALLYROOT_START THREADS TZ');
  });
});
