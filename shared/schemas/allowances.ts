import { z } from 'zod';

const pairCount = z.int().min(0).nullable();
const amount = z.number().min(0).nullable();

/** Null means no limit. */
const limits = {
  /** Pairs that may break. */
  broke: pairCount,
  /** Pairs whose root may move to another allowed one. */
  rootMoved: pairCount,
  /** Pairs that may be unsteady. */
  unsteady: pairCount,
  /** Total evaluations of one solver, percent more, over the pairs that both solved. */
  totalPercent: amount,
  /** Evaluations more on one pair that both solved. */
  caseEvaluations: pairCount,
  /** How far an estimated order may lie under the solver's claim, dimensionless. */
  orderUnder: amount,
  /** Correct digits fewer on one pair. */
  digits: amount,
};

/** What a team tolerates. Counts of pairs unless said otherwise; null means no limit. */
export const allowances = z.strictObject({
  broke: limits.broke.default(0),
  rootMoved: limits.rootMoved.default(0),
  unsteady: limits.unsteady.default(0),
  totalPercent: limits.totalPercent.default(2),
  caseEvaluations: limits.caseEvaluations.default(2),
  orderUnder: limits.orderUnder.default(0.15),
  digits: limits.digits.default(0.5),
});
export type Allowances = z.infer<typeof allowances>;

export const defaultAllowances: Allowances = allowances.parse({});

/** What an exception says; of limits that it leaves out, those for all hold, never a default. */
export const allowanceException = z.strictObject(limits).partial();
export type AllowanceException = z.infer<typeof allowanceException>;

/** Allowances with exceptions for named solvers and for cases with a trait; the solver's exception wins. */
export const allowanceSet = z.strictObject({
  base: allowances.default(defaultAllowances),
  solvers: z.record(z.string(), allowanceException).default({}),
  traits: z.record(z.string(), allowanceException).default({}),
});
export type AllowanceSet = z.infer<typeof allowanceSet>;
