import type { BuildPreviewView, BuildView } from '../../../shared/schemas/builds.ts';
import { toIso } from '../present-time.ts';
import type { BuildPreviewRow } from './build-previews.repo.ts';
import type { BuildRow } from './builds.repo.ts';

function presentSource(row: BuildRow | BuildPreviewRow) {
  const { source, address, ref, commit, subject, contentHash } = row;
  return { source, address, ref, commit, subject, contentHash };
}

export function presentBuild(row: { build: BuildRow; library: string; runCount: number }): BuildView {
  const { id, label, folder, recipe, state, reason, createdAt, createdBy } = row.build;
  return {
    id,
    library: row.library,
    label,
    ...presentSource(row.build),
    folder,
    recipe,
    state,
    reason,
    createdAt: toIso(createdAt),
    createdBy,
    runCount: row.runCount,
  };
}

export function presentPreview(
  row: BuildPreviewRow,
  library: string,
  existing: BuildRow | undefined,
): BuildPreviewView {
  const { id, label, recipe, issues, submodules, createdBy } = row;
  return {
    id,
    library,
    ...presentSource(row),
    label,
    recipe,
    issues,
    submodules,
    existing: existing ? { id: existing.id, label: existing.label, state: existing.state } : null,
    createdAt: toIso(row.createdAt),
    createdBy,
    expiresAt: toIso(row.expiresAt),
  };
}
