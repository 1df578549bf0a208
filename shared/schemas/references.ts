import { z } from 'zod';
import { pageOf, pageQuery } from './paging.ts';
import { solveView } from './runs.ts';
import { solverName } from './solver.ts';

/** Makes the results of a finished run the first reference of its library, suite and platform. */
export const setReferenceBody = z.strictObject({
  run: z.int().min(1),
  reason: z.string().trim().min(1).max(2000),
});
export type SetReferenceBody = z.infer<typeof setReferenceBody>;

/** One link of a chain: who agreed to what, when and why. Nothing in it is ever changed. */
export const referenceRevisionView = z.strictObject({
  id: z.int().min(1),
  library: z.string(),
  suite: z.string(),
  platform: z.string(),
  number: z.int().min(1),
  parent: z.int().min(1).nullable(),
  run: z.int().min(1).nullable(),
  reason: z.string(),
  createdAt: z.iso.datetime(),
  createdBy: z.string(),
  /** Entries that this revision introduced. */
  changed: z.int().min(0),
});
export type ReferenceRevisionView = z.infer<typeof referenceRevisionView>;
export const referenceRevisionPage = pageOf(referenceRevisionView);

export const referenceQuery = pageQuery.extend({
  suite: z.string().max(120).optional(),
  platform: z.string().max(60).optional(),
});
export const referenceEntriesQuery = pageQuery.extend({ solver: solverName.optional() });
export type ReferenceEntriesQuery = z.infer<typeof referenceEntriesQuery>;

/** What a solver is agreed to do on a case, as of a revision: the solve, and the revision that it came with. */
export const referenceEntryView = z.strictObject({
  solver: z.string(),
  case: z.string(),
  start: z.int().min(0).nullable(),
  solve: solveView,
  run: z.int().min(1),
  since: z.int().min(1),
  reason: z.string(),
  decidedBy: z.string(),
  decidedAt: z.iso.datetime(),
});
export type ReferenceEntryView = z.infer<typeof referenceEntryView>;
export const referenceEntryPage = pageOf(referenceEntryView);
