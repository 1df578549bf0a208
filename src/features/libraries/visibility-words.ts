import type { Visibility } from '../../../shared/permissions.ts';

/** Who sees a library. */
export const visibilityWords: Record<Visibility, string> = {
  public: 'Everyone who is signed in can read its builds, runs and comparisons.',
  private: 'For everyone but its members and the site’s admins it does not exist.',
};
