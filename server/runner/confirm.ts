import { type SolveRecord, solveKey } from '../../shared/schemas/solve.ts';
import { numberedPlan } from './measure.ts';
import { type RunOptions, runWork } from './run-work.ts';

/**
 * Repeats solves, each in a fresh process, and says by `solveKey` whether each did the same to the last bit:
 * the same outcome, the same evaluations, the same root. Where the clock ended a solve its path may differ, so
 * then the outcome alone counts. Solves that never ran, or that a stop kept from being repeated, are left out.
 */
export async function confirmSolves(
  options: RunOptions,
  records: readonly SolveRecord[],
): Promise<Map<string, boolean>> {
  const expected = new Map<string, SolveRecord>();
  for (const record of records) {
    const hasRun = record.pathHash !== '' && !record.remarks.some((remark) => remark.code === 'not tried');
    if (hasRun) expected.set(solveKey(record), record);
  }
  const work = numberedPlan(options)
    .filter(({ key, entry }) => expected.has(key) && entry.planned.why === null)
    .map(({ entry }) => entry);
  const steady = new Map<string, boolean>();
  const onSolve = (record: SolveRecord): void => {
    const key = solveKey(record);
    const before = expected.get(key);
    if (before) steady.set(key, isSame(before, record));
  };
  await runWork({ ...options, fresh: true }, work, { onSolve, hasStreaks: false });
  return steady;
}

function isSame(before: SolveRecord, after: SolveRecord): boolean {
  if (before.outcome !== after.outcome) return false;
  return before.outcome === 'timed out' || before.pathHash === after.pathHash;
}
