import type { SuiteRevision } from '../schemas/case.ts';
import { type CertificatesFile, MemoryCertificates } from './certification-cache.ts';
import { prepareSuite } from './prepare.ts';
import { readSuiteText } from './read-suite.ts';

/** Certifies every root of the given suite texts afresh: the revisions, and the certificates to keep as a file. */
export function certifyAll(texts: readonly string[]): { revisions: SuiteRevision[]; file: CertificatesFile } {
  const cache = new MemoryCertificates();
  const revisions = texts.map((text) => prepareSuite(readSuiteText(text), cache));
  return { revisions, file: cache.toFile() };
}
