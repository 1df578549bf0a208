import type { AllowanceRevisionView } from '../../../shared/schemas/allowance-revisions.ts';
import { allowanceSet } from '../../../shared/schemas/allowances.ts';
import { toIso } from '../present-time.ts';
import type { AllowanceRow } from './allowances.repo.ts';

export function presentAllowances(library: string, row: AllowanceRow): AllowanceRevisionView {
  const { number, allowances, reason, createdAt, createdBy } = row;
  return { library, number, allowances, reason, createdAt: toIso(createdAt), createdBy };
}

/** What holds until a library sets its own. */
export function presentDefaultAllowances(library: string): AllowanceRevisionView {
  return {
    library,
    number: 0,
    allowances: allowanceSet.parse({}),
    reason: 'The default of Tallyroot.',
    createdAt: null,
    createdBy: null,
  };
}
