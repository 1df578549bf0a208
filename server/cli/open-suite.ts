import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { AppError } from '../../shared/errors.ts';
import type { SuiteRevision } from '../../shared/schemas/case.ts';
import { certificatesFile, MemoryCertificates } from '../../shared/suites/certification-cache.ts';
import { prepareSuite } from '../../shared/suites/prepare.ts';
import { readSuiteText } from '../../shared/suites/read-suite.ts';

const suiteFolder = fileURLToPath(new URL('../../suites/', import.meta.url));
const certificatesPath = join(suiteFolder, 'certificates.json');

/** Ids of the built-in suites, in alphabetical order. */
export function builtInSuites(): string[] {
  return readdirSync(suiteFolder)
    .filter((name) => name.endsWith('.yaml'))
    .map((name) => basename(name, '.yaml'))
    .sort();
}

/**
 * A suite ready to run, by the id of a built-in one or by the path of a file. Roots whose certificates come
 * with the product are not certified again; those of other files are.
 * @throws AppError with line and column of every mistake in the file
 */
export function openSuite(idOrFile: string): SuiteRevision {
  const reading = readSuiteText(readSuiteFile(idOrFile));
  return prepareSuite(reading, storedCertificates());
}

/** The text of a suite, by id or path. */
export function readSuiteFile(idOrFile: string): string {
  const isId = builtInSuites().includes(idOrFile);
  const path = isId ? join(suiteFolder, `${idOrFile}.yaml`) : idOrFile;
  try {
    return readFileSync(path, 'utf8');
  } catch (cause) {
    const known = builtInSuites().join(', ');
    throw new AppError(
      'not_found',
      `There is no suite ${idOrFile}: it is neither a file nor one of ${known}.`,
      { cause },
    );
  }
}

/** The certificates that come with the product; empty where the file is missing. */
export function storedCertificates(): MemoryCertificates {
  if (!existsSync(certificatesPath)) return new MemoryCertificates();
  return new MemoryCertificates(certificatesFile.parse(JSON.parse(readFileSync(certificatesPath, 'utf8'))));
}
