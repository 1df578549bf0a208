import { compareRuns } from '../../../shared/comparison/compare.ts';
import type { ComparableRun, Comparison } from '../../../shared/comparison/comparison.ts';
import type { AllowanceSet } from '../../../shared/schemas/allowances.ts';
import type { RunDetail, SolveView } from '../../../shared/schemas/runs.ts';
import type { SuiteRevisionView } from '../../../shared/schemas/suites.ts';

/** A run as a side of a comparison, from what the server says of it: the same that the server compares. */
export function comparableOf(
  run: RunDetail,
  solves: readonly SolveView[],
  revision: SuiteRevisionView,
): ComparableRun {
  return {
    solves,
    solvers: run.solvers.map((solver) => solver.declaration),
    cases: revision.cases,
    fingerprint: run.environment?.fingerprint ?? 'not begun',
    label: `${run.build.label}, run ${run.id}`,
  };
}

export interface Judgeable {
  reference: ComparableRun;
  candidate: ComparableRun;
}

export interface Rejudged {
  now: Comparison;
  proposed: Comparison;
}

/** What a comparison says by the allowances that hold, and what it would say by others. */
export function rejudge(
  { reference, candidate }: Judgeable,
  now: AllowanceSet,
  proposed: AllowanceSet,
): Rejudged {
  return {
    now: compareRuns(reference, candidate, now),
    proposed: compareRuns(reference, candidate, proposed),
  };
}
