import { describe, expect, it } from 'vitest';
import { AppError, type Issue } from '../../../shared/errors.ts';
import { readSuiteText } from '../../../shared/suites/read-suite.ts';

const head = 'format: 1\nid: small\ntitle: Small\ncases:\n';
const good = `${head}  - id: root
    equation: x^2 - n
    parameters: { n: 2.0000 }
    bracket: [1, pi/2]
    starts: [[1], [1 + 1e-9, 2]]
    roots:
      - value: 1.4142135623730950488016887242096980785696718753769
    source: Constructed
`;

function issuesOf(text: string): Issue[] {
  try {
    readSuiteText(text);
  } catch (error) {
    if (error instanceof AppError) return error.issues;
    throw error;
  }
  return [];
}

function places(text: string): string[] {
  return issuesOf(text).map((issue) => `${issue.line}:${issue.column} ${issue.message}`);
}

describe('readSuiteText', () => {
  it('keeps numbers digit by digit and fills in defaults', () => {
    const { file, cases } = readSuiteText(good);
    expect(file.limits).toEqual({ evaluations: 1000, seconds: 10 });
    expect(cases[0]).toMatchObject({
      parameters: { n: '2.0000' },
      roots: [
        { value: '1.4142135623730950488016887242096980785696718753769', multiplicity: 1, allowed: true },
      ],
      expectation: 'root',
    });
  });

  it('writes constant expressions out as the exact decimal of the binary64 that a solver sees', () => {
    const plain = readSuiteText(good).cases[0];
    // Exact expansions of the doubles nearest to π/2 and 1 + 1e-9.
    expect(plain?.bracket).toEqual(['1', '1.5707963267948965579989817342720925807952880859375']);
    expect(plain?.starts[1]).toEqual(['1.000000001000000082740370999090373516082763671875', '2']);
    expect(Number(plain?.starts[1]?.[0])).toBe(1 + 1e-9);
  });

  it('reads JSON as well', () => {
    const text = JSON.stringify({
      format: 1,
      id: 'j',
      title: 'J',
      cases: [{ id: 'a', equation: 'x', roots: [{ value: 0 }], source: 'Constructed' }],
    });
    expect(readSuiteText(text).cases[0]?.roots[0]?.value).toBe('0');
  });

  it('tells all mistakes of shape at once, each with line, column and what was expected', () => {
    const text = `format: 2\nid: Small\ntitle: Small\ncases:\n  - id: root\n    equation: x\n    colour: red\n    traits: [easy]\n    roots: [{ value: [1] }]\n`;
    const found = places(text);
    expect(found).toContain('1:9 1 was expected.');
    expect(found.some((line) => line.startsWith('2:5 Lower-case letters'))).toBe(true);
    expect(found).toContain('7:5 Unknown key "colour".');
    expect(found.some((line) => line.startsWith('8:14 Smooth, polynomial'))).toBe(true);
    expect(found.some((line) => line.startsWith('9:22 A number, a constant expression'))).toBe(true);
    expect(found).toContain('5:5 "source" is missing: a text was expected.');
  });

  it('points into a plain equation', () => {
    const text = good.replace('x^2 - n', 'x^2 - foo');
    expect(places(text)[0]).toMatch(/^6:21 /);
  });

  it('points into a quoted and into a folded equation', () => {
    expect(places(good.replace('x^2 - n', "'x^2 - foo'"))[0]).toMatch(/^6:22 /);
    const folded = good.replace('equation: x^2 - n', 'equation: >-\n      x^2\n      - n\n      + foo');
    expect(places(folded)[0]).toMatch(/^9:9 /);
  });

  it('points into a constant expression', () => {
    expect(places(good.replace('pi/2', 'pi/zz'))[0]).toMatch(/^8:21 /);
    expect(places(good.replace('pi/2', 'x + 1'))[0]).toMatch(/^8:18 A constant was expected/);
  });

  it('tells of a case that is well formed even where another is not', () => {
    const text = `${good.replace('x^2 - n', 'x^2 -')}  - id: Bad\n    equation: x\n    source: Constructed\n`;
    const lines = issuesOf(text).map((issue) => issue.line);
    expect(lines).toContain(6);
    expect(lines).toContain(13);
  });

  it.each([
    ['bracket: [1, pi/2]', 'bracket: [2, 1]', '8:14 The low end'],
    ['bracket: [1, pi/2]', 'bracket: [1, 1e999]', '8:18 This number is too large'],
    ['source: Constructed', 'expectation: none\n    source: Constructed', '11:7 A case that expects no root'],
    ['n: 2.0000', 'pi: 2', '7:17 '],
    ['n: 2.0000', 'n: two', '7:22 A number was expected'],
    ['value: 1.4', 'digits: 20\n        value: 1.4', '11:17 Fewer than 40 digits need a note'],
  ])('refuses %s changed to %s', (from, to, expected) => {
    expect(places(good.replace(from, to)).some((line) => line.startsWith(expected))).toBe(true);
  });

  it('refuses an id that is used twice, also by a member of a sweep', () => {
    const again = good.slice(head.length).replace('id: root', 'id: root-n2');
    const swept = good.replace('parameters: { n: 2.0000 }', 'sweep: { n: [2, 3] }').replace('pi/2', '3');
    expect(places(swept + again)).toContain('13:9 The id root-n2 is used twice.');
  });
});
