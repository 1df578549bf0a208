import { z } from 'zod';
import { suiteCase } from './case.ts';
import { pathFile } from './path.ts';
import { solveRecord } from './solve.ts';
import { solverDeclaration } from './solver.ts';

/** Where and with what a run was made. Runs with different fingerprints are not compared as exact. */
export const environment = z.strictObject({
  platform: z.string(),
  arch: z.string(),
  node: z.string(),
  v8: z.string(),
  tallyroot: z.string(),
  /** Hash of the result bits of a fixed list of arguments. */
  fingerprint: z.string(),
  confinement: z.enum(['unconfined', 'sandboxed']),
});
export type Environment = z.infer<typeof environment>;

export const measuredBuild = z.strictObject({
  library: z.string(),
  /** Folder name, commit or other label that tells builds apart. */
  label: z.string(),
  /** Full commit hash where the folder is a clean checkout, else null. */
  commit: z.string().nullable(),
  /** The text after `ready 1`. */
  adapterText: z.string(),
});
export type MeasuredBuild = z.infer<typeof measuredBuild>;

/** The file that `measure --json` writes and `compare` and `trace` read. */
export const measurementFile = z.strictObject({
  format: z.literal('tallyroot measurement 1'),
  build: measuredBuild,
  suite: z.strictObject({
    id: z.string(),
    title: z.string(),
    revision: z.string(),
    cases: z.array(suiteCase),
  }),
  environment,
  solvers: z.array(solverDeclaration),
  settings: z.strictObject({
    evaluations: z.int().min(1),
    seconds: z.number().positive(),
    lanes: z.int().min(1),
    fresh: z.boolean(),
  }),
  startedAt: z.iso.datetime(),
  elapsedMs: z.number().min(0),
  /** Why the run ended early, in a sentence; null where every solve was tried. */
  stopped: z.string().nullable(),
  solves: z.array(solveRecord.extend({ path: pathFile.nullable() })),
});
export type MeasurementFile = z.infer<typeof measurementFile>;
