import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EquationError } from '../../../shared/equations/equation-error.ts';
import { constantTable, functionTable } from '../../../shared/equations/functions.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import type { Tree } from '../../../shared/equations/tree.ts';

const names = ['a', 'b', 'n'];
const x: Tree = { kind: 'variable', name: 'x' };
const number = (text: string): Tree => ({ kind: 'number', text });

function refusal(text: string, parameters: readonly string[] = names): EquationError {
  try {
    parseEquation(text, parameters);
  } catch (error) {
    if (error instanceof EquationError) return error;
    throw error;
  }
  throw new Error(`accepted: ${text}`);
}

describe('parseEquation', () => {
  it('keeps the exact text of every number', () => {
    expect(parseEquation('0.10').tree).toEqual(number('0.10'));
    expect(parseEquation('12345678901234567890.50E-3').tree).toEqual(number('12345678901234567890.50E-3'));
    expect(parseEquation('max(.5, 1., 1e+5)').tree).toEqual({
      kind: 'call',
      name: 'max',
      arguments: [number('.5'), number('1.'), number('1e+5')],
    });
  });

  it('binds the power to the right and closer than the sign, the rest to the left', () => {
    const power = (left: Tree, right: Tree): Tree => ({ kind: 'binary', operator: '^', left, right });
    expect(parseEquation('-x^2').tree).toEqual({ kind: 'negate', of: power(x, number('2')) });
    expect(parseEquation('x^2^3').tree).toEqual(power(x, power(number('2'), number('3'))));
    expect(parseEquation('2^-x').tree).toEqual(power(number('2'), { kind: 'negate', of: x }));
    const difference: Tree = { kind: 'binary', operator: '-', left: x, right: number('1') };
    expect(parseEquation('x - 1 - 2').tree).toEqual({
      kind: 'binary',
      operator: '-',
      left: difference,
      right: number('2'),
    });
  });

  it('reads pow(a, b) as the operator and drops a unary plus', () => {
    expect(parseEquation('pow(x, 2)').tree).toEqual(parseEquation('x^2').tree);
    expect(parseEquation('+x - (+2)').tree).toEqual(parseEquation('x - 2').tree);
  });

  it('accepts every function of the table with its number of arguments, and both constants', () => {
    for (const entry of functionTable) {
      const call = `${entry.name}(${entry.arguments.map(() => 'x').join(', ')})`;
      expect(parseEquation(call).parameters, call).toEqual([]);
      const one = `${entry.name}(${entry.arguments.map(() => 'x').join(', ')}, x)`;
      if (!('repeats' in entry)) expect(refusal(one).message, one).toMatch(/takes \d argument/);
      if (entry.arguments.length > 1)
        expect(refusal(`${entry.name}(x)`).message).toMatch(/takes (at least )?2/);
    }
    for (const { name } of constantTable)
      expect(parseEquation(name).tree).toEqual({ kind: 'constant', name });
  });

  it('reads choices, relations and their connectives', () => {
    expect(parseEquation('x < 1 and not (x == 0) or x >= 9 ? a : 2', names).tree).toEqual({
      kind: 'choice',
      condition: {
        kind: 'or',
        left: {
          kind: 'and',
          left: { kind: 'relation', relation: '<', left: x, right: number('1') },
          right: { kind: 'not', of: { kind: 'relation', relation: '==', left: x, right: number('0') } },
        },
        right: { kind: 'relation', relation: '>=', left: x, right: number('9') },
      },
      yes: { kind: 'parameter', name: 'a' },
      no: number('2'),
    });
  });

  it('takes line breaks and tabs as spaces', () => {
    expect(parseEquation('x\r\n\t+ 1\n').tree).toEqual(parseEquation('x + 1').tree);
  });

  it('accepts a sum of hundreds of terms as one level of nesting', () => {
    expect(parseEquation(`${'x+'.repeat(400)}x`).tree.kind).toBe('binary');
  });

  it('allows several variables for a system', () => {
    expect(parseEquation('x*y - a', ['a'], ['x', 'y']).variables).toEqual(['x', 'y']);
  });

  // text, line, column, part of the message
  const refused: [string, number, number, string][] = [
    ['', 1, 1, 'empty'],
    [' \n ', 1, 1, 'empty'],
    ['2x', 1, 2, 'write *'],
    ['2 (x)', 1, 3, 'write *'],
    ['(x)(x)', 1, 4, 'write *'],
    ['x(2)', 1, 2, 'write *'],
    ['1/2x', 1, 4, 'write *'],
    ['x 2', 1, 3, 'write *'],
    ['5 cm', 1, 3, 'is not known'],
    ['sin x', 1, 1, 'sin(…)'],
    ['x + exp', 1, 5, 'exp(…)'],
    ['sinus(x)', 1, 1, 'is not known'],
    ['ln(x)', 1, 1, 'write log(x)'],
    ['Sin(x)', 1, 1, 'lower case'],
    ['X + 1', 1, 1, 'write x'],
    ['c*x', 1, 1, '“a”, “b”, “n”'],
    ['i', 1, 1, 'imaginary'],
    ['2 + 3*i', 1, 7, 'imaginary'],
    ['Infinity', 1, 1, 'infinity'],
    ['x - NaN', 1, 5, 'real number'],
    ['true ? 1 : 2', 1, 1, 'relation'],
    ['null', 1, 1, 'is not known'],
    ['x mod 2', 1, 3, 'remainder'],
    ['x xor a', 1, 3, 'and not'],
    ['x to a', 1, 3, 'is not known'],
    ['x = 2', 1, 3, '“= 0”'],
    ['f(x) = 3', 1, 6, '“= 0”'],
    ['f(x)', 1, 1, 'is not known'],
    ['x; x', 1, 2, 'one expression'],
    ['x.y', 1, 2, 'properties'],
    ['x?.y', 1, 3, 'properties'],
    ['x["y"]', 1, 2, 'matrices'],
    ['[1, 2]', 1, 1, 'matrices'],
    ['{a: 1}', 1, 1, 'round brackets'],
    ['"x"', 1, 1, 'strings'],
    ["x'", 1, 2, 'primes'],
    ['x!', 1, 2, 'factorial'],
    ['x % 2', 1, 3, 'remainder'],
    ['x ** 2', 1, 3, 'write ^'],
    ['x .^ 2', 1, 3, 'matrices'],
    ['1./x', 1, 1, 'two ways'],
    ['x | a', 1, 3, 'or'],
    ['x && a', 1, 3, 'write and'],
    ['~x', 1, 1, 'not'],
    ['1:3', 1, 2, 'belongs to a choice'],
    ['x # note', 1, 3, 'comments'],
    ['x − 1', 1, 3, 'plain minus'],
    ['x²', 1, 2, 'write ^2'],
    ['x\u0000', 1, 2, 'U+0000'],
    ['0x1F', 1, 1, 'decimal'],
    ['10e', 1, 1, 'incomplete'],
    ['1..2', 1, 3, 'one decimal point'],
    ['1e400', 1, 1, 'too large'],
    ['x - 1e-400', 1, 5, 'too small'],
    ['x +', 1, 4, 'ends too early'],
    ['* x', 1, 1, 'was expected'],
    ['x * / 2', 1, 5, 'was expected after “*”'],
    ['x <> 1', 1, 4, 'was expected after “<”'],
    ['(x', 1, 1, 'never closed'],
    ['x)', 1, 2, 'closes nothing'],
    ['()', 1, 2, 'was expected'],
    ['sin(x,)', 1, 7, 'was expected after “,”'],
    ['x, a', 1, 2, 'arguments'],
    ['sin()', 1, 1, 'takes 1 argument, not 0'],
    ['log(x, 2)', 1, 1, 'log(x) / log(b)'],
    ['x < 1', 1, 1, 'not a condition'],
    ['x + (x < 1)', 1, 6, 'not a condition'],
    ['sin(x > 1)', 1, 5, 'not a condition'],
    ['x ? 1 : 2', 1, 1, 'a condition such as'],
    ['x + 1 ? 1 : 2', 1, 1, 'a condition such as'],
    ['x < 1 and a ? 1 : 2', 1, 11, 'a condition such as'],
    ['not x < 1 ? 1 : 2', 1, 1, 'not (x < 1)'],
    ['x < 1 ? 2', 1, 7, 'no “:”'],
    ['x < 1 : 2', 1, 7, 'belongs to a choice'],
    ['1 < x < 2 ? 1 : 2', 1, 7, 'cannot be chained'],
    ['x +\n  foo', 2, 3, 'is not known'],
    ['x +\r\nx +  ', 2, 6, 'ends too early'],
  ];
  it.each(refused)('refuses %j at line %i, column %i', (text, line, column, part) => {
    const error = refusal(text);
    expect(error.code).toBe('invalid');
    expect(error.issues).toHaveLength(1);
    const [issue] = error.issues;
    expect(issue).toMatchObject({ line, column });
    expect(issue?.message).toContain(part);
  });

  it('refuses names of parameters that are ill-formed, reserved or given twice', () => {
    for (const name of [
      '',
      '1a',
      'a b',
      '__proto__',
      'π',
      'e',
      'pi',
      'sin',
      'pow',
      'and',
      'mod',
      'end',
      'x',
      'NaN',
    ]) {
      expect(() => parseEquation('x', [name]), name).toThrow(EquationError);
    }
    expect(() => parseEquation('x', ['a', 'a'])).toThrow(EquationError);
    expect(refusal('x', ['sin']).issues[0]?.path).toBe('parameters');
  });

  it('gives no special meaning to names that objects inherit', () => {
    expect(refusal('constructor').message).toContain('is not known');
    expect(refusal('toString(x)').message).toContain('is not known');
    expect(parseEquation('constructor*x', ['constructor']).parameters).toEqual(['constructor']);
  });

  const hostile: [string, string][] = [
    ['open brackets', '('.repeat(1999)],
    ['nested brackets', `${'('.repeat(900)}x${')'.repeat(900)}`],
    ['minus signs', `${'-'.repeat(1999)}x`],
    ['negations', `${'not '.repeat(490)}x`],
    ['a tower of powers', `${'2^'.repeat(999)}x`],
    ['nested calls', `${'sin('.repeat(400)}x${')'.repeat(400)}`],
    ['nested choices', `${'x<1?1:'.repeat(330)}x`],
    ['chained relations', `${'x<'.repeat(999)}x`],
    ['a very long number', '9'.repeat(2000)],
    ['square brackets', '['.repeat(1999)],
    ['braces', '{a:'.repeat(600)],
    ['question marks', 'x?'.repeat(999)],
    ['properties', `x${'.x'.repeat(900)}`],
    ['primes', `x${"'".repeat(1999)}`],
    ['too long a text', 'x+'.repeat(100_000)],
    ['a prototype', '__proto__.constructor'],
    ['code', 'x + (function(){ return this })()'],
    ['an import', 'import("fs")'],
    ['a lone surrogate', 'x + \ud800'],
  ];
  it.each(hostile)('answers %s with an error of its own', (_, text) => {
    const error = refusal(text);
    expect(error.message.length).toBeLessThan(250);
  });

  it('quotes no more than a few printable characters of the text', () => {
    const error = refusal(`x + ${'evil'.repeat(200)}`);
    expect(error.message).toContain('“evilevilevilevilevilevil…”');
    expect(error.message.length).toBeLessThan(200);
    expect(refusal('\u0007').message).toContain('U+0007');
  });

  it('throws nothing but EquationError for random texts', () => {
    const pieces = fc.constantFrom(
      ...[
        'x',
        'a',
        'pi',
        'sin(',
        'max(',
        '(',
        ')',
        ',',
        '+',
        '-',
        '*',
        '/',
        '^',
        '?',
        ':',
        '<',
        '>=',
        '==',
        '!=',
      ],
      ...[
        'and',
        'or',
        'not ',
        ' ',
        '\n',
        '1',
        '2.5',
        '1e3',
        '.',
        '!',
        '%',
        '=',
        '[',
        ']',
        '{',
        "'",
        '"',
        '#',
        'i',
        'to',
      ],
    );
    const text = fc.oneof(
      fc.array(pieces, { maxLength: 40 }).map((parts) => parts.join('')),
      fc.string({ unit: 'binary', maxLength: 60 }),
    );
    fc.assert(
      fc.property(text, (candidate) => {
        try {
          parseEquation(candidate, names);
        } catch (error) {
          if (!(error instanceof EquationError)) throw error;
          const [issue] = error.issues;
          const lines = candidate.split(/\r\n|\n|\r/);
          expect(issue?.line).toBeLessThanOrEqual(lines.length);
          expect(issue?.column).toBeLessThanOrEqual((lines[(issue?.line ?? 1) - 1]?.length ?? 0) + 1);
        }
      }),
      { numRuns: 4000, seed: 1 },
    );
  });
});
