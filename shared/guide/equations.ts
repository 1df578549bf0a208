import { constantTable, type FunctionEntry, functionTable } from '../equations/functions.ts';
import { equationLimits } from '../equations/limits.ts';
import { type Chapter, code, list, paragraph, table } from './section.ts';

/** The call as an author writes it: `min(x, y, …)`. */
function callOf(entry: FunctionEntry): string {
  return `\`${entry.name}(${[...entry.arguments, ...(entry.repeats === true ? ['…'] : [])].join(', ')})\``;
}

export const equationsChapter: Chapter = {
  id: 'equations',
  title: 'Equations',
  summary: 'How f(x) is written, which functions there are, and how Tallyroot evaluates them.',
  sections: [
    {
      id: 'writing',
      title: 'Writing f(x)',
      blocks: [
        paragraph(
          'An equation is written as f(x) alone; that it equals 0 goes without saying. The unknown is `x`, other names are parameters that the case gives values to. Numbers are decimal, with a point, and keep every digit that is written.',
        ),
        code('equation', 'x^3 - 2*x - 5'),
        code('equation', 'cos(x) - x*exp(x)'),
        code('equation', 'x > 0 ? sqrt(x) - 1 : -1'),
      ],
    },
    {
      id: 'operators',
      title: 'Operators',
      blocks: [
        table(
          'Operators, those that bind closest first',
          ['sign', 'meaning'],
          [
            ['`( )`', 'round brackets; there are no others'],
            ['`^`', 'power, read from the right: `x^2^3` is `x^(2^3)`, and `-x^2` is `-(x^2)`'],
            ['`-` `+`', 'signs'],
            ['`*` `/`', 'product and quotient; a product is never understood, so write `2*x`'],
            ['`+` `-`', 'sum and difference'],
            ['`<` `<=` `>` `>=` `==` `!=`', 'relations, in conditions only'],
            ['`not` `and` `or`', 'join relations; `not` binds closest, so write `not (x < 1)`'],
            ['`c ? a : b`', 'a where the condition c holds, else b'],
          ],
        ),
      ],
    },
    {
      id: 'functions',
      title: 'Functions and constants',
      blocks: [
        table(
          'Functions',
          ['function', 'value'],
          functionTable.map((entry: FunctionEntry) => [callOf(entry), entry.meaning]),
        ),
        table(
          'Constants',
          ['name', 'value'],
          constantTable.map((entry) => [`\`${entry.name}\``, entry.meaning]),
        ),
        paragraph(
          'All are real. Outside its domain a function has no value: a solver that asks there is answered `nan`, and the question is marked in its path.',
        ),
      ],
    },
    {
      id: 'limits',
      title: 'Limits',
      blocks: [
        list(
          `at most ${equationLimits.characters} characters and ${equationLimits.nodes} operators, functions, numbers and names`,
          `at most ${equationLimits.depth} levels of nesting; a long sum counts as one`,
          `at most ${equationLimits.parameters} parameters, each a letter with at most 39 letters, digits and underscores after it`,
          `at most ${equationLimits.numberCharacters} characters in one number`,
        ),
      ],
    },
    {
      id: 'evaluation',
      title: 'How it is evaluated',
      blocks: [
        paragraph(
          'Solvers are answered in binary64, operation by operation as the equation is written: the form matters, and `(x - 1)^3` is another problem for a solver than `x^3 - 3*x^2 + 3*x - 1`. Whole powers are multiplications in a fixed order; the other functions come from one library in plain arithmetic, so that every machine gives the same bits. Derivatives are exact derivatives of the formula, not differences. Roots are certified in decimal and interval arithmetic, with the numbers as they are written.',
        ),
      ],
    },
  ],
  see: ['suites', 'fingerprint', 'accuracy'],
};
