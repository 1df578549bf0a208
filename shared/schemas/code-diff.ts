import { z } from 'zod';

/** What changed in the source between two builds. */

const count = z.int().min(0);

/**
 * One line. `number` counts from 1: in the file before for `was`, in the file after for `new` and `same`.
 * Characters that cannot be seen or that turn the direction of writing stand in `text` as ⟨U+202E⟩, so that it
 * is safe to show as it is; `marks` gives where (UTF-16 offsets, `to` exclusive), to tell them from the same
 * signs written out. `cut`: characters left out at the end of a very long line.
 */
export const diffLine = z.strictObject({
  kind: z.enum(['same', 'was', 'new']),
  number: z.int().min(1),
  text: z.string(),
  marks: z.array(z.strictObject({ from: count, to: count })),
  cut: count,
  /** The last line of its file, without a line end behind it. */
  isUnended: z.boolean(),
});
export type DiffLine = z.infer<typeof diffLine>;

export const diffHunk = z.strictObject({ lines: z.array(diffLine) });
export type DiffHunk = z.infer<typeof diffHunk>;

/** `too large`: a side is over the limit for one file. `left out`: the limit for all files was reached before. */
export const diffContents = z.enum(['lines', 'binary', 'too large', 'left out']);
export type DiffContents = z.infer<typeof diffContents>;

const diffSide = z.strictObject({
  bytes: count,
  kind: z.enum(['file', 'link', 'submodule']),
  isExecutable: z.boolean(),
});

export const fileDiff = z.strictObject({
  /** Safe to show, like the text of a line. */
  path: z.string(),
  /** Where it was before, for `renamed`: the same contents under another path. */
  pathBefore: z.string().nullable(),
  status: z.enum(['new', 'removed', 'changed', 'renamed']),
  before: diffSide.nullable(),
  after: diffSide.nullable(),
  contents: diffContents,
  /** Lines that were added and taken away; null where the contents were not compared by line. */
  addedLines: count.nullable(),
  removedLines: count.nullable(),
  /** True where the two differ too much to be compared line by line: all of the one, then all of the other. */
  isReplacement: z.boolean(),
  hunks: z.array(diffHunk),
  /** Lines of hunks that the limit for all files left no room for. */
  linesLeftOut: count,
});
export type FileDiff = z.infer<typeof fileDiff>;

export const codeDiff = z.strictObject({
  /** Source first, then what builds it, tests, other files, documents, generated files. */
  files: z.array(fileDiff),
  /** Files beyond the limit: how many, and the first of their paths. */
  filesLeftOut: count,
  pathsLeftOut: z.array(z.string()),
  linesLeftOut: count,
});
export type CodeDiff = z.infer<typeof codeDiff>;

const comparedBuild = z.strictObject({ id: z.int(), label: z.string(), commit: z.string().nullable() });

/** What changed in the source between the builds of the two sides of a comparison. */
export const codeDiffView = codeDiff.extend({
  reference: comparedBuild,
  candidate: comparedBuild,
  /** False where a folder of this machine was read as it is now, which may not be as it was when it was run. */
  isOfRecord: z.boolean(),
});
export type CodeDiffView = z.infer<typeof codeDiffView>;
