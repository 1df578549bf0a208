import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { localActor } from '../../../server/actor.ts';
import { presentSolve } from '../../../server/features/runs/runs.present.ts';
import { solveToValues, valuesToSolve } from '../../../server/features/runs/solve-row.ts';
import { createSolvesRepo } from '../../../server/features/runs/solves.repo.ts';
import { orderStatuses, type SolveRecord, solveRecord } from '../../../shared/schemas/solve.ts';
import { outcomes, remarkCodes } from '../../../shared/schemas/words.ts';
import { openTestApp, seedLibrary } from '../../helpers/app.ts';

const count = fc.integer({ min: 0, max: 2 ** 31 });
// SQLite has no negative zero in a column; every other binary64 must come back to the last bit.
const measured = fc.option(
  fc.double({ noNaN: true, noDefaultInfinity: true }).map((value) => (value === 0 ? 0 : value)),
);
const positive = measured.map((value) => (value === null ? null : Math.abs(value)));

const solves: fc.Arbitrary<SolveRecord> = fc.record({
  solver: fc.constant('secant'),
  case: fc.constantFrom('cubic', 'pole', 'wave'),
  start: fc.option(fc.integer({ min: 0, max: 63 })),
  outcome: fc.constantFrom(...outcomes),
  remarks: fc.array(
    fc.record({ code: fc.constantFrom(...remarkCodes), text: fc.string({ maxLength: 40 }) }),
    { maxLength: 3 },
  ),
  iterations: fc.option(fc.integer({ min: -(2 ** 40), max: 2 ** 40 })),
  iterationsFrom: fc.option(fc.constantFrom('reported' as const, 'counted' as const)),
  evaluations: count,
  f: count,
  df: count,
  d2f: count,
  root: measured,
  nearest: fc.option(count),
  error: measured,
  digits: positive,
  exact: fc.boolean(),
  ulps: measured,
  residual: measured,
  order: fc.record({
    status: fc.constantFrom(...orderStatuses),
    kind: fc.option(fc.constantFrom('Q' as const, 'memory' as const, 'R' as const, 'one ratio' as const)),
    value: measured,
    low: measured,
    high: measured,
    steps: count,
    rate: measured,
    rateLow: measured,
    rateHigh: measured,
    constant: measured,
    period: fc.option(fc.integer({ min: 1, max: 99 })),
  }),
  queryCheck: fc.record({ repeated: count, outside: count, late: count, unused: count, nonFinite: count }),
  pathHash: fc.oneof(
    fc.uint8Array({ minLength: 1, maxLength: 32 }).map((bytes) => Buffer.from(bytes).toString('hex')),
    fc.string({ minLength: 1, maxLength: 20 }),
  ),
  steady: fc.option(fc.boolean()),
  elapsedMs: fc.double({ min: 0, max: 1e6, noNaN: true }).map((value) => (value === 0 ? 0 : value)),
});

describe('solve row', () => {
  it('is the inverse of itself for every record', () => {
    fc.assert(
      fc.property(solves, (solve) => {
        const names = { solver: solve.solver, case: solve.case, start: solve.start ?? -1 };
        expect(valuesToSolve(names, solveToValues(solve))).toEqual(solve);
      }),
      { seed: 11, numRuns: 200 },
    );
  });

  it('comes back from the database as it went in, to the last bit', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app);
    const { client, services } = app;
    const repo = createSolvesRepo(client);
    const run = services.runs.start(localActor, {
      build: build.id,
      suite: 'tests',
      settings: { confirm: 'none' },
    });
    const row = services.runs.requireRun(run.id);
    const keys = services.runSolves.keysOf(row);
    fc.assert(
      fc.property(solves, (record) => {
        client.sqlite.exec('DELETE FROM paths; DELETE FROM solves');
        repo.insertMany(run.id, [
          {
            solver: keys.positionOf.get(record.solver) ?? -1,
            caseId: keys.caseIdOf.get(record.case) ?? -1,
            start: record.start ?? -1,
            record,
            path: Buffer.from('path'),
          },
        ]);
        const [stored] = repo.readRun(run.id);
        expect(stored).toBeDefined();
        if (!stored) return;
        const { id, ...back } = presentSolve(stored, keys.names);
        expect(back).toEqual(record);
        expect(repo.readPath(id)?.toString()).toBe('path');
      }),
      { seed: 12, numRuns: 200 },
    );
  });

  it('stores a record that its schema accepts', () => {
    fc.assert(
      fc.property(solves, (solve) => {
        const names = { solver: solve.solver, case: solve.case, start: solve.start ?? -1 };
        const isValid = solveRecord.safeParse(solve).success;
        expect(solveRecord.safeParse(valuesToSolve(names, solveToValues(solve))).success).toBe(isValid);
      }),
      { seed: 13, numRuns: 50 },
    );
  });
});
