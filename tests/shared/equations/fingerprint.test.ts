import { describe, expect, it } from 'vitest';
import { arithmeticFingerprint } from '../../../shared/equations/fingerprint.ts';
import { BitHash } from '../../../shared/equations/hash-bits.ts';

describe('arithmeticFingerprint', () => {
  it('has the pinned value for the installed versions of the function ports', () => {
    // When this fails, a port (a package @stdlib/math-base-special-*), the engine's sqrt or one of the rules in
    // shared/equations has changed bits of results. If the change is wanted, put the new value here and tell the
    // users of the release: results of the old fingerprint cannot be compared with new ones evaluation by
    // evaluation, so references have to be run again. If not wanted, put the old version back.
    expect(arithmeticFingerprint()).toBe('a31c8604b93244f8');
  });

  it('is the same when asked again', () => {
    expect(arithmeticFingerprint()).toBe(arithmeticFingerprint());
  });
});

describe('BitHash', () => {
  // An independent computation of 64-bit FNV-1a: h = (h xor byte) times 2^40 + 435, modulo 2^64.
  const reference = (bytes: readonly number[]) => {
    let hash = 14695981039346656037n;
    for (const byte of bytes) hash = BigInt.asUintN(64, (hash ^ BigInt(byte)) * 1099511628211n);
    return hash.toString(16).padStart(16, '0');
  };

  it('agrees with the published value for the one byte 0x61', () => {
    // Fowler, Noll, Vo and others, The FNV Non-Cryptographic Hash Algorithm, test vectors; from memory.
    const hash = new BitHash();
    hash.addByte(0x61);
    expect(hash.digest()).toBe('af63dc4c8601ec8c');
  });

  it('agrees with whole-number arithmetic for many bytes', () => {
    const bytes = Array.from({ length: 500 }, (_, index) => (index * index * 7 + 13) % 256);
    const hash = new BitHash();
    for (const byte of bytes) hash.addByte(byte);
    expect(hash.digest()).toBe(reference(bytes));
  });

  it('tells apart numbers that differ in one bit or in the sign of zero, and no two NaN', () => {
    const of = (value: number) => {
      const hash = new BitHash();
      hash.addNumber(value);
      return hash.digest();
    };
    expect(new Set([1, 1 + Number.EPSILON, 0, -0, Infinity, NaN].map(of)).size).toBe(6);
    const other = new DataView(new ArrayBuffer(8));
    other.setBigUint64(0, 0xfff8000000000001n);
    expect(of(other.getFloat64(0))).toBe(of(NaN));
  });
});
