import { fileURLToPath } from 'node:url';
import { beforeAll, describe, expect, it } from 'vitest';
import { comparableRun } from '../../server/cli/compare-command.ts';
import { measureFolder } from '../../server/cli/measure-folder.ts';
import { openSuite } from '../../server/cli/open-suite.ts';
import { compareRuns } from '../../shared/comparison/compare.ts';
import type { Comparison, Pair } from '../../shared/comparison/comparison.ts';
import { allowanceSet } from '../../shared/schemas/allowances.ts';

/*
 * The published npm package newton-raphson-method at 1.0.0 and 1.0.2, each with its epsilon option set.
 * Read in the two published files: 1.0.0 asks its options for "epsion", so that the test for a slope that is
 * nothing beside f is never made where epsilon is set; 1.0.2 makes it. Nothing else of what is run differs.
 */
const builds = fileURLToPath(new URL('../fixtures/builds/', import.meta.url));

async function compareOn(suiteId: string): Promise<Comparison> {
  const suite = openSuite(suiteId);
  const before = await measureFolder({ folder: `${builds}newton-raphson-method-1.0.0`, suite });
  const after = await measureFolder({ folder: `${builds}newton-raphson-method-1.0.2`, suite });
  return compareRuns(comparableRun(before), comparableRun(after), allowanceSet.parse({}));
}

const outcomesOf = (pair: Pair): string => `${pair.reference?.outcome} → ${pair.candidate?.outcome}`;

describe('newton-raphson-method 1.0.0 → 1.0.2 on open starts', () => {
  it('solves the same with the same evaluations, to the last bit: no slope vanishes on the way to a root', async () => {
    const comparison = await compareOn('open-starts');
    expect(comparison.verdict).toBe('within allowances');
    expect(comparison.overall.candidate.solved).toBeGreaterThan(150);
    for (const pair of comparison.pairs) {
      if (pair.reference?.outcome === 'solved')
        expect(pair.change, `${pair.solver} on ${pair.case}`).toBe('same');
    }
  });
});

describe('newton-raphson-method 1.0.0 → 1.0.2 on traps', () => {
  let comparison: Comparison;
  beforeAll(async () => {
    comparison = await compareOn('traps');
  });

  it('refuses where the earlier version claimed a root at infinity behind a vanishing slope', () => {
    const flipped = comparison.pairs.filter((pair) => outcomesOf(pair) === 'false claim → refused');
    expect(flipped.length).toBeGreaterThanOrEqual(10);
    const atInfinity = flipped.filter((pair) =>
      pair.reference?.remarks.some((remark) => remark.code === 'claimed non-finite'),
    );
    expect(atInfinity.length).toBe(flipped.length);
    const mended = flipped.filter((pair) => pair.change === 'mended');
    expect(mended.length).toBeGreaterThan(0);
    for (const pair of mended)
      expect(pair.candidate?.remarks.map((r) => r.code)).toContain('rightly refused');
  });

  it('breaks on equations whose slope is tiny beside f from the start, which the earlier version solved', () => {
    const broke = comparison.pairs.filter((pair) => pair.change === 'broke');
    expect(broke.map((pair) => `${pair.solver} on ${pair.case}`).sort()).toEqual([
      'newton on root-1e150',
      'newton on root-huge',
      'newton on widest',
    ]);
    for (const pair of broke) {
      expect(outcomesOf(pair)).toBe('solved → refused');
      // f and f′ at the start, and no more.
      expect(pair.candidate?.evaluations).toBe(2);
    }
    expect(comparison.verdict).toBe('beyond allowances');
  });

  it('changes nothing else: every other pair is the same, or fails in both versions', () => {
    for (const pair of comparison.pairs) {
      if (pair.change === 'same') continue;
      expect(['broke', 'mended', 'drifted'], `${pair.solver} on ${pair.case}`).toContain(pair.change);
      if (pair.change === 'drifted') {
        expect(pair.reference?.outcome === 'solved' || pair.candidate?.outcome === 'solved').toBe(false);
      }
    }
  });
});
