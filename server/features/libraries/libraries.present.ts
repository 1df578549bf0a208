import type { LibraryView } from '../../../shared/schemas/libraries.ts';
import { toIso } from '../present-time.ts';
import type { LibraryRow } from './libraries.repo.ts';

export interface CountedLibrary {
  library: LibraryRow;
  solverCount: number;
  buildCount: number;
  runCount: number;
}

export function presentLibrary({ library, ...counts }: CountedLibrary): LibraryView {
  const { slug, name, description, homepage, visibility, createdBy } = library;
  const createdAt = toIso(library.createdAt);
  return { slug, name, description, homepage, visibility, createdAt, createdBy, ...counts };
}
