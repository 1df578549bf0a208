import { isRightlyRefused } from '../../../shared/numerics/judge-claim.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SolveView } from '../../../shared/schemas/runs.ts';
import type { Outcome } from '../../../shared/schemas/words.ts';

/** A row of the table of a run: a case, and which of its start lists where several are solved. */
export interface MatrixRow {
  key: string;
  caseId: string;
  suiteCase: SuiteCase | undefined;
  /** Place among the rows of its case, from 0. */
  part: number;
  partCount: number;
  /** By solver. */
  solves: Map<string, SolveView>;
}

/** An outcome as the filter has it: a right refusal stands for itself. */
export type OutcomeWord = Outcome | 'rightly refused';

export function outcomeWord(solve: SolveView): OutcomeWord {
  return isRightlyRefused(solve) ? 'rightly refused' : solve.outcome;
}

/** Rows in the suite's order. The k-th solve of every solver on a case stands in the case's k-th row. */
export function buildMatrix(cases: readonly SuiteCase[], solves: readonly SolveView[]): MatrixRow[] {
  const byCase = new Map<string, Map<string, SolveView[]>>();
  for (const solve of solves) {
    const bySolver = byCase.get(solve.case) ?? new Map<string, SolveView[]>();
    byCase.set(solve.case, bySolver);
    bySolver.set(solve.solver, [...(bySolver.get(solve.solver) ?? []), solve]);
  }
  const known = new Set(cases.map((suiteCase) => suiteCase.id));
  const ids = [
    ...cases.map((suiteCase) => suiteCase.id),
    ...[...byCase.keys()].filter((id) => !known.has(id)),
  ];
  const caseOf = new Map(cases.map((suiteCase) => [suiteCase.id, suiteCase]));
  return ids.flatMap((caseId) => {
    const bySolver = byCase.get(caseId) ?? new Map<string, SolveView[]>();
    const partCount = Math.max(1, ...[...bySolver.values()].map((list) => list.length));
    return Array.from({ length: partCount }, (_, part): MatrixRow => {
      const row = new Map<string, SolveView>();
      for (const [solver, list] of bySolver) {
        const solve = list.toSorted((a, b) => (a.start ?? -1) - (b.start ?? -1))[part];
        if (solve !== undefined) row.set(solver, solve);
      }
      return {
        key: `${caseId} ${part}`,
        caseId,
        suiteCase: caseOf.get(caseId),
        part,
        partCount,
        solves: row,
      };
    });
  });
}

export interface MatrixFilter {
  text: string;
  trait: string;
  outcomes: readonly string[];
  solvers: readonly string[];
}

/** Rows whose case matches text and trait and that have a shown solve with one of the outcomes. */
export function filterMatrix(rows: readonly MatrixRow[], filter: MatrixFilter): MatrixRow[] {
  const words = filter.text.toLowerCase().split(/\s+/).filter(Boolean);
  return rows.filter((row) => {
    const traits = row.suiteCase?.traits ?? [];
    if (filter.trait !== '' && !traits.includes(filter.trait)) return false;
    const haystack = [row.caseId, row.suiteCase?.equation ?? '', ...traits].join(' ').toLowerCase();
    if (!words.every((word) => haystack.includes(word))) return false;
    if (filter.outcomes.length === 0) return true;
    return [...row.solves.values()].some(
      (solve) => filter.solvers.includes(solve.solver) && filter.outcomes.includes(outcomeWord(solve)),
    );
  });
}
