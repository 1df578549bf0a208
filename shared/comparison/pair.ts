import { type SolveRecord, solveKey } from '../schemas/solve.ts';
import type { SolverDeclaration } from '../schemas/solver.ts';
import type { ComparableCase, ComparableRun, NotCompared } from './comparison.ts';

/** Two solves that belong together, before it is said what changed. */
export interface MatchedPair {
  solver: string;
  formerly: string | null;
  case: ComparableCase;
  start: number | null;
  reference: SolveRecord | null;
  candidate: SolveRecord | null;
  /** As the candidate declares the solver; as the reference does where it is gone. */
  declaration: SolverDeclaration | null;
}

export interface Matching {
  pairs: MatchedPair[];
  notApplicable: string[];
  notCompared: NotCompared[];
}

/**
 * Pairs the solves of two runs by solver, case and start.
 *
 * A solver that was renamed pairs with its earlier name: by its own name where the reference has it, else by
 * the first of its `aliases` that the reference has and the candidate has no longer; and the other way round
 * where the reference is the later build. Cases pair by id; where their hashes differ the case has changed and
 * its solves are set aside. Not applicable on both sides: set aside. On one side: new or gone.
 * A solve of the reference without counterpart is gone where the solver is, takes something else now, or the
 * case is; else the candidate's run has just not come to it, and it is set aside as not run.
 * Linear in the number of solves.
 */
export function matchSolves(reference: ComparableRun, candidate: ComparableRun): Matching {
  const names = matchNames(reference.solvers, candidate.solvers);
  const casesBefore = new Map(reference.cases.map((one) => [one.id, one]));
  const casesNow = new Map(candidate.cases.map((one) => [one.id, one]));
  const before = new Map(reference.solvers.map((one) => [one.name, one]));
  const now = new Map(candidate.solvers.map((one) => [one.name, one]));
  const solvesBefore = new Map(reference.solves.map((solve) => [solveKey(solve), solve]));
  const seen = new Set<SolveRecord>();
  const result: Matching = { pairs: [], notApplicable: [], notCompared: [] };

  const put = (pair: MatchedPair) => {
    const [was, is] = [applicable(pair.reference), applicable(pair.candidate)];
    if (was !== null || is !== null) result.pairs.push({ ...pair, reference: was, candidate: is });
    else result.notApplicable.push(solveKey({ solver: pair.solver, case: pair.case.id, start: pair.start }));
  };

  for (const solve of candidate.solves) {
    const former = names.before.get(solve.solver) ?? solve.solver;
    const key = solveKey({ solver: former, case: solve.case, start: solve.start });
    const match = names.before.has(solve.solver) ? (solvesBefore.get(key) ?? null) : null;
    if (match !== null) seen.add(match);
    const { solver, start } = solve;
    const theCase = casesNow.get(solve.case) ?? bareCase(solve.case);
    if (match !== null && hasChanged(casesBefore.get(solve.case), casesNow.get(solve.case))) {
      result.notCompared.push({ solver, case: solve.case, start, reason: 'case changed' });
      continue;
    }
    const formerly = former === solver || match === null ? null : former;
    const declaration = now.get(solver) ?? null;
    put({ solver, formerly, case: theCase, start, reference: match, candidate: solve, declaration });
  }

  for (const solve of reference.solves) {
    if (seen.has(solve)) continue;
    const later = names.now.get(solve.solver);
    const [was, is] = [before.get(solve.solver), later === undefined ? undefined : now.get(later)];
    const [caseBefore, caseNow] = [casesBefore.get(solve.case), casesNow.get(solve.case)];
    const { start } = solve;
    if (later !== undefined && caseNow !== undefined && takesTheSame(was, is)) {
      const reason = hasChanged(caseBefore, caseNow) ? 'case changed' : 'not run';
      if (solve.outcome !== 'not applicable') {
        result.notCompared.push({ solver: later, case: solve.case, start, reason });
      }
      continue;
    }
    const theCase = caseNow ?? caseBefore ?? bareCase(solve.case);
    const solver = solve.solver;
    put({
      solver: later ?? solver,
      formerly: later === undefined || later === solver ? null : solver,
      case: theCase,
      start,
      reference: solve,
      candidate: null,
      declaration: is ?? was ?? null,
    });
  }
  return result;
}

/** Names of the reference's solvers by the candidate's, and the other way round. */
export function matchNames(
  reference: readonly SolverDeclaration[],
  candidate: readonly SolverDeclaration[],
): { before: Map<string, string>; now: Map<string, string> } {
  const hadName = new Set(reference.map((one) => one.name));
  const hasName = new Set(candidate.map((one) => one.name));
  const before = new Map<string, string>();
  const now = new Map<string, string>();
  const join = (later: string, earlier: string | undefined) => {
    if (earlier === undefined || before.has(later) || now.has(earlier)) return;
    before.set(later, earlier);
    now.set(earlier, later);
  };
  for (const { name } of candidate) if (hadName.has(name)) join(name, name);
  for (const { name, aliases } of candidate) {
    join(
      name,
      aliases.find((alias) => hadName.has(alias) && !hasName.has(alias) && !now.has(alias)),
    );
  }
  for (const { name, aliases } of reference) {
    const later = aliases.find((alias) => hasName.has(alias) && !hadName.has(alias) && !before.has(alias));
    if (later !== undefined) join(later, name);
  }
  return { before, now };
}

/** The family of a case: as given, else its id up to the first slash. */
export function familyOf({ id, family }: ComparableCase): string {
  if (family !== undefined) return family;
  const slash = id.indexOf('/');
  return slash < 0 ? id : id.slice(0, slash);
}

function applicable(solve: SolveRecord | null): SolveRecord | null {
  return solve?.outcome === 'not applicable' ? null : solve;
}

function hasChanged(before: ComparableCase | undefined, now: ComparableCase | undefined): boolean {
  return before !== undefined && now !== undefined && before.hash !== now.hash;
}

function takesTheSame(was: SolverDeclaration | undefined, is: SolverDeclaration | undefined): boolean {
  return was === undefined || is === undefined || (was.takes === is.takes && was.starts === is.starts);
}

function bareCase(id: string): ComparableCase {
  return { id, hash: '', traits: [] };
}
