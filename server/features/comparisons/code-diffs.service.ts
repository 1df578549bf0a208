import { lstat } from 'node:fs/promises';
import path from 'node:path';
import { AppError } from '../../../shared/errors.ts';
import type { CodeDiff, CodeDiffView } from '../../../shared/schemas/code-diff.ts';
import type { ComparisonQuery } from '../../../shared/schemas/comparisons.ts';
import type { BuildStore } from '../../builds/build-store.ts';
import { commitOf } from '../../builds/checkout-mirror.ts';
import { diffCommits, diffFolders } from '../../builds/code-diff.ts';
import type { BuildRow } from '../builds/builds.repo.ts';
import type { BuildsService } from '../builds/builds.service.ts';
import type { ReferencesService } from '../references/references.service.ts';
import type { RunsService } from '../runs/runs.service.ts';

export interface FoundCodeDiff {
  /** Names what is compared, where that can never change; null where it is a folder as it is now. */
  tag: string | null;
  read(): Promise<CodeDiffView>;
}

const keptDiffs = 4;

/** What changed in the source between the two builds that a comparison is about. */
export function createCodeDiffsService(deps: {
  runs: RunsService;
  builds: BuildsService;
  references: ReferencesService;
  store: BuildStore;
}) {
  const kept = new Map<string, Promise<CodeDiff>>();

  function buildOfRun(id: number): BuildRow {
    return deps.builds.require(deps.runs.requireRun(id).buildId);
  }

  function referenceBuild(query: ComparisonQuery): BuildRow {
    if (query.reference !== undefined) return buildOfRun(query.reference);
    const { run } = deps.references.get(query.revision ?? 0);
    if (run === null)
      throw new AppError(
        'unprocessable',
        'These reference results do not come from one build; compare with a run to see what changed in the code.',
      );
    return buildOfRun(run);
  }

  /** A repository of this machine that has both commits, whatever is checked out in it now. */
  async function sharedRepository(before: BuildRow, after: BuildRow): Promise<string | null> {
    if (before.commit === null || after.commit === null) return null;
    for (const { source, folder } of [after, before]) {
      if (source !== 'folder') continue;
      const repository = path.join(folder, '.git');
      const isThere = await lstat(repository).catch(() => null);
      if (isThere === null) continue;
      const found = [await commitOf(repository, before.commit), await commitOf(repository, after.commit)];
      if (found.every((commit) => commit !== null)) return repository;
    }
    return null;
  }

  const folderOf = (build: BuildRow): string =>
    build.sourceKey === null ? build.folder : deps.store.sourceFolder(build.sourceKey);

  async function plan(
    before: BuildRow,
    after: BuildRow,
  ): Promise<{ tag: string | null; make: () => Promise<CodeDiff> }> {
    if (before.sourceKey !== null && after.sourceKey !== null)
      return {
        tag: `code-${before.sourceKey}-${after.sourceKey}`,
        make: () => diffFolders(folderOf(before), folderOf(after)),
      };
    const repository = await sharedRepository(before, after);
    if (repository === null) return { tag: null, make: () => diffFolders(folderOf(before), folderOf(after)) };
    const [was, now] = [before.commit ?? '', after.commit ?? ''];
    return { tag: `code-${was}-${now}`, make: () => diffCommits(repository, was, now) };
  }

  function keep(tag: string, make: () => Promise<CodeDiff>): Promise<CodeDiff> {
    const known = kept.get(tag);
    if (known) return known;
    const made = make();
    kept.set(tag, made);
    made.catch(() => kept.delete(tag));
    const oldest = kept.keys().next().value;
    if (kept.size > keptDiffs && oldest !== undefined) kept.delete(oldest);
    return made;
  }

  return {
    async find(query: ComparisonQuery): Promise<FoundCodeDiff> {
      const before = referenceBuild(query);
      const after = buildOfRun(query.candidate);
      if (before.libraryId !== after.libraryId)
        throw new AppError('unprocessable', 'The two belong to different libraries.');
      const { tag, make } = await plan(before, after);
      return {
        // The answer names the builds as well.
        tag: tag === null ? null : `${tag}-${before.id}-${after.id}`,
        async read() {
          let diff: CodeDiff;
          try {
            diff = tag === null ? await make() : await keep(tag, make);
          } catch (error) {
            if (error instanceof AppError) throw error;
            throw new AppError('gone', 'The files of one of the two builds are no longer there.', {
              cause: error,
            });
          }
          return { ...diff, reference: name(before), candidate: name(after), isOfRecord: tag !== null };
        },
      };
    },
  };
}

function name({ id, label, commit }: BuildRow): CodeDiffView['candidate'] {
  return { id, label, commit };
}

export type CodeDiffsService = ReturnType<typeof createCodeDiffsService>;
