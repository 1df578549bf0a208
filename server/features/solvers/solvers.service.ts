import type { SolverView } from '../../../shared/schemas/libraries.ts';
import type { Db } from '../../db/client.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import { presentSolver } from './solvers.present.ts';
import { createSolversRepo } from './solvers.repo.ts';

export function createSolversService(db: Db, libraries: LibrariesService) {
  const repo = createSolversRepo(db);
  return {
    /** All of them: a manifest declares at most 200. */
    list(library: string): { items: SolverView[] } {
      const { id } = libraries.require(library);
      return { items: repo.listQuery(id).all().map(presentSolver) };
    },
  };
}

export type SolversService = ReturnType<typeof createSolversService>;
