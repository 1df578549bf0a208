import { index, integer, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { suiteCase } from '../../../shared/schemas/case.ts';
import { json, time } from '../columns.ts';

export const suites = sqliteTable(
  'suites',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    slug: text('slug').notNull(),
    builtIn: integer('built_in', { mode: 'boolean' }).notNull(),
    createdAt: time('created_at').notNull(),
  },
  (table) => [uniqueIndex('suites_slug').on(table.slug)],
);

/** Immutable: a trigger refuses every update and delete. */
export const suiteRevisions = sqliteTable(
  'suite_revisions',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    suiteId: integer('suite_id')
      .notNull()
      .references(() => suites.id),
    number: integer('number').notNull(),
    hash: text('hash').notNull(),
    title: text('title').notNull(),
    evaluations: integer('evaluations').notNull(),
    seconds: real('seconds').notNull(),
    caseCount: integer('case_count').notNull(),
    /** The suite file as its author wrote it. */
    source: text('source').notNull(),
    note: text('note').notNull(),
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
  },
  (table) => [
    uniqueIndex('suite_revisions_suite_number').on(table.suiteId, table.number),
    index('suite_revisions_suite_hash').on(table.suiteId, table.hash),
  ],
);

/** The cases of a revision, in its order: ids rise with the position. */
export const cases = sqliteTable(
  'cases',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    revisionId: integer('revision_id')
      .notNull()
      .references(() => suiteRevisions.id),
    name: text('name').notNull(),
    hash: text('hash').notNull(),
    data: json('data', suiteCase).notNull(),
  },
  (table) => [uniqueIndex('cases_revision_name').on(table.revisionId, table.name)],
);
