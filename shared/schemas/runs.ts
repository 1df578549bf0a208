import { z } from 'zod';
import { environment } from './measurement.ts';
import { pageOf, pageQuery, rowId, slug } from './paging.ts';
import { pathFile } from './path.ts';
import { solveRecord } from './solve.ts';
import { solverDeclaration, solverName } from './solver.ts';
import { outcomes } from './words.ts';

/** `stopped`: ended early with a sentence that says why; what was measured until then is kept. */
export const runStatuses = ['queued', 'running', 'finished', 'stopped', 'cancelled', 'failed'] as const;
export type RunStatus = (typeof runStatuses)[number];

/** `confirming`: solves that differ from what the run is compared with are repeated in a fresh process. */
export const runPhases = ['waiting', 'measuring', 'confirming', 'done'] as const;
export type RunPhase = (typeof runPhases)[number];

export const runSettings = z.strictObject({
  evaluations: z.int().min(1).max(1_000_000),
  seconds: z.number().positive().max(3600),
  runSeconds: z.number().positive().max(86_400).nullable(),
  lanes: z.int().min(1).max(64),
  /** A new process for every solve. */
  fresh: z.boolean(),
  /** Which solves the confirming pass repeats. */
  confirm: z.enum(['differing', 'all', 'none']),
});
export type RunSettings = z.infer<typeof runSettings>;

/** What a run is compared with: another run, or a revision of the reference results. */
export const runBase = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('run'), run: z.int().min(1) }),
  z.strictObject({ kind: z.literal('reference'), revision: z.int().min(1) }),
]);
export type RunBase = z.infer<typeof runBase>;

/** `against` left out: the library's reference results for this suite and platform, where there are some. */
export const startRunBody = z.strictObject({
  build: z.int().min(1),
  suite: slug,
  revision: z.int().min(1).optional(),
  solvers: z.array(solverName).min(1).max(200).optional(),
  against: runBase.nullable().optional(),
  settings: runSettings.partial().optional(),
});
export type StartRunBody = z.input<typeof startRunBody>;

export const runProgress = z.strictObject({
  /** Solves that the run consists of. */
  planned: z.int().min(0),
  stored: z.int().min(0),
  solved: z.int().min(0),
  /** Solves of the confirming pass, and how many of them are decided. */
  toConfirm: z.int().min(0),
  confirmed: z.int().min(0),
  unsteady: z.int().min(0),
  evaluations: z.int().min(0),
});
export type RunProgress = z.infer<typeof runProgress>;

export const runView = z.strictObject({
  id: z.int().min(1),
  library: z.string(),
  build: z.strictObject({ id: z.int(), label: z.string(), commit: z.string().nullable() }),
  suite: z.strictObject({ slug: z.string(), title: z.string(), revision: z.int(), hash: z.string() }),
  status: z.enum(runStatuses),
  phase: z.enum(runPhases),
  /** Why it stopped early or failed, in a sentence. */
  reason: z.string().nullable(),
  settings: runSettings,
  against: runBase.nullable(),
  progress: runProgress,
  createdAt: z.iso.datetime(),
  createdBy: z.string(),
  startedAt: z.iso.datetime().nullable(),
  finishedAt: z.iso.datetime().nullable(),
  /** Time spent measuring, over all its starts. */
  elapsedMs: z.number().min(0),
});
export type RunView = z.infer<typeof runView>;
export const runPage = pageOf(runView);

/** One solver of a run in figures. Sums are over its stored solves; `evaluationsSolved` over solved ones alone. */
export const runSolverView = z.strictObject({
  declaration: solverDeclaration,
  outcomes: z.partialRecord(z.enum(outcomes), z.int().min(0)),
  stored: z.int().min(0),
  evaluations: z.int().min(0),
  evaluationsSolved: z.int().min(0),
  repeated: z.int().min(0),
  unsteady: z.int().min(0),
});
export type RunSolverView = z.infer<typeof runSolverView>;

export const runDetail = runView.extend({
  environment: environment.nullable(),
  adapterText: z.string().nullable(),
  log: z.string(),
  solvers: z.array(runSolverView),
});
export type RunDetail = z.infer<typeof runDetail>;

export const runsQuery = pageQuery.extend({
  library: slug.optional(),
  build: rowId.optional(),
  suite: slug.optional(),
  status: z.enum(runStatuses).optional(),
});
export type RunsQuery = z.infer<typeof runsQuery>;

export const solveSorts = [
  'solver',
  'case',
  'evaluations',
  'iterations',
  'digits',
  'order',
  'elapsed',
] as const;

/** Repeated `outcome` parameters mean any of them. `text` is looked for in case names and equations. */
export const solvesQuery = pageQuery.extend({
  solver: solverName.optional(),
  outcome: z
    .union([z.enum(outcomes), z.array(z.enum(outcomes)).max(outcomes.length)])
    .transform((given) => (typeof given === 'string' ? [given] : given))
    .optional(),
  trait: z.string().min(1).max(40).optional(),
  case: z.string().min(1).max(120).optional(),
  text: z.string().max(200).optional(),
  sort: z.enum(solveSorts).default('solver'),
  direction: z.enum(['up', 'down']).default('up'),
});
export type SolvesQuery = z.infer<typeof solvesQuery>;

export const solveView = solveRecord.extend({ id: z.int().min(1) });
export type SolveView = z.infer<typeof solveView>;
export const solvePage = pageOf(solveView);

export const solveDetail = solveView.extend({
  run: z.int().min(1),
  declaration: solverDeclaration,
  path: pathFile.nullable(),
});
export type SolveDetail = z.infer<typeof solveDetail>;
