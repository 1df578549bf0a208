import { z } from 'zod';
import { attainableVersion } from '../equations/attainable.ts';
import { certifierVersion } from '../equations/certify.ts';
import { certifiedRoot } from '../schemas/case.ts';
import { sha256 } from './sha256.ts';
import type { PlainCase } from './write-out.ts';

/** What is kept of a case all of whose claims were certified: its roots in order. Refusals are never kept. */
export const keptCertificate = z.array(certifiedRoot);
export type KeptCertificate = z.infer<typeof keptCertificate>;

/** Where certifications are kept between readings, since certifying a suite takes seconds. */
export interface CertificationCache {
  get(key: string): KeptCertificate | undefined;
  set(key: string, value: KeptCertificate): void;
}

/** The file that a cache is written to and read from, sorted by key. */
export const certificatesFile = z.strictObject({
  format: z.literal('certificates 1'),
  certificates: z.record(z.string().regex(/^[0-9a-f]{64}$/), keptCertificate),
});
export type CertificatesFile = z.infer<typeof certificatesFile>;

/** Changes with everything that decides whether the claims of a case hold, and with the certifier itself. */
export function certificationKey(plain: PlainCase): string {
  const parameters = Object.entries(plain.parameters).sort(([a], [b]) => (a < b ? -1 : 1));
  const roots = plain.roots.map(({ value, digits, multiplicity, allowed, simple, statement }) => {
    return [value, digits, multiplicity, allowed, simple, statement !== null];
  });
  const traits = [...plain.traits].sort();
  const content = [plain.equation, parameters, plain.bracket, roots, plain.expectation, traits];
  return sha256(JSON.stringify([certifierVersion, attainableVersion, content]));
}

/** A cache in memory, filled from a file's content where there is one. */
export class MemoryCertificates implements CertificationCache {
  private readonly kept: Map<string, KeptCertificate>;

  constructor(file?: CertificatesFile) {
    this.kept = new Map(Object.entries(file?.certificates ?? {}));
  }

  get(key: string): KeptCertificate | undefined {
    return this.kept.get(key);
  }

  set(key: string, value: KeptCertificate): void {
    this.kept.set(key, value);
  }

  toFile(): CertificatesFile {
    const sorted = [...this.kept.entries()].sort(([a], [b]) => (a < b ? -1 : 1));
    return { format: 'certificates 1', certificates: Object.fromEntries(sorted) };
  }
}
