import { describe, expect, it } from 'vitest';
import { effectiveLimit } from '../../../shared/comparison/verdict.ts';
import { allowanceSet, defaultAllowances } from '../../../shared/schemas/allowances.ts';

describe('allowanceSet', () => {
  it('fills in the limits for all that are left out', () => {
    expect(allowanceSet.parse({ base: { broke: 3 } }).base).toEqual({ ...defaultAllowances, broke: 3 });
  });

  it('fills in nothing in an exception: what it leaves out is as for all', () => {
    const set = allowanceSet.parse({
      base: { totalPercent: 9 },
      solvers: { hybrid: { caseEvaluations: 4 } },
      traits: { flat: { broke: null } },
    });
    expect(set.solvers).toEqual({ hybrid: { caseEvaluations: 4 } });
    expect(set.traits).toEqual({ flat: { broke: null } });
    expect(effectiveLimit(set, 'totalPercent', 'hybrid', []).limit).toBe(9);
    expect(effectiveLimit(set, 'caseEvaluations', 'hybrid', []).limit).toBe(4);
  });
});
