import { and, eq } from 'drizzle-orm';
import type { Role } from '../../shared/permissions.ts';
import type { Db } from '../db/client.ts';
import { builds, libraries } from '../db/schema/libraries.ts';
import { members } from '../db/schema/people.ts';
import { referenceChains, referenceRevisions } from '../db/schema/references.ts';
import { runs, solves } from '../db/schema/runs.ts';

/** Something that belongs to a library, as a request names it. */
export type Target =
  | { library: string }
  | { build: number }
  | { run: number }
  | { solve: number }
  | { reference: number };

export interface TargetLibrary {
  id: number;
  slug: string;
  visibility: 'public' | 'private';
}

const columns = { id: libraries.id, slug: libraries.slug, visibility: libraries.visibility };

export function createAccessRepo(db: Db) {
  return {
    libraryOf(target: Target): TargetLibrary | undefined {
      const query = db.select(columns).from(libraries).$dynamic();
      if ('library' in target) return query.where(eq(libraries.slug, target.library)).get();
      if ('build' in target)
        return query
          .innerJoin(builds, eq(builds.libraryId, libraries.id))
          .where(eq(builds.id, target.build))
          .get();
      if ('run' in target)
        return query.innerJoin(runs, eq(runs.libraryId, libraries.id)).where(eq(runs.id, target.run)).get();
      if ('solve' in target)
        return query
          .innerJoin(runs, eq(runs.libraryId, libraries.id))
          .innerJoin(solves, eq(solves.runId, runs.id))
          .where(eq(solves.id, target.solve))
          .get();
      return query
        .innerJoin(referenceChains, eq(referenceChains.libraryId, libraries.id))
        .innerJoin(referenceRevisions, eq(referenceRevisions.chainId, referenceChains.id))
        .where(eq(referenceRevisions.id, target.reference))
        .get();
    },
    roleIn: (libraryId: number, person: string): Role | null =>
      db
        .select({ role: members.role })
        .from(members)
        .where(and(eq(members.libraryId, libraryId), eq(members.userId, person)))
        .get()?.role ?? null,
    rolesOf: (person: string): Role[] =>
      db
        .selectDistinct({ role: members.role })
        .from(members)
        .where(eq(members.userId, person))
        .all()
        .map((row) => row.role),
  };
}

export type AccessRepo = ReturnType<typeof createAccessRepo>;
