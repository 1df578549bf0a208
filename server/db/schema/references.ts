import { foreignKey, index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { allowanceSet } from '../../../shared/schemas/allowances.ts';
import { json, time } from '../columns.ts';
import { libraries } from './libraries.ts';
import { runs, solves } from './runs.ts';
import { suites } from './suites.ts';

/** One chain of reference results for each library, suite and platform. */
export const referenceChains = sqliteTable(
  'reference_chains',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    libraryId: integer('library_id')
      .notNull()
      .references(() => libraries.id),
    suiteId: integer('suite_id')
      .notNull()
      .references(() => suites.id),
    platform: text('platform').notNull(),
    createdAt: time('created_at').notNull(),
  },
  (table) => [uniqueIndex('reference_chains_key').on(table.libraryId, table.suiteId, table.platform)],
);

/** A link of a chain: who, when, why. Immutable: a trigger refuses every update and delete. */
export const referenceRevisions = sqliteTable(
  'reference_revisions',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    chainId: integer('chain_id')
      .notNull()
      .references(() => referenceChains.id),
    number: integer('number').notNull(),
    parentId: integer('parent_id'),
    runId: integer('run_id').references(() => runs.id),
    reason: text('reason').notNull(),
    changed: integer('changed').notNull(),
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
  },
  (table) => [
    uniqueIndex('reference_revisions_chain_number').on(table.chainId, table.number),
    foreignKey({ columns: [table.parentId], foreignColumns: [table.id] }),
  ],
);

/**
 * What a revision sets for one solver, case and start; what it does not mention stays as its parent has
 * it. `solveId` null takes the entry out of the reference. Immutable likewise.
 */
export const referenceEntries = sqliteTable(
  'reference_entries',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    chainId: integer('chain_id')
      .notNull()
      .references(() => referenceChains.id),
    number: integer('number').notNull(),
    solver: text('solver').notNull(),
    case: text('case').notNull(),
    /** −1 where the solver takes no start. */
    start: integer('start').notNull(),
    solveId: integer('solve_id').references(() => solves.id),
    /** Where they differ from the revision's own; null otherwise. */
    reason: text('reason'),
    decidedBy: text('decided_by'),
    decidedAt: time('decided_at'),
  },
  (table) => [
    uniqueIndex('reference_entries_key').on(
      table.chainId,
      table.solver,
      table.case,
      table.start,
      table.number,
    ),
    index('reference_entries_solve').on(table.solveId),
    foreignKey({
      columns: [table.chainId, table.number],
      foreignColumns: [referenceRevisions.chainId, referenceRevisions.number],
    }),
  ],
);

export const allowanceRevisions = sqliteTable(
  'allowance_revisions',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    libraryId: integer('library_id')
      .notNull()
      .references(() => libraries.id),
    number: integer('number').notNull(),
    allowances: json('allowances', allowanceSet).notNull(),
    reason: text('reason').notNull(),
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
  },
  (table) => [uniqueIndex('allowance_revisions_library_number').on(table.libraryId, table.number)],
);
