import { describe, expect, it } from 'vitest';
import { formatBytes } from '../../../src/lib/format-bytes.ts';

describe('formatBytes', () => {
  it('counts in powers of ten and keeps two figures under ten', () => {
    const shown = [0, 999, 1000, 4217, 9_949, 12_300, 999_999, 1_500_000, 2.5e10].map((bytes) =>
      formatBytes(bytes).replace('\u202f', ' '),
    );
    expect(shown).toEqual([
      '0 B',
      '999 B',
      '1.0 kB',
      '4.2 kB',
      '9.9 kB',
      '12 kB',
      '1.0 MB',
      '1.5 MB',
      '25 GB',
    ]);
  });
});
