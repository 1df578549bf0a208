import { and, asc, eq, notInArray } from 'drizzle-orm';
import type { SolverDeclaration } from '../../../shared/schemas/solver.ts';
import type { Db } from '../../db/client.ts';
import { solvers } from '../../db/schema/libraries.ts';

export type SolverRow = typeof solvers.$inferSelect;

export function createSolversRepo(db: Db) {
  return {
    /** Takes over what a build declares; solvers that it leaves out are kept, as no longer declared. */
    declare(libraryId: number, buildId: number, declarations: SolverDeclaration[], now: number): void {
      for (const declaration of declarations) {
        const row = {
          libraryId,
          buildId,
          name: declaration.name,
          declaration,
          declared: true,
          updatedAt: now,
        };
        db.insert(solvers)
          .values(row)
          .onConflictDoUpdate({ target: [solvers.libraryId, solvers.name], set: row })
          .run();
      }
      const names = declarations.map((declaration) => declaration.name);
      db.update(solvers)
        .set({ declared: false, updatedAt: now })
        .where(
          and(
            eq(solvers.libraryId, libraryId),
            eq(solvers.declared, true),
            names.length > 0 ? notInArray(solvers.name, names) : undefined,
          ),
        )
        .run();
    },
    listQuery: (libraryId: number) =>
      db.select().from(solvers).where(eq(solvers.libraryId, libraryId)).orderBy(asc(solvers.name)),
  };
}
