import { allowancesApi } from '../features/allowances/allowances.api.ts';
import { auditApi } from '../features/audit/audit.api.ts';
import { buildsApi } from '../features/builds/builds.api.ts';
import { comparisonsApi } from '../features/comparisons/comparisons.api.ts';
import { librariesApi } from '../features/libraries/libraries.api.ts';
import { referencesApi } from '../features/references/references.api.ts';
import { runsApi } from '../features/runs/runs.api.ts';
import { suitesApi } from '../features/suites/suites.api.ts';
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
  ...auditApi,
  ...openapiApi,
];
