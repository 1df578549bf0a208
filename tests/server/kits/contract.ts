import { describe, expect, it } from 'vitest';
import { caseOf, type Measured, measureWith, remarkOf, solverOf } from '../../helpers/measuring.ts';

/**
 * What every kit and every adapter written by hand must do. The adapter serves `secant` (two starts, reports
 * steps and iterations), `newton` (one start, fdf), `bisection` (bracket), `refuse` and `endless`.
 * `command` may use $A for the folder of the fixtures.
 */
export function describeContract(name: string, command: string): void {
  // √2 from a calculation with 60 digits (decimal.js, precision 70).
  const value = '1.4142135623730950488016887242096980785696718753769480731766';
  const root = {
    value,
    digits: 45,
    multiplicity: 1,
    allowed: true,
    certificate: 'sign change' as const,
    attainable: 2.3e-16,
  };
  const square = caseOf('square', {
    equation: 'x^2 - 2',
    bracket: ['1', '2'],
    starts: [['1', '2']],
    roots: [root],
  });
  const none = caseOf('none', { equation: 'x^2 + 2', bracket: ['1', '2'], roots: [], expectation: 'none' });
  const limits = { evaluations: 100, seconds: 20, readyMs: 10_000, closeMs: 3000, graceMs: 3000 };

  const run = (solver: Parameters<typeof solverOf>, cases = [square]): Promise<Measured> =>
    measureWith(command, [solverOf(...solver)], cases, { limits });

  describe(`the adapter contract: ${name}`, () => {
    it('finds a root from two starts and reports steps and iterations', async () => {
      const { solves, stopped } = await run(['secant', { starts: 2 }]);
      expect(stopped).toBeNull();
      const record = solves[0]?.record;
      expect(record).toMatchObject({ outcome: 'solved', df: 0, iterationsFrom: 'reported', remarks: [] });
      const steps = solves[0]?.path?.events.filter((event) => event.kind === 'step') ?? [];
      expect(record?.iterations).toBe(steps.length);
      expect(record?.evaluations).toBeLessThan(12);
      expect(record?.digits).toBeGreaterThan(15);
    });

    it('asks for f and its derivative at once', async () => {
      const { solves } = await run(['newton', { uses: ['f', 'df'] }]);
      const record = solves[0]?.record;
      expect(record).toMatchObject({ outcome: 'solved', remarks: [] });
      expect(record?.df).toBe(record?.f);
      expect(solves[0]?.path?.events.some((event) => event.kind === 'fdf')).toBe(true);
    });

    it('takes a bracket and reports the one it holds', async () => {
      const { solves } = await run(['bisection', { takes: 'bracket', starts: 0 }]);
      expect(solves[0]?.record).toMatchObject({ outcome: 'solved', start: null, queryCheck: { outside: 0 } });
      const steps = solves[0]?.path?.events.filter((event) => event.kind === 'step') ?? [];
      expect(steps.length).toBeGreaterThan(40);
      expect(steps.every(({ a, b }) => a < Math.SQRT2 + 1e-15 && b > Math.SQRT2 - 1e-15)).toBe(true);
    });

    it('says honestly that it failed', async () => {
      const { records } = await run(['refuse']);
      expect(records[0]?.outcome).toBe('refused');
      const without = await run(['bisection', { takes: 'bracket', starts: 0 }], [none]);
      expect(remarkOf(without.records[0], 'rightly refused')).toBeDefined();
    });

    it('unwinds when the budget is used up, and serves the next solve', async () => {
      const { records, log } = await measureWith(
        `${command}`,
        [solverOf('endless'), solverOf('secant', { starts: 2 })],
        [square],
        { limits },
      );
      expect(records.map((record) => record.outcome)).toEqual(['over budget', 'solved']);
      expect(records[0]?.evaluations).toBe(100);
      expect(records.flatMap((record) => record.remarks)).toEqual([]);
      expect(log).not.toContain('Error');
    });

    it('repeats itself to the last bit in a fresh process', async () => {
      const first = await run(['secant', { starts: 2 }]);
      const second = await run(['secant', { starts: 2 }]);
      expect(second.records[0]?.pathHash).toBe(first.records[0]?.pathHash);
    });
  });
}
