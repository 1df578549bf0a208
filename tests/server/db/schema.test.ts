import { describe, expect, it } from 'vitest';
import { localActor } from '../../../server/actor.ts';
import { openDatabase } from '../../../server/db/client.ts';
import { orderStatusCode, outcomeCode, wordOf } from '../../../server/db/codes.ts';
import { orderStatuses } from '../../../shared/schemas/solve.ts';
import { outcomes } from '../../../shared/schemas/words.ts';
import { freshDatabaseFile, openTestApp, seedLibrary } from '../../helpers/app.ts';

describe('database client', () => {
  it('opens every file with foreign keys, a write-ahead log and a busy timeout', () => {
    const { sqlite, close } = openDatabase(freshDatabaseFile());
    const pragma = (name: string) => sqlite.pragma(name, { simple: true });
    expect(pragma('foreign_keys')).toBe(1);
    expect(pragma('journal_mode')).toBe('wal');
    expect(pragma('synchronous')).toBe(1);
    expect(pragma('busy_timeout')).toBe(5000);
    close();
  });
});

describe('stored codes', () => {
  it('gives every outcome and order status a code of its own, and each code its word back', () => {
    for (const [words, codes] of [
      [outcomes, outcomeCode],
      [orderStatuses, orderStatusCode],
    ] as const) {
      const given = Object.values(codes);
      expect(new Set(given).size).toBe(words.length);
    }
    for (const outcome of outcomes) expect(wordOf(outcomeCode)(outcomeCode[outcome])).toBe(outcome);
  });

  it('keeps the codes that databases already hold', () => {
    expect(outcomes.map((outcome) => outcomeCode[outcome])).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9]);
    expect(() => wordOf(outcomeCode)(77)).toThrow(RangeError);
  });
});

describe('schema', () => {
  it('refuses to change or delete what is kept for good', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app);
    const run = app.services.runs.start(localActor, { build: build.id, suite: 'tests' });
    app.services.jobRunner.start();
    await app.services.runs.wait(run.id);
    app.services.references.setFirst(localActor, 'pocket-roots', { run: run.id, reason: 'the first' });
    app.services.allowances.set(localActor, 'pocket-roots', {
      allowances: app.services.allowances.get('pocket-roots').allowances,
      reason: 'as they are',
      basedOn: 0,
    });
    const tables = [
      'suite_revisions',
      'cases',
      'reference_revisions',
      'reference_entries',
      'allowance_revisions',
      'audit_log',
    ];
    for (const table of tables) {
      const count = app.client.sqlite.prepare(`SELECT count(*) FROM ${table}`).pluck().get();
      expect(Number(count), table).toBeGreaterThan(0);
      const deleteAll = () => app.client.sqlite.prepare(`DELETE FROM ${table}`).run();
      const updateAll = () => app.client.sqlite.prepare(`UPDATE ${table} SET id = id`).run();
      expect(deleteAll, table).toThrow(/never changed/);
      expect(updateAll, table).toThrow(/never changed/);
    }
  });

  it('takes no infinity in a measured column', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app);
    const run = app.services.runs.start(localActor, { build: build.id, suite: 'tests' });
    app.services.jobRunner.start();
    await app.services.runs.wait(run.id);
    for (const column of ['root', 'error', 'residual', 'order_value', 'constant']) {
      const set = app.client.sqlite.prepare(`UPDATE solves SET ${column} = ? WHERE run_id = ?`);
      expect(() => set.run(Number.POSITIVE_INFINITY, run.id), column).toThrow(/solves_finite/);
      expect(() => set.run(-Number.MAX_VALUE, run.id), column).not.toThrow();
      set.run(Number.NaN, run.id);
      const stored = app.client.sqlite.prepare(`SELECT DISTINCT ${column} FROM solves`).pluck().all();
      expect(stored).toEqual([null]);
    }
  });
});
