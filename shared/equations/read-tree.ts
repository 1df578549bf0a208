import {
  isConditionalNode,
  isConstantNode,
  isFunctionNode,
  isOperatorNode,
  isParenthesisNode,
  isRelationalNode,
  isSymbolNode,
  type MathNode,
} from 'mathjs/number';
import { type EquationError, errorAt, quote } from './equation-error.ts';
import { findConstant, findFunction } from './functions.ts';
import { equationLimits } from './limits.ts';
import type { Token } from './tokens.ts';
import type { Condition, Operator, Relation, Tree } from './tree.ts';

const operators = new Map<string, Operator>([
  ['add', '+'],
  ['subtract', '-'],
  ['multiply', '*'],
  ['divide', '/'],
  ['pow', '^'],
]);

const relations = new Map<string, Relation>([
  ['smaller', '<'],
  ['smallerEq', '<='],
  ['larger', '>'],
  ['largerEq', '>='],
  ['equal', '=='],
  ['unequal', '!='],
]);

interface Read<Part> {
  part: Part;
  /** Index of the first token of the part. */
  start: number;
  depth: number;
}

/**
 * Turns the parser's tree into our own by a closed list of node kinds.
 *
 * mathjs keeps neither positions nor the text of numbers. A walk in the order of the text meets the leaves in
 * the order of the number and name tokens, and the operator of a node is the token before its right operand;
 * so every node finds its place again, and each number its exact text.
 */
export class TreeReader {
  #leaf = 0;
  #nodes = 0;
  readonly #leaves: readonly number[];

  readonly #text: string;
  readonly #tokens: readonly Token[];
  readonly #variables: readonly string[];
  readonly #parameters: readonly string[];

