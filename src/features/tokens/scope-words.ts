import type { TokenScope } from '../../../shared/permissions.ts';

/** What a scope lets a token do. */
export const scopeWords: Record<TokenScope, string> = {
  'build:write': 'register builds',
  'run:write': 'start and cancel runs',
  'results:read': 'read everything of the library',
  'reference:propose': 'propose results as reference',
};
