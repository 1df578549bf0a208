import { z } from 'zod';
import type { Comparison } from '../comparison/comparison.ts';
import { allowanceSet } from './allowances.ts';
import { breachView, solverTotalsView } from './comparisons.ts';
import { solveRecord } from './solve.ts';
import { changes, verdicts } from './words.ts';

const count = z.int().min(0);

/** A solve as the comparison has it; its path, where a file has one, is left out. */
const comparedSolve = z.object(solveRecord.shape);

const pair = z.strictObject({
  key: z.string(),
  solver: z.string(),
  formerly: z.string().nullable(),
  case: z.string(),
  start: count.nullable(),
  family: z.string(),
  traits: z.array(z.string()),
  reference: comparedSolve.nullable(),
  candidate: comparedSolve.nullable(),
  change: z.enum(changes),
  others: z.array(z.enum(changes)),
  difference: z.int().nullable(),
  digits: z.number().nullable(),
  repeatedMore: count,
});

const totals = solverTotalsView.shape;

const fields = {
  reference: z.string(),
  candidate: z.string(),
  verdict: z.enum(verdicts),
  reasons: z.array(z.string()),
  exact: z.boolean(),
  breaches: z.array(breachView),
  pairs: z.array(pair),
  notApplicable: z.array(z.string()),
  notCompared: z.array(
    z.strictObject({
      solver: z.string(),
      case: z.string(),
      start: count.nullable(),
      reason: z.enum(['case changed', 'not run']),
    }),
  ),
  totals: z.array(solverTotalsView),
  overall: z.strictObject({
    reference: totals.reference,
    candidate: totals.candidate,
    pairs: count,
    evaluations: totals.evaluations,
  }),
  changes: totals.changes,
} satisfies Record<keyof Comparison, z.ZodType>;

export const comparisonFormat = 'tallyroot comparison 1';

/** A comparison as a JSON file, with the allowances that it was judged by. */
export const comparisonFile = z.strictObject({
  format: z.literal(comparisonFormat),
  allowances: allowanceSet,
  ...fields,
});
export type ComparisonFile = z.infer<typeof comparisonFile>;

/** JSON Schema of the file, draft 2020-12. */
export function comparisonFileJsonSchema(): Record<string, unknown> {
  return { ...z.toJSONSchema(comparisonFile, { io: 'output' }), title: 'Tallyroot comparison, format 1' };
}
