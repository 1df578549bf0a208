import { z } from 'zod';
import { evaluationKinds } from './words.ts';

/** Names of solvers and settings. */
export const solverName = z
  .string()
  .regex(
    /^[A-Za-z0-9][A-Za-z0-9._+-]{0,63}$/,
    'a letter or digit, then letters, digits, . _ + - (64 at most)',
  );

/** What is asked of an answer; 0 means not asked. Absolute and relative in x, absolute in f. */
export const tolerance = z.strictObject({
  xabs: z.number().min(0),
  xrel: z.number().min(0),
  fabs: z.number().min(0),
});
export type Tolerance = z.infer<typeof tolerance>;

/** One solver as its manifest declares it, defaults filled in. */
export const solverDeclaration = z.strictObject({
  name: solverName,
  takes: z.enum(['bracket', 'start', 'both', 'point']),
  /** How many starts it takes; 0 where it takes a bracket alone. */
  starts: z.int().min(0).max(16),
  uses: z.array(z.enum(evaluationKinds)).min(1),
  /** Order it claims on simple roots, or null. */
  order: z.number().positive().nullable(),
  onePoint: z.boolean(),
  widens: z.boolean(),
  tolerance,
  settings: z.record(z.string(), z.union([z.number(), z.string()])),
  aliases: z.array(solverName),
  digits: z.boolean(),
});
export type SolverDeclaration = z.infer<typeof solverDeclaration>;
