import type { SuiteCase } from '../../shared/schemas/case.ts';
import type { Path } from '../../shared/schemas/path.ts';
import { type SolveRecord, solveKey } from '../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';
import type { LaneJob } from './lane-messages.ts';
import { type PlannedSolve, planSolves } from './plan-solves.ts';
import { recordWithoutRun } from './record-solve.ts';
import { type RunOptions, type RunResult, runWork } from './run-work.ts';

export interface MeasureOptions extends RunOptions {
  /** Solves that are stored already and shall be left out, by `solveKey`. */
  isDone?: ((key: string) => boolean) | undefined;
  /** Each solve once, in an order that may differ from the plan's; the path is null where nothing ran. */
  onSolve: (record: SolveRecord, path: Path | null) => void;
  onStart?: ((solver: SolverDeclaration, suiteCase: SuiteCase) => void) | undefined;
}

export type MeasureResult = RunResult;

/** Key of a planned solve, the same as `solveKey` of its record. */
function keyOf(options: Pick<RunOptions, 'solvers' | 'cases'>, planned: PlannedSolve): string {
  const solver = options.solvers[planned.solver]?.name ?? '';
  return solveKey({ solver, case: options.cases[planned.case]?.id ?? '', start: planned.start });
}

/** The plan with the number that each solve has on the wire: the same in every run and on every lane. */
export function numberedPlan(
  options: Pick<RunOptions, 'solvers' | 'cases'>,
): { key: string; entry: LaneJob['work'][number] }[] {
  return planSolves(options.solvers, options.cases).map((planned, index) => {
    return { key: keyOf(options, planned), entry: { id: index + 1, planned } };
  });
}

/**
 * Runs the solvers of a build on the cases of a suite: every solver on every case from every start list. Pairs
 * that are not applicable are recorded first, without anything going over the wire.
 * Rejects only where Tallyroot itself fails; whatever an adapter does is a result.
 */
export async function measure(options: MeasureOptions): Promise<MeasureResult> {
  const left = numberedPlan(options).filter(({ key }) => !options.isDone?.(key));
  for (const { entry } of left) {
    const { planned } = entry;
    const solver = options.solvers[planned.solver];
    const suiteCase = options.cases[planned.case];
    if (planned.why === null || !solver || !suiteCase) continue;
    const remarks = [{ code: 'why' as const, text: `Not applicable: ${planned.why}.` }];
    options.onSolve(recordWithoutRun(planned, solver, suiteCase, 'not applicable', remarks), null);
  }
  const work = left.map(({ entry }) => entry).filter(({ planned }) => planned.why === null);
  return runWork(options, work, { onSolve: options.onSolve, onStart: options.onStart, hasStreaks: true });
}
