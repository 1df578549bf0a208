import { z } from 'zod';
import { pageOf } from './paging.ts';
import { solverDeclaration } from './solver.ts';

/** What a manifest says about running a build, defaults filled in. */
export const recipe = z.strictObject({
  library: z.string(),
  prepare: z.array(z.string()),
  adapter: z.string(),
  environment: z.record(z.string(), z.string()),
  solvers: z.array(solverDeclaration),
});
export type Recipe = z.infer<typeof recipe>;

export const commitHash = z
  .string()
  .regex(/^(?:[0-9a-f]{40}|[0-9a-f]{64})$/, 'a full commit hash was expected (40 or 64 hexadecimal digits)');

/**
 * Registers a folder on this machine that holds a prepared checkout with its `tallyroot.yaml`.
 * `commit` may be left out where the folder is a clean Git checkout: it is read from there.
 */
export const registerBuildBody = z.strictObject({
  folder: z.string().min(1).max(4096),
  commit: commitHash.optional(),
  label: z.string().trim().min(1).max(120).optional(),
});
export type RegisterBuildBody = z.infer<typeof registerBuildBody>;

export const buildView = z.strictObject({
  id: z.int().min(1),
  library: z.string(),
  label: z.string(),
  commit: z.string().nullable(),
  source: z.enum(['folder']),
  folder: z.string(),
  recipe,
  createdAt: z.iso.datetime(),
  createdBy: z.string(),
  runCount: z.int().min(0),
});
export type BuildView = z.infer<typeof buildView>;
export const buildPage = pageOf(buildView);
