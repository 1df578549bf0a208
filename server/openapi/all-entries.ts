import { authApi } from '../auth/auth.api.ts';
import { accountApi } from '../features/account/account.api.ts';
import { allowancesApi } from '../features/allowances/allowances.api.ts';
import { auditApi } from '../features/audit/audit.api.ts';
import { buildsApi } from '../features/builds/builds.api.ts';
import { comparisonsApi } from '../features/comparisons/comparisons.api.ts';
import { invitationsApi } from '../features/invitations/invitations.api.ts';
import { kitsApi } from '../features/kits/kits.api.ts';
import { librariesApi } from '../features/libraries/libraries.api.ts';
import { membersApi } from '../features/members/members.api.ts';
import { demoApi, peopleApi } from '../features/people/people.api.ts';
import { referencesApi } from '../features/references/references.api.ts';
import { runsApi } from '../features/runs/runs.api.ts';
import { siteApi } from '../features/site/site.api.ts';
import { suitesApi } from '../features/suites/suites.api.ts';
import { tokensApi } from '../features/tokens/tokens.api.ts';
import type { ApiEntry } from './entry.ts';
import { openapiApi } from './openapi.api.ts';

/** Every route, chapter by chapter. A test compares it with what the application answers to. */
export const allEntries: readonly ApiEntry[] = [
  ...librariesApi,
  ...buildsApi,
  ...suitesApi,
  ...runsApi,
  ...comparisonsApi,
  ...referencesApi,
  ...allowancesApi,
  ...kitsApi,
  ...membersApi,
  ...invitationsApi,
  ...tokensApi,
  ...authApi,
  ...accountApi,
  ...demoApi,
  ...siteApi,
  ...peopleApi,
  ...auditApi,
  ...openapiApi,
];
