import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { suiteRevision } from '../../shared/schemas/case.ts';
import {
  certificatesFile,
  certificationKey,
  MemoryCertificates,
} from '../../shared/suites/certification-cache.ts';
import { prepareSuite } from '../../shared/suites/prepare.ts';
import { readSuiteText, type SuiteReading } from '../../shared/suites/read-suite.ts';

const folder = fileURLToPath(new URL('../../suites/', import.meta.url));
const names = readdirSync(folder).filter((name) => name.endsWith('.yaml'));
const known = new Map<string, SuiteReading>();
/** Read on demand, so that a mistake in one file fails the tests that need it and no others. */
function reading(name: string): SuiteReading {
  const found = known.get(name) ?? readSuiteText(readFileSync(folder + name, 'utf8'));
  known.set(name, found);
  return found;
}
const all = () => names.map(reading);
const shipped = certificatesFile.parse(JSON.parse(readFileSync(`${folder}certificates.json`, 'utf8')));

/** Cases whose root no certificate reaches, and why; every other root has to be certified without a statement. */
const byStatement: Record<string, string> = {
  'aps-13': 'flat: every derivative vanishes, f is 0 at the root by definition',
  'flat-even': 'flat, and f does not change sign',
  'flat-odd': 'flat: every derivative vanishes, f is 0 at the root by definition',
  'pole-hidden': 'unbounded around the one point at which f is defined as 0',
  'step-sign': 'a jump over 0',
  'step-sloped': 'a jump over 0',
  'end-domain': 'the domain ends at the root',
};

describe('built-in suites', () => {
  it('hold at least 200 cases in all, under the names of their files', () => {
    const ids = names.map((name) => name.replace('.yaml', ''));
    expect(ids).toEqual(
      expect.arrayContaining(['brackets', 'engineering', 'multiple-roots', 'open-starts', 'traps']),
    );
    expect(all().map((suite) => suite.file.id)).toEqual(ids);
    const count = all().reduce((sum, suite) => sum + suite.cases.length, 0);
    expect(count).toBeGreaterThanOrEqual(200);
  });

  it('hold the 154 problems of Alefeld, Potra and Shi (1995), Table I, family by family', () => {
    const counts: Record<string, number> = {};
    for (const { id } of reading('brackets.yaml').cases) {
      const family = id.slice(0, 6);
      counts[family] = (counts[family] ?? 0) + 1;
    }
    expect(Object.values(counts)).toEqual([1, 10, 3, 14, 1, 10, 3, 5, 7, 5, 4, 19, 1, 40, 31]);
  });

  it('use each id once over all suites', () => {
    const ids = all().flatMap((suite) => suite.cases.map((plain) => plain.id));
    expect(new Set(ids).size).toBe(ids.length);
  });

  it('offer open solvers a start and bracketing solvers a bracket on at least 200 cases', () => {
    const cases = all().flatMap((suite) => suite.cases);
    expect(cases.filter((plain) => plain.bracket !== null && plain.starts.length > 0).length).toBeGreaterThan(
      200,
    );
  });

  it.each(names)(
    'certify every root of %s afresh, to 40 digits and more, as the shipped certificates say',
    (name) => {
      const { cases } = reading(name);
      const fresh = prepareSuite(reading(name));
      expect(suiteRevision.safeParse(fresh).success).toBe(true);
      for (const [index, suiteCase] of fresh.cases.entries()) {
        for (const root of suiteCase.roots) {
          expect(root.digits, suiteCase.id).toBeGreaterThanOrEqual(40);
          const isExcepted = Object.hasOwn(byStatement, suiteCase.id);
          expect(root.certificate === 'by statement', suiteCase.id).toBe(isExcepted);
          expect(Number.isFinite(root.attainable), suiteCase.id).toBe(true);
        }
        const plain = cases[index];
        if (plain === undefined) throw new Error(suiteCase.id);
        expect(shipped.certificates[certificationKey(plain)], suiteCase.id).toEqual(suiteCase.roots);
      }
    },
    // Seconds alone, but many times that on a machine that does other work as well.
    180_000,
  );

  it('are the same revision with the shipped certificates, which hold nothing else', () => {
    const cache = new MemoryCertificates(shipped);
    const keys = new Set(all().flatMap((suite) => suite.cases.map(certificationKey)));
    for (const suite of all()) prepareSuite(suite, cache);
    expect(Object.keys(cache.toFile().certificates).length).toBe(Object.keys(shipped.certificates).length);
    expect(new Set(Object.keys(shipped.certificates))).toEqual(keys);
  });
});
