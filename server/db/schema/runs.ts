import { sql } from 'drizzle-orm';
import {
  blob,
  check,
  foreignKey,
  index,
  integer,
  primaryKey,
  real,
  sqliteTable,
  text,
  uniqueIndex,
} from 'drizzle-orm/sqlite-core';
import { environment } from '../../../shared/schemas/measurement.ts';
import { runPhases, runSettings, runStatuses } from '../../../shared/schemas/runs.ts';
import { solverDeclaration } from '../../../shared/schemas/solver.ts';
import { json, time } from '../columns.ts';
import { builds, libraries } from './libraries.ts';
import { cases, suiteRevisions, suites } from './suites.ts';

export const runs = sqliteTable(
  'runs',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    libraryId: integer('library_id')
      .notNull()
      .references(() => libraries.id),
    buildId: integer('build_id')
      .notNull()
      .references(() => builds.id),
    suiteId: integer('suite_id')
      .notNull()
      .references(() => suites.id),
    revisionId: integer('revision_id')
      .notNull()
      .references(() => suiteRevisions.id),
    status: text('status', { enum: runStatuses }).notNull(),
    phase: text('phase', { enum: runPhases }).notNull(),
    reason: text('reason'),
    settings: json('settings', runSettings).notNull(),
    /** What it is compared with: at most one of the two. A reference revision is never deleted. */
    baseRunId: integer('base_run_id'),
    baseReferenceId: integer('base_reference_id'),
    planned: integer('planned').notNull(),
    // Counted in the transaction that stores the solves, so that lists of runs need not read them.
    stored: integer('stored').notNull(),
    solved: integer('solved').notNull(),
    evaluations: integer('evaluations').notNull(),
    toConfirm: integer('to_confirm').notNull(),
    confirmed: integer('confirmed').notNull(),
    unsteady: integer('unsteady').notNull(),
    environment: json('environment', environment),
    adapterText: text('adapter_text'),
    log: text('log').notNull(),
    elapsedMs: real('elapsed_ms').notNull(),
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
    startedAt: time('started_at'),
    finishedAt: time('finished_at'),
  },
  (table) => [
    index('runs_library').on(table.libraryId, table.id),
    index('runs_build').on(table.buildId, table.id),
    index('runs_suite').on(table.suiteId, table.id),
    index('runs_finished')
      .on(table.libraryId, table.suiteId, table.buildId, table.id)
      .where(sql`${table.status} = 'finished'`),
    index('runs_status').on(table.status, table.id),
    foreignKey({ columns: [table.baseRunId], foreignColumns: [table.id] }),
  ],
);

/** The solvers of a run as declared then; solves name them by position. */
export const runSolvers = sqliteTable(
  'run_solvers',
  {
    runId: integer('run_id')
      .notNull()
      .references(() => runs.id),
    position: integer('position').notNull(),
    name: text('name').notNull(),
    declaration: json('declaration', solverDeclaration).notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.runId, table.position] }),
    uniqueIndex('run_solvers_name').on(table.runId, table.name),
  ],
);

/** SQLite keeps NaN as NULL but would take an infinity; none may come in as a number. */
const finite = (column: string) => `(${column} is null or abs(${column}) <= 1.7976931348623157e308)`;

const measuredColumns = [
  'root',
  'error',
  'digits',
  'ulps',
  'residual',
  'order_value',
  'order_low',
  'order_high',
  'rate',
  'rate_low',
  'rate_high',
  'constant',
  'elapsed_ms',
];

/**
 * Millions of rows, so the solver is its position in the run, the case its row, words are codes
 * (`codes.ts`) and the path hash is bytes. The unique index is also the order of display.
 */
export const solves = sqliteTable(
  'solves',
  {
    id: integer('id').primaryKey(),
    runId: integer('run_id').notNull(),
    solver: integer('solver').notNull(),
    caseId: integer('case_id')
      .notNull()
      .references(() => cases.id),
    /** −1 where the solver takes no start. */
    start: integer('start').notNull(),
    outcome: integer('outcome').notNull(),
    iterations: integer('iterations'),
    iterationsFrom: integer('iterations_from'),
    evaluations: integer('evaluations').notNull(),
    f: integer('f').notNull(),
    df: integer('df').notNull(),
    d2f: integer('d2f').notNull(),
    root: real('root'),
    nearest: integer('nearest'),
    error: real('error'),
    digits: real('digits'),
    exact: integer('exact').notNull(),
    ulps: real('ulps'),
    residual: real('residual'),
    orderStatus: integer('order_status').notNull(),
    orderKind: integer('order_kind'),
    orderValue: real('order_value'),
    orderLow: real('order_low'),
    orderHigh: real('order_high'),
    orderSteps: integer('order_steps').notNull(),
    rate: real('rate'),
    rateLow: real('rate_low'),
    rateHigh: real('rate_high'),
    constant: real('constant'),
    period: integer('period'),
    repeated: integer('repeated').notNull(),
    outside: integer('outside').notNull(),
    late: integer('late').notNull(),
    unused: integer('unused').notNull(),
    nonFinite: integer('non_finite').notNull(),
    pathHash: blob('path_hash').notNull(),
    steady: integer('steady'),
    elapsedMs: real('elapsed_ms').notNull(),
    remarks: text('remarks'),
  },
  (table) => [
    uniqueIndex('solves_key').on(table.runId, table.solver, table.caseId, table.start),
    foreignKey({
      columns: [table.runId, table.solver],
      foreignColumns: [runSolvers.runId, runSolvers.position],
    }),
    check('solves_finite', sql.raw(measuredColumns.map(finite).join(' and '))),
  ],
);

/** Apart from the solves, so that lists and comparisons never page through them. */
export const paths = sqliteTable('paths', {
  solveId: integer('solve_id')
    .primaryKey()
    .references(() => solves.id),
  data: blob('data', { mode: 'buffer' }).notNull(),
});
