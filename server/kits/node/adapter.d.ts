/** Evaluates f, f′ or f″ at x. Throws `Stopped` when the budget is used up. */
export type Evaluation = (x: number) => number;

export interface Inputs {
  /** Where the solver takes a bracket. */
  bracket: [number, number] | null;
  /** As many as the manifest says; empty where the solver takes a bracket alone. */
  starts: number[];
  /** From the manifest. */
  settings: Record<string, number | string>;
  /** Evaluations allowed. */
  allow: number;
}

/** What is asked of the answer, absolute and relative in x, absolute in f; 0 means not asked. */
export interface Tolerance {
  xabs: number;
  xrel: number;
  fabs: number;
}

export interface Tools {
  /** f and f′ at once; counts as two evaluations. */
  fdf(x: number): [number, number];
  /** Reports a new approximation, with the bracket that is held now where there is one. */
  step(x: number, low?: number, high?: number): void;
  /** Reports how many iterations the library says it took. */
  iterations(count: number): void;
}

/** A number claims a root; `fail` or a thrown error says that there was no convergence. */
export type Result = number | { fail: string };

export type Solver = (
  f: Evaluation,
  df: Evaluation,
  d2f: Evaluation,
  inputs: Inputs,
  tolerance: Tolerance,
  tools: Tools,
) => Result;

export class Stopped extends Error {}

export function serve(options: { name?: string; solvers: Record<string, Solver> }): never;
