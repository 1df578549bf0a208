import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import { printEquation } from '../../../shared/equations/print-equation.ts';
import { anyTree } from './random-tree.ts';

const reprint = (text: string) => printEquation(parseEquation(text, ['a']).tree);

describe('printEquation', () => {
  it.each([
    ['((x))*(2)+(3)', 'x * 2 + 3'],
    ['x-(2-a)', 'x - (2 - a)'],
    ['(x-2)-a', 'x - 2 - a'],
    ['x/(2*a)', 'x / (2 * a)'],
    ['-(x^2)', '-x^2'],
    ['(-x)^2', '(-x)^2'],
    ['(x^2)^3', '(x^2)^3'],
    ['x^(2^3)', 'x^2^3'],
    ['2^(-x)', '2^-x'],
    ['x^(1/3)', 'x^(1 / 3)'],
    ['pow(x+1,2)', '(x + 1)^2'],
    ['-(-x)', '-(-x)'],
    ['(x<1)?(2):(x>3?4:5)', 'x < 1 ? 2 : x > 3 ? 4 : 5'],
    ['(x<1 or x>2) and not (x==3) ? 1 : 2', '(x < 1 or x > 2) and not (x == 3) ? 1 : 2'],
    ['1. ^ x', '(1.)^x'],
    ['max(x,2,sin(x))', 'max(x, 2, sin(x))'],
  ])('prints %j as %j', (text, printed) => {
    expect(reprint(text)).toBe(printed);
  });

  it('prints random trees so that reading them gives equal trees', () => {
    fc.assert(
      fc.property(anyTree, (tree) => {
        const text = printEquation(tree);
        fc.pre(text.length <= 2000);
        expect(parseEquation(text, ['a']).tree).toEqual(tree);
      }),
      { numRuns: 1500, seed: 2 },
    );
  });
});
