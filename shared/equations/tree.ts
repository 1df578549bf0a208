import type { ConstantName, FunctionName } from './functions.ts';

export type Operator = '+' | '-' | '*' | '/' | '^';
export type Relation = '<' | '<=' | '>' | '>=' | '==' | '!=';

/**
 * An equation as a tree of values. A unary plus leaves no trace, `pow(a, b)` is the operator `^`, and
 * parentheses live only in the shape of the tree.
 */
export type Tree =
  /** `text` is the decimal number exactly as written, without a sign. */
  | { kind: 'number'; text: string }
  | { kind: 'constant'; name: ConstantName }
  | { kind: 'variable'; name: string }
  | { kind: 'parameter'; name: string }
  | { kind: 'negate'; of: Tree }
  | { kind: 'binary'; operator: Operator; left: Tree; right: Tree }
  | { kind: 'call'; name: Exclude<FunctionName, 'pow'>; arguments: readonly Tree[] }
  | { kind: 'choice'; condition: Condition; yes: Tree; no: Tree };

/** What may stand before `?`. A relation with an undefined side is false, and `!=` then true, as in IEEE 754. */
export type Condition =
  | { kind: 'relation'; relation: Relation; left: Tree; right: Tree }
  | { kind: 'not'; of: Condition }
  | { kind: 'and' | 'or'; left: Condition; right: Condition };

/** A parsed equation f(x) = 0. It is immutable, so that what is compiled from it can be kept beside it. */
export interface Equation {
  readonly text: string;
  readonly tree: Tree;
  readonly variables: readonly string[];
  readonly parameters: readonly string[];
}

/** Whether a subtree holds none of the variables, so that it is one number once the parameters are known. */
export function isConstant(tree: Tree): boolean {
  switch (tree.kind) {
    case 'number':
    case 'constant':
    case 'parameter':
      return true;
    case 'variable':
      return false;
    case 'negate':
      return isConstant(tree.of);
    case 'binary':
      return isConstant(tree.left) && isConstant(tree.right);
    case 'call':
      return tree.arguments.every(isConstant);
    case 'choice':
      return isConstantCondition(tree.condition) && isConstant(tree.yes) && isConstant(tree.no);
  }
}

function isConstantCondition(condition: Condition): boolean {
  switch (condition.kind) {
    case 'relation':
      return isConstant(condition.left) && isConstant(condition.right);
    case 'not':
      return isConstantCondition(condition.of);
    default:
      return isConstantCondition(condition.left) && isConstantCondition(condition.right);
  }
}
