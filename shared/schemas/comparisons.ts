import { z } from 'zod';
import { allowances } from './allowances.ts';
import { pageOf, rowId } from './paging.ts';
import { runStatuses, solveView } from './runs.ts';
import { solverName } from './solver.ts';
import { changes, evaluationKinds, queryFindings, verdicts } from './words.ts';

/** What is compared: a run with another run (`reference`) or with a revision of the reference results. */
const sides = {
  candidate: rowId,
  reference: rowId.optional(),
  revision: rowId.optional(),
  /** Number of the library's allowances to judge by; the ones that hold now if left out. */
  allowances: z.coerce.number().int().min(0).optional(),
};

function hasOneReference(query: { reference?: number | undefined; revision?: number | undefined }): boolean {
  return (query.reference === undefined) !== (query.revision === undefined);
}
const oneReference = { message: 'give either reference (a run) or revision (of the reference results)' };

export const comparisonQuery = z.strictObject(sides).refine(hasOneReference, oneReference);
export type ComparisonQuery = z.infer<typeof comparisonQuery>;

export const exportFormats = ['csv', 'json', 'markdown', 'junit'] as const;
export type ExportFormat = (typeof exportFormats)[number];

export const exportQuery = z
  .strictObject({ ...sides, format: z.enum(exportFormats) })
  .refine(hasOneReference, oneReference);
export type ExportQuery = z.infer<typeof exportQuery>;

/** `solver` left out: all of them together. */
export const comparisonProfileQuery = z
  .strictObject({ ...sides, solver: solverName.optional() })
  .refine(hasOneReference, oneReference);
export type ComparisonProfileQuery = z.infer<typeof comparisonProfileQuery>;

export const pairSorts = ['gravity', 'suite', 'difference', 'digits'] as const;

/** Repeated `change` parameters mean any of them; a pair counts with its gravest change and its others alike. */
export const pairsQuery = z
  .strictObject({
    ...sides,
    limit: z.coerce.number().int().min(1).max(500).default(100),
    cursor: z.string().max(1000).optional(),
    solver: solverName.optional(),
    change: z
      .union([z.enum(changes), z.array(z.enum(changes)).max(changes.length)])
      .transform((given) => (typeof given === 'string' ? [given] : given))
      .optional(),
    trait: z.string().min(1).max(40).optional(),
    case: z.string().min(1).max(120).optional(),
    text: z.string().max(200).optional(),
    sort: z.enum(pairSorts).default('gravity'),
  })
  .refine(hasOneReference, oneReference);
export type PairsQuery = z.infer<typeof pairsQuery>;

const count = z.int().min(0);
const percent = z.number().nullable();
const costPair = z.strictObject({ reference: z.number(), candidate: z.number(), percent });
const solvedCount = z.strictObject({ solved: count, of: count });
const findingCount = z.strictObject({ solves: count, of: count, evaluations: count });
const orderSummary = z.strictObject({ median: z.number().nullable(), count });
const changeCounts = z.partialRecord(z.enum(changes), count);

export const solverTotalsView = z.strictObject({
  solver: z.string(),
  formerly: z.string().nullable(),
  presence: z.enum(['both', 'new', 'gone']),
  claim: z.number().nullable(),
  uses: z.array(z.enum(evaluationKinds)),
  reference: solvedCount,
  candidate: solvedCount,
  pairs: count,
  evaluations: costPair,
  perCase: costPair,
  perFamily: costPair,
  findings: z.record(
    z.enum(queryFindings),
    z.strictObject({ reference: findingCount, candidate: findingCount }),
  ),
  order: z.strictObject({ reference: orderSummary, candidate: orderSummary }),
  changes: changeCounts,
});

export const breachView = z.strictObject({
  allowance: allowances.keyof(),
  limit: z.number(),
  figure: z.number().nullable(),
  scope: z.strictObject({ solver: z.string().nullable(), trait: z.string().nullable() }),
  pairs: z.array(z.string()),
});

export const comparisonSide = z.strictObject({
  label: z.string(),
  /** null on the reference's side where it is a revision, which can come from several runs. */
  run: z.int().nullable(),
  revision: z.int().nullable(),
  build: z.strictObject({ id: z.int(), label: z.string(), commit: z.string().nullable() }).nullable(),
  status: z.enum(runStatuses).nullable(),
  solves: count,
});

export const comparisonView = z.strictObject({
  library: z.string(),
  suite: z.string(),
  reference: comparisonSide,
  candidate: comparisonSide,
  allowances: count,
  verdict: z.enum(verdicts),
  reasons: z.array(z.string()),
  exact: z.boolean(),
  breaches: z.array(breachView),
  totals: z.array(solverTotalsView),
  overall: z.strictObject({
    reference: solvedCount,
    candidate: solvedCount,
    pairs: count,
    evaluations: costPair,
  }),
  changes: changeCounts,
  pairs: count,
  notApplicable: count,
  notCompared: z.array(
    z.strictObject({
      solver: z.string(),
      case: z.string(),
      start: z.int().nullable(),
      reason: z.enum(['case changed', 'not run']),
    }),
  ),
});
export type ComparisonView = z.infer<typeof comparisonView>;

export const pairView = z.strictObject({
  key: z.string(),
  solver: z.string(),
  formerly: z.string().nullable(),
  case: z.string(),
  start: z.int().nullable(),
  family: z.string(),
  traits: z.array(z.string()),
  reference: solveView.nullable(),
  candidate: solveView.nullable(),
  change: z.enum(changes),
  others: z.array(z.enum(changes)),
  difference: z.number().nullable(),
  digits: z.number().nullable(),
  repeatedMore: count,
});
export type PairView = z.infer<typeof pairView>;
export const pairPage = pageOf(pairView);
