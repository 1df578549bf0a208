import { z } from 'zod';
import { solverName } from './solver.ts';

const count = z.int().min(0);
const share = z.number().min(0).max(1);

/**
 * Performance profiles: for each name, the share of the problems solved at a cost of at most x times the least
 * cost of any name shown. Steps lie at the points, the value holds from each on.
 */
export const profileView = z.strictObject({
  /** What is counted as cost. */
  cost: z.literal('evaluations'),
  problems: count,
  /** Problems that could not be counted: not run by all, or an answer without a single evaluation. */
  leftOut: count,
  profiles: z.array(
    z.strictObject({
      name: z.string(),
      points: z.array(z.strictObject({ x: z.number().min(1), share })),
      solved: share,
    }),
  ),
});
export type ProfileView = z.infer<typeof profileView>;

/** Repeated `solver` parameters name the solvers to show; all of the run where none is named. */
export const runProfileQuery = z.strictObject({
  solver: z
    .union([solverName, z.array(solverName).max(200)])
    .transform((given) => (typeof given === 'string' ? [given] : given))
    .optional(),
});
export type RunProfileQuery = z.infer<typeof runProfileQuery>;
