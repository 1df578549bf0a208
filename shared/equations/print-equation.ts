import type { Condition, Tree } from './tree.ts';

/** How tightly a part binds; a part that binds less than its place asks for gets round brackets. */
const binding = { choice: 0, or: 1, and: 2, relation: 3, sum: 4, product: 5, negate: 6, power: 7, atom: 8 };

interface Printed {
  text: string;
  binds: number;
}

/** The tree as plain text with as few brackets as the grammar allows; reading it again gives an equal tree. */
export function printEquation(tree: Tree): string {
  return print(tree).text;
}

function at(least: number, printed: Printed): string {
  return printed.binds >= least ? printed.text : `(${printed.text})`;
}

function print(tree: Tree): Printed {
  switch (tree.kind) {
    case 'number':
      // A number such as “1.” would run into the operator behind it.
      return { text: tree.text, binds: tree.text.endsWith('.') ? binding.choice : binding.atom };
    case 'constant':
    case 'variable':
    case 'parameter':
      return { text: tree.name, binds: binding.atom };
    case 'negate':
      return { text: `-${at(binding.power, print(tree.of))}`, binds: binding.negate };
    case 'call':
      return {
        text: `${tree.name}(${tree.arguments.map(printEquation).join(', ')})`,
        binds: binding.atom,
      };
    case 'choice': {
      const condition = at(binding.or, printCondition(tree.condition));
      const text = `${condition} ? ${at(binding.or, print(tree.yes))} : ${printEquation(tree.no)}`;
      return { text, binds: binding.choice };
    }
    case 'binary': {
      const [left, right] = [print(tree.left), print(tree.right)];
      if (tree.operator === '^') {
        return { text: `${at(binding.atom, left)}^${at(binding.negate, right)}`, binds: binding.power };
      }
      const binds = tree.operator === '+' || tree.operator === '-' ? binding.sum : binding.product;
      return { text: `${at(binds, left)} ${tree.operator} ${at(binds + 1, right)}`, binds };
    }
  }
}

function printCondition(condition: Condition): Printed {
  switch (condition.kind) {
    case 'relation': {
      const [left, right] = [condition.left, condition.right].map((side) => at(binding.sum, print(side)));
      return { text: `${left} ${condition.relation} ${right}`, binds: binding.relation };
    }
    case 'not':
      return { text: `not (${printCondition(condition.of).text})`, binds: binding.negate };
    default: {
      const binds = binding[condition.kind];
      const [left, right] = [printCondition(condition.left), printCondition(condition.right)];
      return { text: `${at(binds, left)} ${condition.kind} ${at(binds + 1, right)}`, binds };
    }
  }
}
