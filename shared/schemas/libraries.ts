import { z } from 'zod';
import { pageOf, slug } from './paging.ts';
import { solverDeclaration, solverName } from './solver.ts';

export const createLibraryBody = z.strictObject({
  slug,
  name: z.string().trim().min(1).max(100),
  description: z.string().trim().max(2000).default(''),
  /** Where its source lives, for people to read; null where nowhere. */
  homepage: z
    .url({ protocol: /^https?$/ })
    .max(500)
    .nullable()
    .default(null),
});
export type CreateLibraryBody = z.infer<typeof createLibraryBody>;

export const libraryView = z.strictObject({
  slug: z.string(),
  name: z.string(),
  description: z.string(),
  homepage: z.string().nullable(),
  createdAt: z.iso.datetime(),
  createdBy: z.string(),
  solverCount: z.int().min(0),
  buildCount: z.int().min(0),
  runCount: z.int().min(0),
});
export type LibraryView = z.infer<typeof libraryView>;
export const libraryPage = pageOf(libraryView);

/** A solver as the library's newest build declares it; `declared` is false once a build has left it out. */
export const solverView = z.strictObject({
  name: solverName,
  declared: z.boolean(),
  declaration: solverDeclaration,
  /** Number of the build that this declaration comes from. */
  build: z.int().min(1),
  updatedAt: z.iso.datetime(),
});
export type SolverView = z.infer<typeof solverView>;
export const solverList = z.strictObject({ items: z.array(solverView) });