  constructor(
    text: string,
    tokens: readonly Token[],
    variables: readonly string[],
    parameters: readonly string[],
  ) {
    this.#text = text;
    this.#tokens = tokens;
    this.#variables = variables;
    this.#parameters = parameters;
    this.#leaves = [...tokens.keys()].filter((index) =>
      ['number', 'name'].includes(tokens[index]?.kind ?? ''),
    );
  }

  readEquation(root: MathNode): Tree {
    const { part } = this.#value(root);
    if (this.#leaf !== this.#leaves.length)
      throw this.#error(0, 'the equation cannot be read; write * for every product');
    return part;
  }

  #error(index: number, message: string): EquationError {
    return errorAt(this.#text, this.#tokens[index]?.offset ?? 0, message);
  }

  /** Takes the next leaf token, which must be what the parser's node says it is. */
  #take(expected: string | number): number {
    const index = this.#leaves[this.#leaf++] ?? -1;
    const token = this.#tokens[index];
    const found = typeof expected === 'number' && token?.kind === 'number' ? Number(token.text) : token?.text;
    if (found !== expected)
      throw this.#error(Math.max(index, 0), 'this part cannot be read; write it with more brackets');
    return index;
  }

  #count<Part>(part: Part, start: number, depth: number): Read<Part> {
    this.#nodes += 1;
    if (this.#nodes > equationLimits.nodes) {
      throw this.#error(start, `the equation has more than ${equationLimits.nodes} parts`);
    }
    if (depth > equationLimits.depth) {
      throw this.#error(start, `the equation is nested more than ${equationLimits.depth} levels deep`);
    }
    return { part, start, depth };
  }

  /** Depth of a node over two others; the left spine of a flat sum or product adds nothing. */
  #depthOver(left: { depth: number; isSpine: boolean }, right: { depth: number }): number {
    return Math.max(left.isSpine ? left.depth : left.depth + 1, right.depth + 1);
  }

  #value(node: MathNode): Read<Tree> {
    const ahead = this.#leaves[this.#leaf] ?? this.#tokens.length - 1;
    if (isParenthesisNode(node)) {
      const inner = this.#value(node.content);
      return { ...inner, start: inner.start - 1 };
    }
    if (isConstantNode(node)) {
      if (typeof node.value !== 'number') throw this.#error(ahead, 'a number was expected here');
      const index = this.#take(node.value);
      return this.#count({ kind: 'number', text: this.#tokens[index]!.text }, index, 1);
    }
    if (isSymbolNode(node)) {
      const index = this.#take(node.name);
      return this.#count(this.#named(node.name, index), index, 1);
    }
    if (isOperatorNode(node)) return this.#operation(node.fn, node.args, ahead);
    if (isFunctionNode(node)) return this.#call(node.fn, node.args, ahead);
    if (isConditionalNode(node)) {
      const condition = this.#condition(node.condition);
      const yes = this.#value(node.trueExpr);
      const no = this.#value(node.falseExpr);
      const depth = 1 + Math.max(condition.depth, yes.depth, no.depth);
      const part: Tree = { kind: 'choice', condition: condition.part, yes: yes.part, no: no.part };
      return this.#count(part, condition.start, depth);
    }
    if (isRelationalNode(node)) throw this.#chained(node.params);
    throw this.#error(ahead, 'only numbers, names, operators, functions and choices may stand here');
  }

  #named(name: string, index: number): Tree {
    const constant = findConstant(name);
    if (constant !== undefined) return { kind: 'constant', name: constant };
    if (this.#variables.includes(name)) return { kind: 'variable', name };
    if (this.#parameters.includes(name)) return { kind: 'parameter', name };
    throw this.#error(index, `${quote(name)} is not known`);
  }

  #operation(name: string, operands: readonly MathNode[], ahead: number): Read<Tree> {
    const [first, second] = operands;
    if (name === 'unaryMinus' && first) {
      const of = this.#value(first);
      return this.#count({ kind: 'negate', of: of.part }, of.start - 1, of.depth + 1);
    }
    if (name === 'unaryPlus' && first) {
      const of = this.#value(first);
      return { ...of, start: of.start - 1 };
    }
    const operator = operators.get(name);
    if (operator !== undefined && first && second) {
      const left = this.#value(first);
      const right = this.#value(second);
      const isSpine = operator !== '^' && left.part.kind === 'binary' && left.part.operator !== '^';
      const depth = this.#depthOver({ depth: left.depth, isSpine }, right);
      return this.#count({ kind: 'binary', operator, left: left.part, right: right.part }, left.start, depth);
    }
    if (name === 'not') {
      throw this.#error(Math.max(ahead - 1, 0), 'not binds closer than a relation: write not (x < 1)');
    }
    if (relations.has(name) || name === 'and' || name === 'or') {
      throw this.#error(ahead, 'a value was expected here, not a condition; a condition stands before “?”');
    }
    throw this.#error(ahead, `the operation ${quote(name)} is not allowed`);
  }

  #call(callee: unknown, operands: readonly MathNode[], ahead: number): Read<Tree> {
    const name = this.#tokens[ahead]?.text ?? '';
    const entry = findFunction(name);
    if (entry === undefined || String(callee) !== name)
      throw this.#error(ahead, `${quote(name)} is not a function`);
    const start = this.#take(name);
    const values = operands.map((operand) => this.#value(operand));
    const wanted = entry.arguments.length;
    if (entry.repeats ? values.length < wanted : values.length !== wanted) {
      const count = `${entry.repeats ? 'at least ' : ''}${wanted} ${wanted === 1 ? 'argument' : 'arguments'}`;
      const hint =
        name === 'log' && values.length === 2
          ? '; for another base write log(x) / log(b), log2(x) or log10(x)'
          : '';
      throw this.#error(start, `${name} takes ${count}, not ${values.length}${hint}`);
    }
    const depth = 1 + Math.max(...values.map((value) => value.depth));
    const parts = values.map((value) => value.part);
    const [left, right] = parts;
    if (entry.name !== 'pow')
      return this.#count({ kind: 'call', name: entry.name, arguments: parts }, start, depth);
    return this.#count({ kind: 'binary', operator: '^', left: left!, right: right! }, start, depth);
  }

  #condition(node: MathNode): Read<Condition> {
    const ahead = this.#leaves[this.#leaf] ?? this.#tokens.length - 1;
    if (isParenthesisNode(node)) {
      const inner = this.#condition(node.content);
      return { ...inner, start: inner.start - 1 };
    }
    if (isRelationalNode(node)) throw this.#chained(node.params);
    if (!isOperatorNode(node)) {
      throw this.#error(ahead, 'a condition such as x < 1 was expected here, not a value');
    }
    const name: string = node.fn;
    const [first, second] = node.args;
    const relation = relations.get(name);
    if (relation !== undefined && first && second) {
      const left = this.#value(first);
      const right = this.#value(second);
      const depth = 1 + Math.max(left.depth, right.depth);
      return this.#count(
        { kind: 'relation', relation, left: left.part, right: right.part },
        left.start,
        depth,
      );
    }
    if (name === 'not' && first) {
      const of = this.#condition(first);
      return this.#count({ kind: 'not', of: of.part }, of.start - 1, of.depth + 1);
    }
    if ((name === 'and' || name === 'or') && first && second) {
      const left = this.#condition(first);
      const right = this.#condition(second);
      const depth = this.#depthOver({ depth: left.depth, isSpine: left.part.kind === name }, right);
      return this.#count({ kind: name, left: left.part, right: right.part }, left.start, depth);
    }
    throw this.#error(ahead, 'a condition such as x < 1 was expected here, not a value');
  }

  /** `a < b < c`: the second relation sign is the one to point at. */
  #chained(parameters: readonly MathNode[]): EquationError {
    let third = 0;
    for (const parameter of parameters.slice(0, 3)) third = this.#value(parameter).start;
    return this.#error(third - 1, 'relations cannot be chained: write a < b and b < c');
  }
}
