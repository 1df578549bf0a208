import path from 'node:path';
import { AppError } from '../../../shared/errors.ts';
import type { BuildView, RegisterBuildBody, RegisterPreviewBody } from '../../../shared/schemas/builds.ts';
import type { Page, PageQuery } from '../../../shared/schemas/paging.ts';
import type { Actor } from '../../actor.ts';
import type { BuildStore } from '../../builds/build-store.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import { numberCursor, toPage } from '../../db/cursor.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { Queue } from '../../jobs/queue.ts';
import type { AuditService } from '../audit/audit.service.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import { createSolversRepo } from '../solvers/solvers.repo.ts';
import { type BuildFolder, type ReadManifest, readBuildFolder, readManifestIn } from './build-folder.ts';
import type { BuildPreviewRow } from './build-previews.repo.ts';
import type { BuildPreviewsService } from './build-previews.service.ts';
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
  previews: BuildPreviewsService;
  store: BuildStore;
  queue: Queue;
  /** Tells the job runner of this process, where there is one. */
  wakeRunner(): void;
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

  /** One that could not be prepared is tried again; any other stays as it is. */
  function takeKnown(known: BuildRow, row: BuildPreviewRow): boolean {
    if (known.manifestHash !== row.manifestHash)
      throw new AppError('conflict', `Build ${known.id} of commit ${row.commit} has another manifest.`);
    if (known.state !== 'failed') return false;
    repo.update(known.id, { state: 'waiting', reason: null });
    deps.queue.enqueue('prepare', known.id);
    return true;
  }

  function insertPreviewed(
    actor: Actor,
    row: BuildPreviewRow,
    label: string,
    recipe: BuildRow['recipe'],
    folder: string,
  ): BuildRow {
    const { libraryId, source, address, ref, commit, subject, contentHash, sourceKey, manifestHash } = row;
    const isReady = recipe.prepare.length === 0;
    const now = deps.clock();
    const build = repo.insert({
      ...{ libraryId, source, address, ref, commit, subject, contentHash, sourceKey, folder, label, recipe },
      manifestHash: manifestHash ?? '',
      state: isReady ? 'ready' : 'waiting',
      createdAt: now,
      createdBy: actor.name,
    });
    solvers.declare(libraryId, build.id, recipe.solvers, now);
    if (!isReady) deps.queue.enqueue('prepare', build.id);
    deps.audit.record(actor, 'build registered', libraryId, `build ${build.id}`, {
      label,
      commit,
      source,
      address,
    });
    return build;
  }

  /**
   * Registers a prepared folder as it stands: its `prepare` lines are not run. A commit that the library
   * has a build of already gives that build (and moves it to this folder), so that results of one
   * commit are never spread over two builds.
   */
  async function registerFolder(
    actor: Actor,
    slug: string,
    body: RegisterBuildBody,
  ): Promise<RegisteredBuild> {
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
  }

  return {
    get,
    /**
     * Makes the build that a preview has shown, and queues its prepare lines; without any it is ready at once.
     * What the library has a build of already gives that build.
     */
    async registerPreview(actor: Actor, slug: string, body: RegisterPreviewBody): Promise<RegisteredBuild> {
      const row = deps.previews.require(slug, body.preview);
      const { recipe } = row;
      if (recipe === null)
        throw new AppError('unprocessable', 'The manifest has faults; mend them and look again.', {
          issues: row.issues,
        });
      if (row.source === 'folder') deps.previews.requireLocal();
      // Copied before the row is there, so that a build is never without its files.
      const copies = recipe.prepare.length === 0 && !deps.previews.existingOf(row) && row.buildId === null;
      const copy = copies && row.sourceKey ? await deps.store.copyForBuild(row.sourceKey) : null;
      let isUsed = false;
      try {
        const result = inTransaction(deps.client, () => {
          const made = deps.previews.require(slug, row.id).buildId;
          const known = made === null ? deps.previews.existingOf(row) : repo.find(made);
          if (known) return { id: known.id, isNew: false, isQueued: takeKnown(known, row) };
          const folder = row.folder ?? copy ?? '';
          const build = insertPreviewed(actor, row, body.label ?? row.label, recipe, folder);
          deps.previews.setBuild(row.id, build.id);
          isUsed = true;
          return { id: build.id, isNew: true, isQueued: build.state === 'waiting' };
        });
        if (result.isNew || result.isQueued)
          deps.bus.publish({ kind: 'build', library: slug, build: result.id });
        if (result.isQueued) deps.wakeRunner();
        return { build: get(result.id), isNew: result.isNew };
      } finally {
        if (copy !== null && !isUsed) await deps.store.dropCopy(copy);
      }
    },
    /** The row itself, for other services. */
    require(id: number): BuildRow {
      const row = repo.find(id);
      if (!row) throw new AppError('not_found', `There is no build ${id}.`);
      return row;
    },
    registerFolder,
    /** The same, for a folder that a request names. */
    registerNamedFolder(actor: Actor, slug: string, body: RegisterBuildBody): Promise<RegisteredBuild> {
      deps.previews.requireLocal();
      return registerFolder(actor, slug, body);
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
      requireReady(build);
      if (build.source !== 'folder') {
        // Written here from an archive or from objects: there is no repository to ask.
        const { manifestHash } = await readManifestIn(build.folder, build.folder, deps.readManifest);
        if (manifestHash !== build.manifestHash) throw changedManifest(build);
        return;
      }
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
      if (found.manifestHash !== build.manifestHash) throw changedManifest(build);
    },
    /** Throws where a run of it could never begin; one that is still being prepared may be waited for. */
    requireUsable(build: BuildRow): void {
      if (build.state === 'failed') requireReady(build);
    },
  };
}

function changedManifest(build: BuildRow): AppError {
  return new AppError(
    'conflict',
    `The manifest of build ${build.id} has changed since it was registered. Register a new build.`,
  );
}

function requireReady({ id, state, reason }: BuildRow): void {
  if (state === 'failed')
    throw new AppError('conflict', `Build ${id} could not be prepared and cannot be run: ${reason ?? ''}`);
  if (state !== 'ready') throw new AppError('conflict', `Build ${id} is still being prepared.`);
}

export type BuildsService = ReturnType<typeof createBuildsService>;
