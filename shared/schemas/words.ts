/** The closed word lists that the product, its tables and its files share. The order is the order of display. */

/** What came of one solve. Exactly one each; the first reason to stop wins. */
export const outcomes = [
  'solved',
  'other root',
  'refused',
  'false claim',
  'over budget',
  'timed out',
  'crashed',
  'garbled',
  'not applicable',
] as const;
export type Outcome = (typeof outcomes)[number];

/** What a pair of solves shows, gravest first, then the good ones, then the neutral ones. */
export const changes = [
  'broke',
  'root moved',
  'order lost',
  'less accurate',
  'costlier',
  'unsteady',
  'drifted',
  'mended',
  'order gained',
  'more accurate',
  'cheaper',
  'new',
  'gone',
  'same',
] as const;
export type Change = (typeof changes)[number];

export const verdicts = ['within allowances', 'beyond allowances', 'could not tell'] as const;
export type Verdict = (typeof verdicts)[number];

/** What a query check can find in a path. */
export const queryFindings = ['repeated', 'outside', 'late', 'unused', 'nonFinite'] as const;
export type QueryFinding = (typeof queryFindings)[number];

/** Evaluations that a solver may ask for. `jac` belongs to systems. */
export const evaluationKinds = ['f', 'df', 'd2f', 'jac'] as const;
export type EvaluationKind = (typeof evaluationKinds)[number];

/** Remarks on a solve: things to know beside its outcome. */
export const remarkCodes = [
  'loose', // solved, but outside the promised tolerance
  'rightly refused', // the case has no root and the solver said so
  'said', // the text of a fail line
  'line', // the line that broke the wire
  'exit', // exit status or signal, with the tail of the log
  'iterations not credible',
  'not tried', // ten solves in a row of this solver had gone wrong
  'path cut', // the path was longer than what is kept
  'after end', // the adapter wrote or exited after its end line
  'fresh start', // the adapter was started afresh and the solve tried again
  'certified here', // the root was not on file and was certified on the spot
  'claimed non-finite', // root inf or nan
  'why', // why a pair is not applicable
  'time', // the limit that was reached
] as const;
export type RemarkCode = (typeof remarkCodes)[number];
