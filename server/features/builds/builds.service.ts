import path from 'node:path';
import { AppError } from '../../../shared/errors.ts';
import type { BuildView, RegisterBuildBody } from '../../../shared/schemas/builds.ts';
import type { Page, PageQuery } from '../../../shared/schemas/paging.ts';
import type { Actor } from '../../actor.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import { numberCursor, toPage } from '../../db/cursor.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { AuditService } from '../audit/audit.service.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import { createSolversRepo } from '../solvers/solvers.repo.ts';
import { type BuildFolder, type ReadManifest, readBuildFolder } from './build-folder.ts';
import { presentBuild } from './builds.present.ts';
import { type BuildRow, createBuildsRepo } from './builds.repo.ts';

export interface RegisteredBuild {
  build: BuildView;
  /** False where the library had a build of this commit already. */
  isNew: boolean;
}

export function createBuildsService(deps: {
  client: DatabaseClient;
  clock: Clock;
  bus: EventBus;
  audit: AuditService;
  libraries: LibrariesService;
  readManifest: ReadManifest;
}) {
  const repo = createBuildsRepo(deps.client.db);
  const solvers = createSolversRepo(deps.client.db);

  function get(id: number): BuildView {
    const row = repo.findCounted(id);
    if (!row) throw new AppError('not_found', `There is no build ${id}.`);
    return presentBuild(row);
  }

  /** What was asked for, checked against what the folder holds. */
  function commitOf(body: RegisterBuildBody, found: BuildFolder): string | null {
    if (body.commit === undefined || body.commit === found.commit) return found.commit;
    if (found.hasChanges)
      throw new AppError('unprocessable', 'The folder has changes on top of its commit; commit them first.', {
        issues: [{ path: 'commit', message: 'the folder has changes that are not committed' }],
      });
    if (found.commit === null) return body.commit;
    throw new AppError('unprocessable', `The folder holds commit ${found.commit}, not ${body.commit}.`, {
      issues: [{ path: 'commit', message: `the folder holds ${found.commit}` }],
    });
  }

  return {
    get,
    /** The row itself, for other services. */
    require(id: number): BuildRow {
      const row = repo.find(id);
      if (!row) throw new AppError('not_found', `There is no build ${id}.`);
      return row;
    },
    /**
     * Registers a prepared folder as it stands: its `prepare` lines are not run. A commit that the library
     * has a build of already gives that build (and moves it to this folder), so that results of one
     * commit are never spread over two builds.
     */
    async registerFolder(actor: Actor, slug: string, body: RegisterBuildBody): Promise<RegisteredBuild> {
      const library = deps.libraries.require(slug);
      const found = await readBuildFolder(body.folder, deps.readManifest);
      const commit = commitOf(body, found);
      const result = inTransaction(deps.client, () => {
        const known = commit === null ? undefined : repo.findByCommit(library.id, commit);
        if (known) {
          if (known.manifestHash !== found.manifestHash)
            throw new AppError('conflict', `Build ${known.id} of commit ${commit} has another manifest.`);
          if (known.folder !== found.folder) repo.moveTo(known.id, found.folder);
          return { id: known.id, isNew: false };
        }
        const now = deps.clock();
        const row = repo.insert({
          libraryId: library.id,
          label: body.label ?? commit?.slice(0, 12) ?? path.basename(found.folder),
          commit,
          source: 'folder',
          folder: found.folder,
          recipe: found.recipe,
          manifestHash: found.manifestHash,
          createdAt: now,
          createdBy: actor.name,
        });
        solvers.declare(library.id, row.id, found.recipe.solvers, now);
        deps.audit.record(actor, 'build registered', library.id, `build ${row.id}`, {
          label: row.label,
          commit,
        });
        return { id: row.id, isNew: true };
      });
      if (result.isNew) deps.bus.publish({ kind: 'build', library: slug, build: result.id });
      return { build: get(result.id), isNew: result.isNew };
    },
    list(slug: string, query: PageQuery): Page<BuildView> {
      const library = deps.libraries.require(slug);
      const before = numberCursor(query.cursor, 1)?.[0];
      const rows = repo.listQuery({ libraryId: library.id, before, limit: query.limit + 1 }).all();
      return toPage(rows, query.limit, (row) => [row.build.id], presentBuild);
    },
    /**
     * Looks at the folder again before a run: a build stands for one state of the source, and a folder
     * that has moved on since must not be measured under its name.
     */
    async check(build: BuildRow): Promise<void> {
      const found = await readBuildFolder(build.folder, deps.readManifest);
      if (build.commit !== null && found.commit !== null && found.commit !== build.commit)
        throw new AppError(
          'conflict',
          `The folder of build ${build.id} now holds commit ${found.commit.slice(0, 12)}, not ${build.commit.slice(0, 12)}. Check that commit out again, or register a new build.`,
        );
      if (build.commit !== null && found.hasChanges)
        throw new AppError(
          'conflict',
          `The folder of build ${build.id} has changes on top of its commit. Undo them, or register a new build.`,
        );
      if (found.manifestHash !== build.manifestHash)
        throw new AppError(
          'conflict',
          `The manifest of build ${build.id} has changed since it was registered. Register a new build.`,
        );
    },
  };
}

export type BuildsService = ReturnType<typeof createBuildsService>;
