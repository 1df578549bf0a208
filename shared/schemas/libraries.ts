import { z } from 'zod';
import { visibilities } from '../permissions.ts';
import { pageOf, slug } from './paging.ts';
import { solverDeclaration, solverName } from './solver.ts';

const name = z.string().trim().min(1).max(100);
const description = z.string().trim().max(2000);
/** Where its source lives, for people to read; null where nowhere. */
const homepage = z
  .url({ protocol: /^https?$/ })
  .max(500)
  .nullable();

export const createLibraryBody = z.strictObject({
  slug,
  name,
  description: description.default(''),
  homepage: homepage.default(null),
  /** Private where it is left out. */
  visibility: z.enum(visibilities).optional(),
});
export type CreateLibraryBody = z.infer<typeof createLibraryBody>;

/** What is left out stays as it is. */
export const changeLibraryBody = z.strictObject({
  name: name.optional(),
  description: description.optional(),
  homepage: homepage.optional(),
  visibility: z.enum(visibilities).optional(),
});
export type ChangeLibraryBody = z.infer<typeof changeLibraryBody>;

export const libraryView = z.strictObject({
  slug: z.string(),
  name: z.string(),
  description: z.string(),
  homepage: z.string().nullable(),
  visibility: z.enum(visibilities),
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
