import { AppError, type Issue } from '../errors.ts';
import type { SuiteCase, SuiteRevision } from '../schemas/case.ts';
import { caseHash, revisionHash } from './case-hash.ts';
import type { CertificationCache } from './certification-cache.ts';
import { certifyCase } from './certify-case.ts';
import type { SuiteReading } from './read-suite.ts';
import type { PlainCase } from './write-out.ts';

/** One plain case made ready to run, or the claims of it that are refused. */
export function prepareCase(
  plain: PlainCase,
  cache: CertificationCache | null,
): { suiteCase: SuiteCase; problems: ReturnType<typeof certifyCase>['problems'] } {
  const { roots, problems } = certifyCase(plain, cache);
  const { id, equation, parameters, bracket, starts, expectation, traits, source, note } = plain;
  const content = { id, equation, parameters, bracket, starts, roots, expectation, traits, source, note };
  return { suiteCase: { ...content, hash: caseHash(content) }, problems };
}

/**
 * Makes a suite that has been read ready to run: roots certified, accuracy measured, hashes taken.
 * `cache`: keeps certifications between calls; without one each root is certified afresh (about 20 ms each).
 * @throws AppError `unprocessable` with an issue, line and column for every claim that is refused
 */
export function prepareSuite(reading: SuiteReading, cache: CertificationCache | null = null): SuiteRevision {
  const issues: Issue[] = [];
  const cases = reading.cases.map((plain) => {
    const { suiteCase, problems } = prepareCase(plain, cache);
    for (const problem of problems) {
      const at = reading.positions.value(problem.path);
      issues.push({ path: problem.path.join('.'), ...at, message: `${problem.message}.` });
    }
    return suiteCase;
  });
  const first = issues[0];
  if (first !== undefined) {
    const count = issues.length === 1 ? 'A claim' : `${issues.length} claims`;
    const text = `${count} of the suite could not be certified; the first, line ${first.line}: ${first.message}`;
    throw new AppError('unprocessable', text, { issues });
  }
  const { id, title, limits } = reading.file;
  return { id, title, revision: revisionHash(cases, limits), limits, cases };
}
