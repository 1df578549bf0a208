import { AppError } from '../../shared/errors.ts';
import type { SuiteRevision } from '../../shared/schemas/case.ts';
import type { MeasurementFile } from '../../shared/schemas/measurement.ts';
import { pathToFile } from '../../shared/schemas/path.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';
import { readManifest } from '../builds/manifest.ts';
import { readBuildFolder } from '../features/builds/build-folder.ts';
import { describeEnvironment } from '../runner/environment.ts';
import { measure } from '../runner/measure.ts';
import { planSolves } from '../runner/plan-solves.ts';
import { shortLabel } from './short-label.ts';

export interface MeasureFolderOptions {
  /** Absolute path of a folder with a tallyroot.yaml, prepared and ready to run. */
  folder: string;
  suite: SuiteRevision;
  /** Names of solvers and ids of cases to keep; empty keeps all. */
  solvers?: readonly string[];
  cases?: readonly string[];
  lanes?: number;
  fresh?: boolean;
  /** Takes the place of what the manifest declares of a solver. */
  adjust?: (solver: SolverDeclaration) => SolverDeclaration;
  onPlanned?: (solves: number) => void;
  onSolved?: (solver: string, caseId: string) => void;
  onLog?: (text: string) => void;
  signal?: AbortSignal;
}

/**
 * Measures the build in a folder on a suite, with no server and no database.
 * Solves are in the order of solvers, cases and starts, whatever the lanes' order was.
 * @throws AppError where the folder, its manifest or a name is not right
 */
export async function measureFolder(options: MeasureFolderOptions): Promise<MeasurementFile> {
  const build = await readBuildFolder(options.folder, readManifest);
  const adjust = options.adjust ?? ((solver) => solver);
  const solvers = pick(build.recipe.solvers, options.solvers, (solver) => solver.name, 'solver').map(adjust);
  const cases = pick(options.suite.cases, options.cases, (one) => one.id, 'case');
  const { evaluations, seconds } = options.suite.limits;
  const settings = { evaluations, seconds, lanes: options.lanes ?? 1, fresh: options.fresh ?? false };
  const startedAt = new Date().toISOString();
  options.onPlanned?.(planSolves(solvers, cases).length);
  const solves: MeasurementFile['solves'] = [];
  const result = await measure({
    folder: build.folder,
    adapter: build.recipe.adapter,
    environment: build.recipe.environment,
    solvers,
    cases,
    limits: { evaluations, seconds },
    lanes: settings.lanes,
    fresh: settings.fresh,
    confinement: 'unconfined',
    onLog: options.onLog,
    signal: options.signal,
    onSolve: (record, path) => {
      solves.push({ ...record, path: path === null ? null : pathToFile(path) });
      options.onSolved?.(record.solver, record.case);
    },
  });
  return {
    format: 'tallyroot measurement 1',
    build: {
      library: build.recipe.library,
      label: shortLabel(build),
      commit: build.commit,
      adapterText: result.adapterText,
    },
    suite: {
      id: options.suite.id,
      title: options.suite.title,
      revision: options.suite.revision,
      cases: [...cases],
    },
    environment: describeEnvironment('unconfined'),
    solvers: [...solvers],
    settings,
    startedAt,
    elapsedMs: result.elapsedMs,
    stopped: result.stopped,
    solves: inPlannedOrder(solves, solvers, options.suite),
  };
}

function pick<T>(
  all: readonly T[],
  wanted: readonly string[] | undefined,
  nameOf: (one: T) => string,
  what: 'solver' | 'case',
): T[] {
  if (wanted === undefined || wanted.length === 0) return [...all];
  const names = all.map(nameOf);
  const missing = wanted.filter((name) => !names.includes(name));
  if (missing.length > 0) {
    const known = names.length <= 30 ? ` There are: ${names.join(', ')}.` : ` There are ${names.length}.`;
    throw new AppError('not_found', `There is no ${what} ${missing.join(', ')}.${known}`);
  }
  return all.filter((one) => wanted.includes(nameOf(one)));
}

function inPlannedOrder(
  solves: MeasurementFile['solves'],
  solvers: readonly SolverDeclaration[],
  suite: SuiteRevision,
): MeasurementFile['solves'] {
  const solverAt = new Map(solvers.map((solver, index) => [solver.name, index]));
  const caseAt = new Map(suite.cases.map((one, index) => [one.id, index]));
  const rank = (solve: MeasurementFile['solves'][number]): [number, number, number] => {
    return [solverAt.get(solve.solver) ?? 0, caseAt.get(solve.case) ?? 0, solve.start ?? -1];
  };
  const ranked = solves.map((solve) => ({ solve, rank: rank(solve) }));
  ranked.sort((a, b) => a.rank[0] - b.rank[0] || a.rank[1] - b.rank[1] || a.rank[2] - b.rank[2]);
  return ranked.map(({ solve }) => solve);
}
