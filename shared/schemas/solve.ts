import { z } from 'zod';
import { outcomes, remarkCodes } from './words.ts';

/** A measured number that JSON cannot hold when it is not finite: null then, and a remark or status says why. */
const measured = z.number().nullable();

export const orderStatuses = [
  'estimated', // value, low, high hold
  'linear', // value 1, rate holds
  'one ratio', // a single ratio: shown for one-point solvers only
  'superlinear of order 1',
  'sublinear or very slow linear',
  'superlinear, order not resolved',
  'undecided',
  'not enough steps',
  'stagnation',
  'stopped moving',
  'cycle',
  'diverged',
  'left the domain',
  'no root to measure against',
] as const;
export type OrderStatus = (typeof orderStatuses)[number];

/**
 * The estimated order of convergence of one solve.
 * `steps`: gains used. `rate`: error ratio a step where the order is 1. `constant`: asymptotic error constant.
 * `period`: length of a cycle. All dimensionless (the constant has the unit of x to the power 1 − order).
 */
export const orderEstimate = z.strictObject({
  status: z.enum(orderStatuses),
  kind: z.enum(['Q', 'memory', 'R', 'one ratio']).nullable(),
  value: measured,
  low: measured,
  high: measured,
  steps: z.int().min(0),
  rate: measured,
  rateLow: measured,
  rateHigh: measured,
  constant: measured,
  period: z.int().nullable(),
});
export type OrderEstimate = z.infer<typeof orderEstimate>;

/** How often each finding occurred in the path of one solve. */
export const queryCounts = z.strictObject({
  repeated: z.int().min(0),
  outside: z.int().min(0),
  late: z.int().min(0),
  unused: z.int().min(0),
  nonFinite: z.int().min(0),
});
export type QueryCounts = z.infer<typeof queryCounts>;

export const remark = z.strictObject({ code: z.enum(remarkCodes), text: z.string().max(4000) });
export type Remark = z.infer<typeof remark>;

/**
 * One solver on one case from one start: what it did and what it cost.
 * Numbers are dimensionless (case equations are); counts are evaluations on the wire.
 */
export const solveRecord = z.strictObject({
  solver: z.string(),
  case: z.string(),
  /** Index of the start list, or null where the solver takes a bracket alone. */
  start: z.int().min(0).nullable(),
  outcome: z.enum(outcomes),
  remarks: z.array(remark),
  iterations: z.int().nullable(),
  iterationsFrom: z.enum(['reported', 'counted']).nullable(),
  /** f + df + d2f. */
  evaluations: z.int().min(0),
  f: z.int().min(0),
  df: z.int().min(0),
  d2f: z.int().min(0),
  /** The x that was returned; null where none was, or where it was not finite. */
  root: measured,
  /** Index into the case's roots of the nearest one; null where none is certified. */
  nearest: z.int().min(0).nullable(),
  /** x − r, signed. */
  error: measured,
  /** Correct digits of the root, 0 to 17; 16 where x is the root rounded to binary64. */
  digits: measured,
  exact: z.boolean(),
  /** Error in units in the last place of the root, signed. */
  ulps: measured,
  /** f at the returned x, in binary64; not counted. */
  residual: measured,
  order: orderEstimate,
  queryCheck: queryCounts,
  /** Hash of every evaluation asked for (kind and bits of x) and of the bits returned as root. */
  pathHash: z.string(),
  /** null: not repeated; true: a fresh process repeated it to the last bit; false: it did not. */
  steady: z.boolean().nullable(),
  elapsedMs: z.number().min(0),
});
export type SolveRecord = z.infer<typeof solveRecord>;

/** Identity of a solve within a run. */
export function solveKey(solve: { solver: string; case: string; start: number | null }): string {
  return `${solve.solver}\u0000${solve.case}\u0000${solve.start ?? ''}`;
}
