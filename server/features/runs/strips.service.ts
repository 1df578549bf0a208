import { rootOfSolve } from '../../../shared/numerics/root-of-solve.ts';
import { rootReference } from '../../../shared/numerics/root-reference.ts';
import { stripEvents } from '../../../shared/numerics/strip-events.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { Path } from '../../../shared/schemas/path.ts';
import type { SolveStrip, StripEvent } from '../../../shared/schemas/strips.ts';
import type { RunKeys, RunSolves } from './run-solves.ts';
import { presentSolve } from './runs.present.ts';
import type { RunsService } from './runs.service.ts';
import type { SolvesRepo } from './solves.repo.ts';

/** Digit strips of many solves at once, for tables: a strip is a twentieth of what the path is as text. */
export function createStripsService(deps: {
  runs: RunsService;
  runSolves: RunSolves;
  solves: SolvesRepo;
  decodePath(data: Buffer): Path;
}) {
  return {
    /** The runs that the solves belong to; solves that are not there are left out. */
    runsOf(solves: readonly number[]): number[] {
      const runs = solves.flatMap((id) => deps.solves.readRunOf(id) ?? []);
      return [...new Set(runs)];
    },
    /** In the order asked for; ids of solves that are not there are left out. */
    read(solves: readonly number[]): SolveStrip[] {
      const keysOf = new Map<number, RunKeys>();
      return solves.flatMap((id): SolveStrip[] => {
        const row = deps.solves.readOne(id);
        const runId = deps.solves.readRunOf(id);
        if (!row || runId === undefined) return [];
        const keys = keysOf.get(runId) ?? deps.runSolves.keysOf(deps.runs.requireRun(runId));
        keysOf.set(runId, keys);
        const suiteCase = keys.cases.find((one) => one.id === row[2])?.case;
        const data = deps.solves.readPath(id);
        if (!suiteCase || data === undefined) return [{ solve: id, events: null }];
        return [
          {
            solve: id,
            events: stripOf(suiteCase, presentSolve(row, keys.names).nearest, deps.decodePath(data)),
          },
        ];
      });
    },
  };
}

function stripOf(suiteCase: SuiteCase, nearest: number | null, path: Path): StripEvent[] | null {
  const lastX = path.events.findLast((event) => Number.isFinite(event.x))?.x ?? Number.NaN;
  const index = rootOfSolve({ nearest }, suiteCase, lastX);
  const root = index === null ? undefined : suiteCase.roots[index];
  if (root === undefined) return null;
  return stripEvents(path, rootReference(root.value)).map((event) => {
    // Hundredths of a digit are a tenth of a pixel; the rest would be sent for nothing.
    return { ...event, digits: event.digits === null ? null : Math.round(event.digits * 100) / 100 };
  });
}

export type StripsService = ReturnType<typeof createStripsService>;
