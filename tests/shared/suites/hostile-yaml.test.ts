import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { AppError } from '../../../shared/errors.ts';
import { readSuiteText } from '../../../shared/suites/read-suite.ts';

const hostile: [name: string, text: string, expected: RegExp][] = [
  ['aliases that multiply', 'a: &a [x, x]\nb: &b [*a, *a]\nc: [*b, *b]\n', /Anchors are refused/],
  ['an alias alone', 'format: *one\n', /alias|Aliases/i],
  ['tags', 'format: !!binary MQ==\n', /Tags are refused/],
  ['open brackets without end', '['.repeat(500_000), /Nesting deeper than/],
  ['open braces without end', '{a: '.repeat(200_000), /Nesting deeper than/],
  ['nested sequences on a line', '- '.repeat(500_000), /Nesting deeper than/],
  ['nested explicit keys', '? '.repeat(500_000), /Nesting deeper than/],
  [
    'a staircase of keys',
    Array.from({ length: 500 }, (_, i) => `${' '.repeat(i)}a:`).join('\n'),
    /Nesting deeper/,
  ],
  ['ten megabytes', 'a'.repeat(10_000_000), /at most 1048576 bytes/],
  ['a megabyte in few characters', 'é'.repeat(600_000), /larger than 1048576 bytes/],
  ['half a million values', `a: [${'1,'.repeat(500_000)}]`, /More than 200000 values/],
  ['a million line ends', '\n'.repeat(1_000_000), /More than 200000 values/],
  [
    'sixty thousand keys',
    Array.from({ length: 60_000 }, (_, i) => `k${i}: 1`).join('\n'),
    /More than 200000 values/,
  ],
  ['wrong escapes by the thousand', `a: "${'\\q'.repeat(500_000)}"`, /backslashes/],
  ['two documents', 'format: 1\n---\nformat: 1\n', /a second one begins here/],
  ['a key twice', 'format: 1\nformat: 1\n', /stands here twice/],
  ['a key that reaches into objects', '__proto__: { a: 1 }\n', /This key is refused/],
  ['keys that are no texts', '? [a, b]\n: c\n', /no valid YAML/],
  ['no YAML at all', 'a: [1, 2\nb: 3\n', /no valid YAML/],
  ['nothing', '', /block of named values was expected/],
  ['control characters', '\u0002\u0018\u001f', /expected|YAML/],
];

describe('readSuiteText on hostile text', () => {
  it.each(hostile)('refuses %s', (_name, text, expected) => {
    let caught: unknown;
    try {
      readSuiteText(text);
    } catch (error) {
      caught = error;
    }
    expect(caught).toBeInstanceOf(AppError);
    expect(String(caught)).toMatch(expected);
  });

  it('tells at most 100 mistakes', () => {
    const bad = Array.from({ length: 300 }, (_, i) => `  - id: A${i}\n    equation: x\n`).join('');
    try {
      readSuiteText(`format: 1\nid: a\ntitle: A\ncases:\n${bad}`);
      expect.unreachable();
    } catch (error) {
      expect(error instanceof AppError && error.issues.length).toBe(100);
    }
  });

  it('answers every damaged suite with a reading or an AppError that has a place for each mistake', () => {
    const text = `format: 1
id: a
title: A
cases:
  - id: b
    equation: "x < n ? x^2 - n : 1"
    sweep: { n: [2, 3], 'k, m': [[1, 2]] }
    bracket: [0, pi/2 + 1e-9]
    starts: [[1], [{ each: [1, 2] }]]
    roots: [{ value: sqrt(n), simple: x - 1, multiplicity: 2 }]
    traits: [multiple]
    source: Constructed
`;
    const pieces = [
      '',
      ' ',
      '\n',
      ':',
      '- ',
      '[',
      ']',
      '{',
      '}',
      "'",
      '"',
      '&a',
      '*a',
      '!!x',
      '1e999',
      '|',
      '>',
      '?',
      '#',
      'é',
      '\t',
    ];
    const damage = fc.record({
      at: fc.nat(text.length),
      cut: fc.nat(12),
      put: fc.constantFrom(...pieces),
    });
    fc.assert(
      fc.property(fc.array(damage, { minLength: 1, maxLength: 3 }), (damages) => {
        let damaged = text;
        for (const { at, cut, put } of damages)
          damaged = damaged.slice(0, at) + put + damaged.slice(at + cut);
        try {
          readSuiteText(damaged);
        } catch (error) {
          if (!(error instanceof AppError)) throw error;
          expect(error.issues.length).toBeGreaterThan(0);
          const lines = damaged.split('\n').length;
          for (const { line, column } of error.issues) {
            expect(line !== undefined && line >= 1 && line <= lines).toBe(true);
            expect(column !== undefined && column >= 1).toBe(true);
          }
        }
      }),
      { seed: 4, numRuns: 300 },
    );
  });
});
