import { describe, expect, it } from 'vitest';
import { AppError } from '../../../shared/errors.ts';
import { prepareSuite } from '../../../shared/suites/prepare.ts';
import { readSuiteText } from '../../../shared/suites/read-suite.ts';

function refusals(fields: string): string[] {
  const text = `format: 1\nid: one\ntitle: One\ncases:\n  - id: only\n    source: Constructed\n${fields
    .split('\n')
    .map((line) => `    ${line}\n`)
    .join('')}`;
  try {
    prepareSuite(readSuiteText(text));
    return [];
  } catch (error) {
    if (!(error instanceof AppError) || error.code !== 'unprocessable') throw error;
    return error.issues.map((issue) => `${issue.line}:${issue.column} ${issue.message}`);
  }
}

describe('the claims of a case', () => {
  it('hold for a sound case', () => {
    expect(refusals('equation: x^2 - 4\nbracket: [0, 5]\nroots: [{ value: 2 }]')).toEqual([]);
  });

  it.each([
    [
      'equation: x^2 - 4\nbracket: [0, 1]\ntraits: [same signs]\nroots: [{ value: 2 }]',
      /^10:22 only: the allowed root 2 lies outside/,
    ],
    [
      'equation: x^2 - 4\nbracket: [-3, 3]\nroots: [{ value: 2 }]',
      /^8:14 only: f has the same sign at both ends/,
    ],
    [
      'equation: x^2 - 4\nbracket: [0, 3]\ntraits: [same signs]\nroots: [{ value: 2 }]',
      /the trait "same signs" is wrong/,
    ],
    ['equation: x^2 - 4\nbracket: [2, 3]\nroots: [{ value: 2 }]', /the trait "endpoint" was expected/],
    ['equation: log(x)\nbracket: [0, 3]\nroots: [{ value: 1 }]', /no certain sign at an end/],
    [
      'equation: (x - 1)^3\nroots: [{ value: 1, multiplicity: 3, simple: x - 1 }]',
      /the trait "multiple" was expected/,
    ],
    ['equation: x - 1\ntraits: [flat]\nroots: [{ value: 1 }]', /the trait "flat" does not hold/],
    ['equation: x^2 - 4\nroots: [{ value: 2 }, { value: -2 }]', /the trait "many roots" was expected/],
    ['equation: x^2 - 4\nbracket: [0, 5]\ntraits: [no root]\nexpectation: none', /one is certified at 2/],
    ['equation: x^3 - 4\ntraits: [no root]\nexpectation: none', /one is certified at 1.5874/],
    ['equation: x^2 - 4\nroots: [{ value: 2.1 }]', /no root: Newton/],
  ])('are refused: %j', (fields, reason) => {
    expect(refusals(fields).join('\n')).toMatch(reason);
  });

  it.each(['1/x', 'tan(x + 1.5)', 'x < 0.3 ? -1 : 1', '1/(x - 1/3)^3'])(
    'take no pole and no jump of %s for a root that was not expected',
    (equation) => {
      const fields = `equation: "${equation}"\nbracket: [-0.8, 1]\ntraits: [no root]\nexpectation: none`;
      expect(refusals(fields)).toEqual([]);
    },
  );
});
