import { prepareSuite } from '../../../shared/suites/prepare.ts';
import { readSuiteText } from '../../../shared/suites/read-suite.ts';
import { localActor } from '../../actor.ts';
import { builtInSuites, readSuiteFile, storedCertificates } from '../../cli/open-suite.ts';
import type { SuitesService } from './suites.service.ts';

/** Brings the suites that come with the product into the database; a file that has changed is a new revision. */
export function loadBuiltInSuites(suites: SuitesService): void {
  const certificates = storedCertificates();
  for (const id of builtInSuites()) {
    const source = readSuiteFile(id);
    const revision = prepareSuite(readSuiteText(source), certificates);
    suites.addRevision(localActor, { revision, source, builtIn: true, note: 'Comes with Tallyroot.' });
  }
}
