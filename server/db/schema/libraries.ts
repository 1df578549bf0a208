import { sql } from 'drizzle-orm';
import { index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { recipe } from '../../../shared/schemas/builds.ts';
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
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
  },
  (table) => [uniqueIndex('libraries_slug').on(table.slug)],
);

/** A build never changes once registered, but for the folder when its checkout has moved. */
export const builds = sqliteTable(
  'builds',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    libraryId: integer('library_id')
      .notNull()
      .references(() => libraries.id),
    label: text('label').notNull(),
    commit: text('commit'),
    source: text('source', { enum: ['folder'] }).notNull(),
    folder: text('folder').notNull(),
    recipe: json('recipe', recipe).notNull(),
    /** sha-256, hex, of the manifest's text. */
    manifestHash: text('manifest_hash').notNull(),
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
  },
  (table) => [
    uniqueIndex('builds_library_commit')
      .on(table.libraryId, table.commit)
      .where(sql`${table.commit} is not null`),
    index('builds_library').on(table.libraryId, table.id),
  ],
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
