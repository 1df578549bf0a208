import { z } from 'zod';

/** A decimal number as text, exact: what a suite author wrote, or a certified root to at least 40 digits. */
export const decimalText = z
  .string()
  .max(400)
  .regex(/^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/, 'a decimal number was expected');

/**
 * One certified root of a case.
 * `attainable`: F, the distance from the root below which binary64 evaluation of this form of f cannot
 * tell x from the root (absolute, same unit as x).
 */
export const certifiedRoot = z.strictObject({
  value: decimalText,
  /** Significant digits that are certified. */
  digits: z.int().min(1),
  multiplicity: z.int().min(1),
  /** Whether the case accepts it as its answer. */
  allowed: z.boolean(),
  certificate: z.enum(['sign change', 'sign change, unique', 'by construction', 'by statement']),
  attainable: z.number().min(0),
});
export type CertifiedRoot = z.infer<typeof certifiedRoot>;

/** One equation f(x) = 0, ready to run: sweeps written out, roots certified. */
export const suiteCase = z.strictObject({
  id: z.string().min(1).max(120),
  equation: z.string().min(1).max(2000),
  parameters: z.record(z.string(), decimalText),
  bracket: z.tuple([decimalText, decimalText]).nullable(),
  /** Lists of starting points; a solver runs once from each. */
  starts: z.array(z.array(decimalText).min(1).max(16)).max(64),
  roots: z.array(certifiedRoot).max(64),
  expectation: z.enum(['root', 'none']),
  traits: z.array(z.string().max(40)).max(24),
  source: z.string().max(600),
  note: z.string().max(2000),
  /** sha-256, hex, of all that decides what a solver sees and how it is judged. */
  hash: z.string(),
});
export type SuiteCase = z.infer<typeof suiteCase>;

/** A suite at one revision, ready to run. */
export const suiteRevision = z.strictObject({
  id: z.string().min(1).max(120),
  title: z.string().max(200),
  /** sha-256, hex, over the hashes of its cases in order and its limits. */
  revision: z.string(),
  limits: z.strictObject({ evaluations: z.int().min(1), seconds: z.number().positive() }),
  cases: z.array(suiteCase),
});
export type SuiteRevision = z.infer<typeof suiteRevision>;
