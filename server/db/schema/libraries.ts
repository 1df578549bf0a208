import { sql } from 'drizzle-orm';
import { index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { z } from 'zod';
import { visibilities } from '../../../shared/permissions.ts';
import { buildSources, buildStates, logKinds, recipe } from '../../../shared/schemas/builds.ts';
import { issue } from '../../../shared/schemas/problem.ts';
import { solverDeclaration } from '../../../shared/schemas/solver.ts';
import { json, time } from '../columns.ts';

export const libraries = sqliteTable(
  'libraries',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    slug: text('slug').notNull(),
    name: text('name').notNull(),
    description: text('description').notNull(),
    homepage: text('homepage'),
    /** Libraries that were there before people signed in stay readable by all who do. */
    visibility: text('visibility', { enum: visibilities }).notNull().default('public'),
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
  },
  (table) => [uniqueIndex('libraries_slug').on(table.slug)],
);

const sourceColumns = {
  address: text('address'),
  ref: text('ref'),
  commit: text('commit'),
  subject: text('subject'),
  contentHash: text('content_hash'),
  /** Where its files lie as they came, in the store of sources; null for a folder, which is used in place. */
  sourceKey: text('source_key'),
};

/** What a build is made of never changes; its state does, and its folder where it is prepared anew or has moved. */
export const builds = sqliteTable(
  'builds',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    libraryId: integer('library_id')
      .notNull()
      .references(() => libraries.id),
    label: text('label').notNull(),
    source: text('source', { enum: buildSources }).notNull(),
    ...sourceColumns,
    folder: text('folder').notNull(),
    recipe: json('recipe', recipe).notNull(),
    /** sha-256, hex, of the manifest's text. */
    manifestHash: text('manifest_hash').notNull(),
    state: text('state', { enum: buildStates }).notNull().default('ready'),
    reason: text('reason'),
    /** Whether the beginning of its log is no longer kept. */
    isLogCut: integer('is_log_cut', { mode: 'boolean' }).notNull().default(false),
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
  },
  (table) => [
    uniqueIndex('builds_library_commit')
      .on(table.libraryId, table.commit)
      .where(sql`${table.commit} is not null`),
    uniqueIndex('builds_library_content')
      .on(table.libraryId, table.contentHash)
      .where(sql`${table.contentHash} is not null`),
    index('builds_library').on(table.libraryId, table.id),
  ],
);

/** What somebody has been shown and may register until it expires. */
export const buildPreviews = sqliteTable(
  'build_previews',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    libraryId: integer('library_id')
      .notNull()
      .references(() => libraries.id),
    source: text('source', { enum: buildSources }).notNull(),
    ...sourceColumns,
    label: text('label').notNull(),
    /** The folder in place; null where `sourceKey` says where the files are. */
    folder: text('folder'),
    recipe: json('recipe', recipe),
    issues: json('issues', z.array(issue)).notNull(),
    manifestHash: text('manifest_hash'),
    submodules: json('submodules', z.array(z.string())).notNull(),
    /** The build that was made of it. */
    buildId: integer('build_id').references(() => builds.id),
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
    expiresAt: time('expires_at').notNull(),
  },
  (table) => [index('build_previews_expiry').on(table.expiresAt)],
);

/** What preparing a build wrote, in pieces; the oldest are dropped where it becomes too much. */
export const buildLogs = sqliteTable(
  'build_logs',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    buildId: integer('build_id')
      .notNull()
      .references(() => builds.id),
    kind: text('kind', { enum: logKinds }).notNull(),
    text: text('text').notNull(),
  },
  (table) => [index('build_logs_build').on(table.buildId, table.id)],
);

/** The current declaration of each solver that a library has ever declared. */
export const solvers = sqliteTable(
  'solvers',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    libraryId: integer('library_id')
      .notNull()
      .references(() => libraries.id),
    name: text('name').notNull(),
    declared: integer('declared', { mode: 'boolean' }).notNull(),
    declaration: json('declaration', solverDeclaration).notNull(),
    buildId: integer('build_id')
      .notNull()
      .references(() => builds.id),
    updatedAt: time('updated_at').notNull(),
  },
  (table) => [uniqueIndex('solvers_library_name').on(table.libraryId, table.name)],
);
