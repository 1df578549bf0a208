import { z } from 'zod';
import { slug } from './paging.ts';

/** `builds`: how many of the newest to show. */
export const trendQuery = z.strictObject({
  suite: slug,
  builds: z.coerce.number().int().min(1).max(50).default(8),
});
export type TrendQuery = z.infer<typeof trendQuery>;

const perBuild = z.array(z.number().nullable());

/** How each solver came along. The lists have a place for each build, oldest first; null: nothing to tell. */
export const trendView = z.strictObject({
  library: z.string(),
  suite: z.string(),
  /** With the newest finished run of each. */
  builds: z.array(
    z.strictObject({ id: z.int(), label: z.string(), commit: z.string().nullable(), run: z.int() }),
  ),
  /** The solvers of the newest build, as it lists them. */
  solvers: z.array(
    z.strictObject({
      solver: z.string(),
      /** Summed over the solves that every build shown that has the solver has solved, on cases that are the same. */
      evaluations: perBuild,
      /** How many solves those are. */
      over: z.int().min(0),
      /** Solved or rightly refused. */
      solved: perBuild,
      /** How many apply in the newest build. */
      of: z.int().min(0),
      /** Median of the orders that could be estimated. */
      order: perBuild,
    }),
  ),
});
export type TrendView = z.infer<typeof trendView>;
