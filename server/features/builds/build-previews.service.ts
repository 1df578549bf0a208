import { rm } from 'node:fs/promises';
import path from 'node:path';
import { AppError, type Issue } from '../../../shared/errors.ts';
import type { BuildPreviewView, GitRefs, Recipe } from '../../../shared/schemas/builds.ts';
import type { Actor } from '../../actor.ts';
import { showName } from '../../builds/archive-names.ts';
import type { BuildStore } from '../../builds/build-store.ts';
import { hashContents } from '../../builds/content-hash.ts';
import { readFolderCheckout } from '../../builds/folder-checkout.ts';
import { checkOut, listRefs } from '../../builds/git-checkout.ts';
import { unpackArchive } from '../../builds/unpack-archive.ts';
import type { DatabaseClient } from '../../db/client.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import { type ReadManifest, readManifestIn, resolveFolder } from './build-folder.ts';
import { type BuildPreviewRow, createBuildPreviewsRepo } from './build-previews.repo.ts';
import { presentPreview } from './builds.present.ts';
import { type BuildRow, createBuildsRepo } from './builds.repo.ts';

const lifeMs = 3_600_000;
const labelLength = 120;

type Found = Pick<BuildPreviewRow, 'source' | 'label'> &
  Partial<
    Pick<
      BuildPreviewRow,
      'address' | 'ref' | 'commit' | 'subject' | 'contentHash' | 'sourceKey' | 'folder' | 'submodules'
    >
  >;

/** Looks at what a build would be made of, without running anything of it. */
export function createBuildPreviewsService(deps: {
  client: DatabaseClient;
  clock: Clock;
  libraries: LibrariesService;
  readManifest: ReadManifest;
  store: BuildStore;
  /** Whether folders and repositories of this machine may be named. */
  allowsLocalPaths: boolean;
}) {
  const { store, clock } = deps;
  const repo = createBuildPreviewsRepo(deps.client.db);
  const builds = createBuildsRepo(deps.client.db);

  function existingOf(row: BuildPreviewRow): BuildRow | undefined {
    if (row.commit !== null) return builds.findByCommit(row.libraryId, row.commit);
    return row.contentHash === null ? undefined : builds.findByContent(row.libraryId, row.contentHash);
  }

  /** A manifest at fault is something to show, with its lines; anything else is not. */
  async function readRecipe(
    folder: string,
    shown: string,
  ): Promise<{ recipe: Recipe | null; manifestHash: string | null; issues: Issue[] }> {
    try {
      return { ...(await readManifestIn(folder, shown, deps.readManifest)), issues: [] };
    } catch (error) {
      if (!(error instanceof AppError) || (error.code !== 'invalid' && error.code !== 'unprocessable'))
        throw error;
      const issues = error.issues.length > 0 ? error.issues : [{ message: error.message }];
      return { recipe: null, manifestHash: null, issues };
    }
  }

  async function show(
    actor: Actor,
    slug: string,
    found: Found,
    place: { folder: string; shown: string },
  ): Promise<BuildPreviewView> {
    const manifest = await readRecipe(place.folder, place.shown);
    const now = clock();
    const row = repo.insert({
      libraryId: deps.libraries.require(slug).id,
      submodules: [],
      ...found,
      ...manifest,
      createdAt: now,
      createdBy: actor.name,
      expiresAt: now + lifeMs,
    });
    await sweep();
    return presentPreview(row, slug, existingOf(row));
  }

  async function sweep(): Promise<void> {
    repo.dropExpired(clock());
    await store.sweep(() => {
      const rows = builds.readNeeds();
      const all = [...rows, ...repo.readNeeds(clock())];
      return {
        sources: new Set(all.flatMap((row) => row.sourceKey ?? [])),
        addresses: new Set(all.flatMap((row) => row.address ?? [])),
        folders: new Set(rows.map((row) => row.folder)),
      };
    }, clock());
  }

  /** The row itself; throws `gone` once it has expired. */
  function requireRow(slug: string, id: number): BuildPreviewRow {
    const row = repo.find(id);
    const isOfLibrary = row?.libraryId === deps.libraries.require(slug).id;
    if (row === undefined || !isOfLibrary || row.expiresAt < clock())
      throw new AppError('gone', `Preview ${id} is no longer there; look at the source again.`);
    return row;
  }

  function requireLocal(): void {
    if (deps.allowsLocalPaths) return;
    const message = 'Folders of this machine are not allowed here; give a repository or an archive.';
    throw new AppError('forbidden', message, { issues: [{ path: 'folder', message }] });
  }

  return {
    sweep,
    requireLocal,
    uploadsFolder: store.uploadsFolder,
    async fromGit(
      actor: Actor,
      slug: string,
      git: { address: string; ref: string },
    ): Promise<BuildPreviewView> {
      deps.libraries.require(slug);
      const into = await store.newSource();
      const { address, ref } = git;
      const mirrorFolder = await store.mirrorFolder(address);
      const allowLocal = deps.allowsLocalPaths;
      const { commit, subject, submodules } = await checkOut({
        address,
        ref,
        mirrorFolder,
        into,
        allowLocal,
      });
      const sourceKey = `commit-${commit}`;
      await store.keep(into, sourceKey);
      const label = subject.trim().slice(0, labelLength) || commit.slice(0, 12);
      const found: Found = { source: 'git', address, ref, commit, subject, submodules, sourceKey, label };
      return show(actor, slug, found, { folder: store.sourceFolder(sourceKey), shown: `commit ${commit}` });
    },
    /** Takes over the file: it is unpacked and removed, whatever comes of it. `name` is what its sender calls it. */
    async fromArchive(
      actor: Actor,
      slug: string,
      upload: { file: string; name: string },
    ): Promise<BuildPreviewView> {
      try {
        deps.libraries.require(slug);
        const into = await store.newSource();
        await unpackArchive(upload.file, into);
        const contentHash = await hashContents(into);
        const sourceKey = `content-${contentHash}`;
        await store.keep(into, sourceKey);
        const label = showName(path.posix.basename(upload.name.trim())).slice(0, labelLength) || 'archive';
        const found: Found = { source: 'archive', contentHash, sourceKey, label };
        return await show(actor, slug, found, {
          folder: store.sourceFolder(sourceKey),
          shown: 'the archive',
        });
      } finally {
        await rm(upload.file, { force: true });
      }
    },
    async fromFolder(actor: Actor, slug: string, given: string): Promise<BuildPreviewView> {
      requireLocal();
      deps.libraries.require(slug);
      const folder = await resolveFolder(given);
      const { commit, subject } = await readFolderCheckout(folder);
      const label = (subject?.trim() || commit || path.basename(folder)).slice(0, labelLength);
      return show(
        actor,
        slug,
        { source: 'folder', folder, commit, subject, label },
        { folder, shown: given },
      );
    },
    get(slug: string, id: number): BuildPreviewView {
      const row = requireRow(slug, id);
      return presentPreview(row, slug, existingOf(row));
    },
    require: requireRow,
    existingOf,
    setBuild: repo.setBuild,
    listRefs: (address: string): Promise<GitRefs> => listRefs(address, deps.allowsLocalPaths),
  };
}

export type BuildPreviewsService = ReturnType<typeof createBuildPreviewsService>;
