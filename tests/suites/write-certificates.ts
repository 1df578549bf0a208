import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { certifyAll } from '../../shared/suites/certify-all.ts';

/**
 * Certifies every root of the built-in suites afresh and writes `suites/certificates.json`:
 * `npx tsx tests/suites/write-certificates.ts`, after every change to a suite or to the certifier;
 * then `npx biome check --write suites`.
 */
const folder = fileURLToPath(new URL('../../suites/', import.meta.url));
const names = readdirSync(folder)
  .filter((name) => name.endsWith('.yaml'))
  .sort();
const { file } = certifyAll(names.map((name) => readFileSync(`${folder}${name}`, 'utf8')));
writeFileSync(`${folder}certificates.json`, `${JSON.stringify(file, null, 2)}\n`);
process.stdout.write(`${Object.keys(file.certificates).length} cases certified\n`);
