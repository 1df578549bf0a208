import { describe, expect, it } from 'vitest';
import { type BuildLog, buildStates } from '../../../shared/schemas/builds.ts';
import { archiveProblem } from '../../../src/features/builds/archive-check.ts';
import { isOver, logSegments, plainOutput, withLogEvent } from '../../../src/features/builds/log-text.ts';

describe('archiveProblem', () => {
  it('takes the archives that the server reads, whatever their case', () => {
    for (const name of ['a.tar.gz', 'b.TGZ', 'c.tar', 'larkroots 1.2.zip']) {
      expect(archiveProblem({ name, size: 10 })).toBeNull();
    }
  });

  it('says before it is sent what is no archive, empty or too large', () => {
    expect(archiveProblem({ name: 'a.rar', size: 10 })).toMatch(/no archive/);
    expect(archiveProblem({ name: 'a.zip', size: 0 })).toMatch(/empty/);
    expect(archiveProblem({ name: 'a.zip', size: 100 * 1024 * 1024 })).toBeNull();
    expect(archiveProblem({ name: 'a.zip', size: 100 * 1024 * 1024 + 1 })).toMatch(/at most 100 MiB/);
  });
});

describe('plainOutput', () => {
  it('takes out what colours a terminal and keeps the words', () => {
    expect(plainOutput('\u001b[1;32mok\u001b[0m \u001b]0;title\u0007done\n')).toBe('ok done\n');
  });

  it('keeps of a line that was written over the last version', () => {
    expect(plainOutput('10 %\r50 %\r100 %\nend\r\n')).toBe('100 %\nend\n');
  });
});

describe('logSegments', () => {
  it('begin lines and notes on lines of their own, without an empty line between', () => {
    const text = logSegments([
      { id: 1, kind: 'line', text: 'npm ci' },
      { id: 2, kind: 'output', text: 'added 3' },
      { id: 3, kind: 'note', text: 'exit status 0, 1.0 s' },
      { id: 4, kind: 'line', text: 'node --version' },
    ])
      .map((segment) => segment.text)
      .join('');
    expect(text).toBe('› npm ci\nadded 3\nexit status 0, 1.0 s\n› node --version\n');
  });
});

describe('withLogEvent', () => {
  const log: BuildLog = { build: 1, state: 'preparing', reason: null, isCut: false, pieces: [] };

  it('adds each piece once, also when the stream begins again from its start', () => {
    const piece = { id: 4, kind: 'output', text: 'x' } as const;
    const once = withLogEvent(log, piece);
    expect(withLogEvent(once, piece)).toEqual(once);
    expect(withLogEvent(once, { ...piece, id: 3 })).toEqual(once);
    expect(withLogEvent(once, { ...piece, id: 5 }).pieces.map(({ id }) => id)).toEqual([4, 5]);
  });

  it('takes over the state with its reason, and knows which states are the last', () => {
    const failed = withLogEvent(log, {
      kind: 'state',
      state: 'failed',
      reason: 'npm ci ended with status 1.',
    });
    expect(failed).toMatchObject({ state: 'failed', reason: 'npm ci ended with status 1.' });
    expect(buildStates.map(isOver)).toEqual([false, false, true, true]);
  });
});
