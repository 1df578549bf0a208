import type { BuildView } from '../../../shared/schemas/builds.ts';
import { toIso } from '../present-time.ts';
import type { BuildRow } from './builds.repo.ts';

export function presentBuild(row: { build: BuildRow; library: string; runCount: number }): BuildView {
  const { id, label, commit, source, folder, recipe, createdAt, createdBy } = row.build;
  return {
    id,
    library: row.library,
    label,
    commit,
    source,
    folder,
    recipe,
    createdAt: toIso(createdAt),
    createdBy,
    runCount: row.runCount,
  };
}
