import { z } from 'zod';
import { pageOf, rowId } from './paging.ts';
import { issue } from './problem.ts';
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

/** Registers what a preview has shown, under a label of one's own or the one that its source suggests. */
export const registerPreviewBody = z.strictObject({
  preview: rowId,
  label: z.string().trim().min(1).max(120).optional(),
});
export type RegisterPreviewBody = z.infer<typeof registerPreviewBody>;

/** `git`: one commit of a repository. `archive`: an uploaded file. `folder`: where it lies on this machine. */
export const buildSources = ['folder', 'git', 'archive'] as const;
export type BuildSource = (typeof buildSources)[number];

/** `waiting` and `preparing`: its prepare lines have not all been run. Only a `ready` build can be run. */
export const buildStates = ['waiting', 'preparing', 'ready', 'failed'] as const;
export type BuildState = (typeof buildStates)[number];

const sourceFields = {
  source: z.enum(buildSources),
  /** The repository and the branch, tag or commit that was asked for; null where it did not come from one. */
  address: z.string().nullable(),
  ref: z.string().nullable(),
  commit: z.string().nullable(),
  /** First line of the commit. */
  subject: z.string().nullable(),
  /** sha-256, hex, over the names and contents of the files of an archive. */
  contentHash: z.string().nullable(),
};

export const buildView = z.strictObject({
  id: z.int().min(1),
  library: z.string(),
  label: z.string(),
  ...sourceFields,
  folder: z.string(),
  recipe,
  state: z.enum(buildStates),
  /** Why it could not be prepared, in a sentence. */
  reason: z.string().nullable(),
  createdAt: z.iso.datetime(),
  createdBy: z.string(),
  runCount: z.int().min(0),
});
export type BuildView = z.infer<typeof buildView>;
export const buildPage = pageOf(buildView);

/** Where a build is to come from; an archive is sent as a form with one file, `archive`. */
export const previewBuildBody = z
  .strictObject({
    git: z.strictObject({ address: z.string().min(1).max(2048), ref: z.string().min(1).max(255) }).optional(),
    folder: z.string().min(1).max(4096).optional(),
  })
  .refine((body) => (body.git === undefined) !== (body.folder === undefined), {
    message: 'give either git (address and ref) or folder',
  });
export type PreviewBuildBody = z.infer<typeof previewBuildBody>;

/** What would be registered, read and not run. Either `recipe` is there, or `issues` say why it is not. */
export const buildPreviewView = z.strictObject({
  id: z.int().min(1),
  library: z.string(),
  ...sourceFields,
  /** The label that the build gets where none is given. */
  label: z.string(),
  recipe: recipe.nullable(),
  issues: z.array(issue),
  /** Paths of submodules, which are not fetched: empty folders in the build. */
  submodules: z.array(z.string()),
  /** The build of this library that has the same commit or contents already. */
  existing: z.strictObject({ id: z.int().min(1), label: z.string(), state: z.enum(buildStates) }).nullable(),
  createdAt: z.iso.datetime(),
  createdBy: z.string(),
  expiresAt: z.iso.datetime(),
});
export type BuildPreviewView = z.infer<typeof buildPreviewView>;

/** `line`: a prepare line begins. `output`: what it wrote. `note`: how it ended. */
export const logKinds = ['line', 'output', 'note'] as const;
export const buildLogPiece = z.strictObject({ id: z.int(), kind: z.enum(logKinds), text: z.string() });
export type BuildLogPiece = z.infer<typeof buildLogPiece>;

/** `isCut`: earlier pieces are not kept. */
export const buildLog = z.strictObject({
  build: z.int().min(1),
  state: z.enum(buildStates),
  reason: z.string().nullable(),
  isCut: z.boolean(),
  pieces: z.array(buildLogPiece),
});
export type BuildLog = z.infer<typeof buildLog>;

/** One event of a log that is being written; the stream ends behind a final state. */
export const buildLogEvent = z.discriminatedUnion('kind', [
  buildLogPiece,
  z.strictObject({ kind: z.literal('state'), state: z.enum(buildStates), reason: z.string().nullable() }),
]);
export type BuildLogEvent = z.infer<typeof buildLogEvent>;

export const gitRefsQuery = z.strictObject({ address: z.string().min(1).max(2048) });
const gitRef = z.strictObject({ name: z.string(), commit: z.string() });
export const gitRefs = z.strictObject({
  defaultBranch: z.string().nullable(),
  branches: z.array(gitRef),
  tags: z.array(gitRef),
});
export type GitRefs = z.infer<typeof gitRefs>;
