import type { Pair } from '../../../shared/comparison/comparison.ts';
import { AppError } from '../../../shared/errors.ts';
import { type ProfileCosts, performanceProfiles } from '../../../shared/numerics/profiles.ts';
import type { ComparisonProfileQuery } from '../../../shared/schemas/comparisons.ts';
import type { ProfileView, RunProfileQuery } from '../../../shared/schemas/profiles.ts';
import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import { outcomeCode } from '../../db/codes.ts';
import type { RunSolves } from '../runs/run-solves.ts';
import type { RunsService } from '../runs/runs.service.ts';
import type { SolveCostRow, SolvesRepo } from '../runs/solves.repo.ts';
import type { ComparisonsService } from './comparisons.service.ts';

/** What one name did on one problem: its cost, null for a failure, undefined where that cannot be said. */
type Cost = number | null | undefined;

/** Solves of which a case without a root asks nothing that has a price. */
function costOf(solve: SolveRecord): Cost {
  if (solve.remarks.some((remark) => remark.code === 'rightly refused')) return undefined;
  if (solve.outcome !== 'solved') return null;
  return solve.evaluations > 0 ? solve.evaluations : undefined;
}

/** Problems of which a cost or a failure is known for every name. */
function viewOf(names: readonly string[], problems: readonly (readonly Cost[])[]): ProfileView {
  const known = problems.flatMap((costs) => {
    const told = costs.filter((cost) => cost !== undefined);
    return told.length === names.length ? [told] : [];
  });
  const all = names.map((name, index): ProfileCosts => {
    return { name, costs: known.map((costs) => costs[index] ?? null) };
  });
  return {
    cost: 'evaluations',
    problems: known.length,
    leftOut: problems.length - known.length,
    profiles: performanceProfiles(all),
  };
}

function rowCost([, , outcome, evaluations, isRightlyRefused]: SolveCostRow): Cost {
  if (isRightlyRefused === 1) return undefined;
  if (outcome !== outcomeCode.solved) return null;
  return evaluations > 0 ? evaluations : undefined;
}

/** The mean over its starts, and a failure where one of them failed. */
function caseCost(rows: readonly SolveCostRow[]): Cost {
  const costs = rows.filter((row) => row[2] !== outcomeCode['not applicable']).map(rowCost);
  if (costs.length === 0 || costs.includes(undefined)) return undefined;
  if (costs.includes(null)) return null;
  return costs.reduce<number>((sum, cost) => sum + (cost ?? 0), 0) / costs.length;
}

export function createProfilesService(deps: {
  runs: RunsService;
  runSolves: RunSolves;
  solves: SolvesRepo;
  comparisons: ComparisonsService;
}) {
  return {
    /** Two builds, over the pairs that both have: a problem each. */
    ofComparison(query: ComparisonProfileQuery): ProfileView {
      const { comparison } = deps.comparisons.load(query);
      const { solver } = query;
      const pairs = comparison.pairs.filter((pair) => solver === undefined || pair.solver === solver);
      if (solver !== undefined && pairs.length === 0)
        throw new AppError('not_found', `This comparison has no solver “${solver}”.`);
      const side = (pair: Pair, which: 'reference' | 'candidate'): Cost => {
        const solve = pair[which];
        return solve === null ? undefined : costOf(solve);
      };
      return viewOf(
        [comparison.reference, comparison.candidate],
        pairs.map((pair) => [side(pair, 'reference'), side(pair, 'candidate')]),
      );
    },
    /** The solvers of a run, over the cases that apply to all of them: a problem each, whatever their starts. */
    ofRun(id: number, query: RunProfileQuery): ProfileView {
      const run = deps.runs.requireRun(id);
      const keys = deps.runSolves.keysOf(run);
      const all = keys.solvers.map((solver) => solver.name);
      const unknown = query.solver?.find((name) => !all.includes(name));
      if (unknown !== undefined) throw new AppError('not_found', `Run ${id} has no solver “${unknown}”.`);
      const names = query.solver === undefined ? all : all.filter((name) => query.solver?.includes(name));
      const byKey = new Map<string, SolveCostRow[]>();
      for (const row of deps.solves.readCosts(run.id)) {
        const key = `${row[1]} ${row[0]}`;
        const known = byKey.get(key);
        if (known) known.push(row);
        else byKey.set(key, [row]);
      }
      const costIn = (caseId: number, name: string): Cost =>
        caseCost(byKey.get(`${caseId} ${keys.positionOf.get(name)}`) ?? []);
      return viewOf(
        names,
        keys.cases.map(({ id: caseId }) => names.map((name) => costIn(caseId, name))),
      );
    },
  };
}

export type ProfilesService = ReturnType<typeof createProfilesService>;
