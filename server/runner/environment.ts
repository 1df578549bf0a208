import { readFileSync } from 'node:fs';
import { z } from 'zod';
import { arithmeticFingerprint } from '../../shared/equations/fingerprint.ts';
import type { Environment } from '../../shared/schemas/measurement.ts';

const packageFile = z.object({ version: z.string() });

function ownVersion(): string {
  const text = readFileSync(new URL('../../package.json', import.meta.url), 'utf8');
  return packageFile.parse(JSON.parse(text)).version;
}

/** Where and with what a run is made. */
export function describeEnvironment(confinement: Environment['confinement']): Environment {
  return {
    platform: process.platform,
    arch: process.arch,
    node: process.versions.node,
    v8: process.versions.v8,
    tallyroot: ownVersion(),
    fingerprint: arithmeticFingerprint(),
    confinement,
  };
}
