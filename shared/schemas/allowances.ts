import { z } from 'zod';

/** What a team tolerates. Counts of pairs unless said otherwise; null means no limit. */
export const allowances = z.strictObject({
  /** Pairs that may break. */
  broke: z.int().min(0).nullable().default(0),
  /** Pairs whose root may move to another allowed one. */
  rootMoved: z.int().min(0).nullable().default(0),
  /** Pairs that may be unsteady. */
  unsteady: z.int().min(0).nullable().default(0),
  /** Total evaluations of one solver, percent more, over the pairs that both solved. */
  totalPercent: z.number().min(0).nullable().default(2),
  /** Evaluations more on one pair that both solved. */
  caseEvaluations: z.int().min(0).nullable().default(2),
  /** How far an estimated order may lie under the solver's claim, dimensionless. */
  orderUnder: z.number().min(0).nullable().default(0.15),
  /** Correct digits fewer on one pair. */
  digits: z.number().min(0).nullable().default(0.5),
});
export type Allowances = z.infer<typeof allowances>;

export const defaultAllowances: Allowances = allowances.parse({});

/** Allowances with exceptions for named solvers and for cases with a trait; the solver's exception wins. */
export const allowanceSet = z.strictObject({
  base: allowances.default(defaultAllowances),
  solvers: z.record(z.string(), allowances.partial()).default({}),
  traits: z.record(z.string(), allowances.partial()).default({}),
});
export type AllowanceSet = z.infer<typeof allowanceSet>;
