import { AppError } from '../../../shared/errors.ts';
import type { Page } from '../../../shared/schemas/paging.ts';
import { type Path, pathToFile } from '../../../shared/schemas/path.ts';
import type { SolveDetail, SolvesQuery, SolveView } from '../../../shared/schemas/runs.ts';
import { numberCursor, toPage } from '../../db/cursor.ts';
import type { CaseRow } from '../suites/suites.repo.ts';
import type { RunSolves } from './run-solves.ts';
import { presentSolve } from './runs.present.ts';
import type { RunsService } from './runs.service.ts';
import { cursorLength, type SolveListRepo } from './solve-list.repo.ts';
import type { SolvesRepo } from './solves.repo.ts';

/** The cases that a filter leaves, by row; undefined where it leaves all. */
function chooseCases(
  cases: CaseRow[],
  query: Pick<SolvesQuery, 'case' | 'trait' | 'text'>,
): number[] | undefined {
  const { case: name, trait } = query;
  const text = query.text?.trim().toLowerCase() ?? '';
  if (name === undefined && trait === undefined && text === '') return undefined;
  return cases
    .filter(
      ({ case: item }) =>
        (name === undefined || item.id === name) &&
        (trait === undefined || item.traits.includes(trait)) &&
        (text === '' || item.id.toLowerCase().includes(text) || item.equation.toLowerCase().includes(text)),
    )
    .map((row) => row.id);
}

export function createSolvesService(deps: {
  runs: RunsService;
  runSolves: RunSolves;
  solves: SolvesRepo;
  lists: SolveListRepo;
  decodePath(data: Buffer): Path;
}) {
  return {
    list(runId: number, query: SolvesQuery): Page<SolveView> {
      const run = deps.runs.requireRun(runId);
      const keys = deps.runSolves.keysOf(run);
      const solver = query.solver === undefined ? undefined : keys.positionOf.get(query.solver);
      if (query.solver !== undefined && solver === undefined)
        throw new AppError('not_found', `Run ${runId} has no solver “${query.solver}”.`);
      const rows = deps.lists.list({
        runId,
        solver,
        outcomes: query.outcome,
        caseIds: chooseCases(keys.cases, query),
        sort: query.sort,
        direction: query.direction,
        limit: query.limit + 1,
        after: numberCursor(query.cursor, cursorLength(query.sort)),
      });
      return toPage(
        rows,
        query.limit,
        (row) => row.cursor,
        ({ row }) => presentSolve(row, keys.names),
      );
    },
    /** One solve with its path. */
    get(id: number): SolveDetail {
      const row = deps.solves.readOne(id);
      const runId = deps.solves.readRunOf(id);
      if (!row || runId === undefined) throw new AppError('not_found', `There is no solve ${id}.`);
      const run = deps.runs.requireRun(runId);
      const keys = deps.runSolves.keysOf(run);
      const declaration = keys.solvers.find((solver) => solver.position === row[1])?.declaration;
      if (!declaration) throw new RangeError(`Solve ${id} has a solver that its run does not have`);
      const data = deps.solves.readPath(id);
      const path = data === undefined ? null : pathToFile(deps.decodePath(data));
      return { ...presentSolve(row, keys.names), run: runId, declaration, path };
    },
    /** The path as it was recorded, for whoever computes with it; undefined where nothing was asked. */
    readPath(id: number): Path | undefined {
      const data = deps.solves.readPath(id);
      return data && deps.decodePath(data);
    },
  };
}

export type SolvesService = ReturnType<typeof createSolvesService>;
