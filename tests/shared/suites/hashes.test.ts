import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { suiteFileJsonSchema } from '../../../shared/schemas/suite-file.ts';
import { certificationKey, MemoryCertificates } from '../../../shared/suites/certification-cache.ts';
import { exactDecimalText } from '../../../shared/suites/exact-decimal.ts';
import { prepareSuite } from '../../../shared/suites/prepare.ts';
import { readSuiteText } from '../../../shared/suites/read-suite.ts';
import { sha256 } from '../../../shared/suites/sha256.ts';

const text = `format: 1
id: pair
title: Pair
limits: { evaluations: 500, seconds: 5 }
cases:
  - id: one
    equation: x^2 - n
    parameters: { n: 4 }
    bracket: [0, 3]
    starts: [[1, 1.5]]
    roots: [{ value: 2 }, { value: -2, allowed: false }]
    traits: [polynomial]
    source: Constructed
    note: A note
  - id: two
    equation: x
    roots: [{ value: 0 }]
    source: Constructed
`;
const prepared = (source: string) => prepareSuite(readSuiteText(source));
const base = prepared(text);

describe('sha256', () => {
  it('agrees with the platform on any text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 300 }), (value) => {
        expect(sha256(value)).toBe(createHash('sha256').update(value).digest('hex'));
      }),
      { seed: 1, numRuns: 200 },
    );
  });
});

describe('exactDecimalText', () => {
  it('reads back to the same bits', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(Number(exactDecimalText(value))).toBe(value === 0 ? 0 : value);
      }),
      { seed: 2, numRuns: 300 },
    );
  });
});

describe('case hashes and revisions', () => {
  it.each([
    ['the equation', 'x^2 - n', 'x^2 - n + 0'],
    ['a parameter', 'n: 4', 'n: 4.0'],
    ['the bracket', '[0, 3]', '[0, 2.5]'],
    ['a start', '[1, 1.5]', '[1, 1.25]'],
    ['the roots', ', { value: -2, allowed: false }', ''],
  ])('change with %s', (_what, from, to) => {
    const changed = prepared(text.replace(from, to));
    expect(changed.cases[0]?.hash).not.toBe(base.cases[0]?.hash);
    expect(changed.cases[1]?.hash).toBe(base.cases[1]?.hash);
    expect(changed.revision).not.toBe(base.revision);
  });

  it.each([
    ['the note', 'A note', 'Another note'],
    ['the source', 'source: Constructed\n    note', 'source: From memory\n    note'],
    ['a title', 'title: Pair', 'title: Two'],
    ['the layout of the file', 'starts: [[1, 1.5]]', 'starts:\n      - [1,   1.5] # a remark'],
  ])('do not change with %s', (_what, from, to) => {
    const changed = prepared(text.replace(from, to));
    expect(changed.cases.map((entry) => entry.hash)).toEqual(base.cases.map((entry) => entry.hash));
    expect(changed.revision).toBe(base.revision);
  });

  it('change the revision with the limits and with an id, though no case hash', () => {
    for (const [from, to] of [
      ['evaluations: 500', 'evaluations: 501'],
      ['id: two', 'id: three'],
    ] as const) {
      const changed = prepared(text.replace(from, to));
      expect(changed.cases.map((entry) => entry.hash)).toEqual(base.cases.map((entry) => entry.hash));
      expect(changed.revision).not.toBe(base.revision);
    }
  });
});

describe('certification cache', () => {
  it('is asked first and gives the same revision', () => {
    const cache = new MemoryCertificates();
    const reading = readSuiteText(text);
    const first = prepareSuite(reading, cache);
    const kept = cache.toFile();
    expect(Object.keys(kept.certificates).sort()).toEqual(reading.cases.map(certificationKey).sort());
    expect(prepareSuite(reading, new MemoryCertificates(kept))).toEqual(first);
    expect(first).toEqual(base);
  });

  it('never keeps a case with a refused claim', () => {
    const cache = new MemoryCertificates();
    const wrong = readSuiteText(text.replace('{ value: 2 }', '{ value: 2.5 }'));
    expect(() => prepareSuite(wrong, cache)).toThrow(/no root/);
    expect(Object.keys(cache.toFile().certificates)).toHaveLength(1);
  });
});

describe('suiteFileJsonSchema', () => {
  it('describes what an author writes: closed objects, defaults not required', () => {
    const schema = suiteFileJsonSchema();
    expect(schema).toMatchObject({
      additionalProperties: false,
      required: ['format', 'id', 'title', 'cases'],
    });
    expect(JSON.stringify(schema)).toContain('"each"');
  });
});
