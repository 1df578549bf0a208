import type { SuiteCase, SuiteRevision } from '../schemas/case.ts';
import { sha256 } from './sha256.ts';

/**
 * Identity of a case: SHA-256 over all that decides what a solver sees and how its answer is judged, namely
 * equation, parameters, bracket, starts, roots (value, multiplicity, allowed or not) and expectation. Not the
 * id, traits, source or note; nor the attainable accuracy, which follows from the rest.
 */
export function caseHash(content: Omit<SuiteCase, 'hash'>): string {
  const parameters = Object.entries(content.parameters).sort(([a], [b]) => (a < b ? -1 : 1));
  const roots = content.roots.map((root) => [root.value, root.multiplicity, root.allowed]);
  const { equation, bracket, starts, expectation } = content;
  return sha256(JSON.stringify(['case 1', equation, parameters, bracket, starts, roots, expectation]));
}

/** Identity of a revision: SHA-256 over ids and hashes of its cases in order, and its limits. */
export function revisionHash(cases: readonly SuiteCase[], limits: SuiteRevision['limits']): string {
  const listed = cases.map((suiteCase) => [suiteCase.id, suiteCase.hash]);
  return sha256(JSON.stringify(['revision 1', limits.evaluations, limits.seconds, listed]));
}
