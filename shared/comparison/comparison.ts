import type { Allowances } from '../schemas/allowances.ts';
import type { SolveRecord } from '../schemas/solve.ts';
import type { SolverDeclaration } from '../schemas/solver.ts';
import type { Change, EvaluationKind, QueryFinding, Verdict } from '../schemas/words.ts';

/** What a comparison needs of a case; a suite's case fits. */
export interface ComparableCase {
  id: string;
  hash: string;
  traits: readonly string[];
  /** Cases that differ only by a parameter; left out: the id up to its first slash. */
  family?: string;
  /** Attainable accuracy F of each root, absolute; left out: every error counts as beyond it. */
  roots?: readonly { attainable: number }[];
}

/** One side of a comparison: a run, or a revision of the reference results. */
export interface ComparableRun {
  solves: readonly SolveRecord[];
  solvers: readonly SolverDeclaration[];
  cases: readonly ComparableCase[];
  /** Of the arithmetic; runs with different ones are not compared as exact. */
  fingerprint: string;
  label: string;
}

/** A solve of the reference and the one of the candidate that belongs to it. One of them is there at least. */
export interface Pair {
  /** `solveKey` of the candidate's solve, of the reference's where it has none. Unique in a comparison. */
  key: string;
  /** The candidate's name of the solver; the reference's where it is gone. */
  solver: string;
  /** The reference's name of the solver where it differs, else null. */
  formerly: string | null;
  case: string;
  start: number | null;
  family: string;
  traits: readonly string[];
  reference: SolveRecord | null;
  candidate: SolveRecord | null;
  /** The gravest change. */
  change: Change;
  /** The other changes, gravest first. */
  others: Change[];
  /** Candidate less reference, in evaluations; null where not both solved. */
  difference: number | null;
  /** Candidate less reference, in correct digits; null where not both solved or a root is not on file. */
  digits: number | null;
  /** Evaluations at an x asked for before, candidate less reference, where that is above 0 and cost rose. */
  repeatedMore: number;
}

export type NotComparedReason = 'case changed' | 'not run';

/** A solve of the reference that has no counterpart, through no change of the solver. */
export interface NotCompared {
  solver: string;
  case: string;
  start: number | null;
  /** `case changed`: its hash differs. `not run`: the candidate's run has no result for it. */
  reason: NotComparedReason;
}

/** A solver on one side: solves that apply, how many succeeded (solved or rightly refused). */
export interface SolvedCount {
  solved: number;
  of: number;
}

/** A cost on both sides over the same pairs; `percent`: more, 100 × relative change; null for nothing. */
export interface CostPair {
  reference: number;
  candidate: number;
  percent: number | null;
}

/** How often the query check found something on one side: in how many solves of how many, and how often in all. */
export interface FindingCount {
  solves: number;
  of: number;
  evaluations: number;
}

export interface OrderSummary {
  /** Median of the orders that could be estimated; null where none could. */
  median: number | null;
  count: number;
}

/** One solver over all its compared pairs. */
export interface SolverTotals {
  solver: string;
  formerly: string | null;
  presence: 'both' | 'new' | 'gone';
  claim: number | null;
  /** What it may ask for, as it declares. */
  uses: readonly EvaluationKind[];
  reference: SolvedCount;
  candidate: SolvedCount;
  /** Pairs that both solved: the only ones whose cost is counted. */
  pairs: number;
  evaluations: CostPair;
  /** Mean evaluations of a case (its starts averaged); percent: the mean of the relative changes of the cases. */
  perCase: CostPair;
  /** The same over families, each the mean of its cases: families that differ by scale alone weigh once. */
  perFamily: CostPair;
  findings: Record<QueryFinding, { reference: FindingCount; candidate: FindingCount }>;
  order: { reference: OrderSummary; candidate: OrderSummary };
  changes: Partial<Record<Change, number>>;
}

export type AllowanceName = keyof Allowances;

/** What a limit holds for: everything without an exception, one solver, or cases with a trait. */
export interface Scope {
  solver: string | null;
  trait: string | null;
}

/** One allowance that the candidate goes beyond. */
export interface Breach {
  allowance: AllowanceName;
  limit: number;
  /** What was found, in the allowance's unit; the worst pair's where it holds for each pair. null: from 0. */
  figure: number | null;
  scope: Scope;
  /** Keys of the pairs concerned, the worst first; all that both solved, for totals. */
  pairs: string[];
}

export interface Comparison {
  reference: string;
  candidate: string;
  verdict: Verdict;
  /** Why nothing, or not everything, could be told; empty else. Sentences. */
  reasons: string[];
  /** false: the arithmetic of the two runs differs, so that a difference need not be one of the builds. */
  exact: boolean;
  breaches: Breach[];
  /** In the order of the candidate's solvers, the suite's cases and starts; gone ones last. */
  pairs: Pair[];
  /** Keys of solves that apply in neither run. */
  notApplicable: string[];
  notCompared: NotCompared[];
  totals: SolverTotals[];
  /** All solvers together. */
  overall: { reference: SolvedCount; candidate: SolvedCount; pairs: number; evaluations: CostPair };
  changes: Partial<Record<Change, number>>;
}
