import fc from 'fast-check';
import { type FunctionName, functionTable } from '../../../shared/equations/functions.ts';
import type { Condition, Tree } from '../../../shared/equations/tree.ts';

const called = functionTable.filter((entry) => entry.name !== 'pow');

/** Random trees over x and the parameter a: the whole grammar, or smooth parts only. */
export const { tree: anyTree } = fc.letrec<{ tree: Tree; condition: Condition }>((tie) => ({
  tree: fc.oneof(
    { maxDepth: 5, withCrossShrink: true },
    fc.constantFrom<Tree>({ kind: 'variable', name: 'x' }, { kind: 'parameter', name: 'a' }),
    fc
      .constantFrom('0', '1', '2', '3', '0.5', '1.25', '10', '7e-1', '1.', '.25')
      .map((text): Tree => ({ kind: 'number', text })),
    fc.constantFrom<Tree>({ kind: 'constant', name: 'pi' }, { kind: 'constant', name: 'e' }),
    tie('tree').map((of): Tree => ({ kind: 'negate', of })),
    fc
      .tuple(fc.constantFrom('+', '-', '*', '/', '^'), tie('tree'), tie('tree'))
      .map(([operator, left, right]): Tree => ({ kind: 'binary', operator, left, right })),
    fc
      .tuple(fc.constantFrom(...called), tie('tree'), tie('tree'))
      .map(([entry, first, second]): Tree => call(entry.name, entry.arguments.length, first, second)),
    fc
      .tuple(tie('condition'), tie('tree'), tie('tree'))
      .map(([condition, yes, no]): Tree => ({ kind: 'choice', condition, yes, no })),
  ),
  condition: fc.oneof(
    { maxDepth: 2 },
    fc
      .tuple(fc.constantFrom('<', '<=', '>', '>=', '==', '!='), tie('tree'), tie('tree'))
      .map(([relation, left, right]): Condition => ({ kind: 'relation', relation, left, right })),
    tie('condition').map((of): Condition => ({ kind: 'not', of })),
    fc
      .tuple(fc.constantFrom('and', 'or'), tie('condition'), tie('condition'))
      .map(([kind, left, right]): Condition => ({ kind, left, right })),
  ),
}));

function call(name: Exclude<FunctionName, 'pow'>, count: number, first: Tree, second: Tree): Tree {
  return { kind: 'call', name, arguments: count === 1 ? [first] : [first, second] };
}
