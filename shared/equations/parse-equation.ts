import { create, type MathNode, parseDependencies } from 'mathjs/number';
import { checkTokens, misplaced } from './check-tokens.ts';
import { EquationError, errorAt, quote } from './equation-error.ts';
import { findConstant, findFunction } from './functions.ts';
import { equationLimits } from './limits.ts';
import { TreeReader } from './read-tree.ts';
import { readTokens } from './tokens.ts';
import type { Equation } from './tree.ts';

/** Only the grammar of mathjs is used: nothing of it ever evaluates a text. */
const { parse } = create({ ...parseDependencies });

/** Names that the grammar takes for itself. */
const reserved = new Set('and or not xor mod to in end true false null undefined NaN Infinity'.split(' '));

function checkNames(names: readonly string[]): void {
  const seen = new Set<string>();
  const refuse = (name: string, message: string) =>
    new EquationError(`${quote(name)}: ${message}`, {
      path: 'parameters',
      message: `${quote(name)}: ${message}`,
    });
  if (names.length > equationLimits.parameters) {
    const message = `an equation has at most ${equationLimits.parameters} names`;
    throw new EquationError(message, { path: 'parameters', message });
  }
  for (const name of names) {
    if (!/^[A-Za-z][A-Za-z0-9_]{0,39}$/.test(name)) {
      throw refuse(name, 'a name is a letter followed by at most 39 letters, digits and underscores');
    }
    if (reserved.has(name) || findFunction(name) || findConstant(name)) {
      throw refuse(name, 'this name has a fixed meaning in equations; choose another');
    }
    if (seen.has(name)) throw refuse(name, 'this name is given twice or is the variable');
    seen.add(name);
  }
}

/**
 * Reads the text of an equation f(x) = 0, written as f(x) alone.
 *
 * @param text at most 2,000 characters; line breaks count as spaces
 * @param parameterNames the names that a case gives values to
 * @param variables the unknowns; one for an equation, several for a system
 * @throws EquationError (code 'invalid', one issue with line and column) for everything that is not a
 * real-valued expression of the closed list in functions.ts
 */
export function parseEquation(
  text: string,
  parameterNames: readonly string[] = [],
  variables: readonly string[] = ['x'],
): Equation {
  checkNames([...variables, ...parameterNames]);
  if (text.length > equationLimits.characters) {
    const message = `the equation is longer than ${equationLimits.characters} characters`;
    throw errorAt(text, equationLimits.characters, message);
  }
  const tokens = readTokens(text);
  if (tokens.length === 1) throw misplaced(text, tokens, 0);
  checkTokens(text, tokens, [...variables, ...parameterNames]);
  let root: MathNode;
  try {
    // A line break ends a statement in mathjs; a space in its place keeps every offset.
    root = parse(text.replace(/[\t\r\n]/g, ' '));
  } catch (cause) {
    if (cause instanceof RangeError) throw errorAt(text, 0, 'the equation is nested too deeply');
    const place = typeof cause === 'object' && cause !== null && 'char' in cause ? Number(cause.char) - 1 : 0;
    const index = tokens.findIndex((token) => token.offset + Math.max(token.text.length, 1) > place);
    throw misplaced(text, tokens, index < 0 ? tokens.length - 1 : index);
  }
  const reader = new TreeReader(text, tokens, variables, parameterNames);
  return {
    text,
    tree: reader.readEquation(root),
    variables: [...variables],
    parameters: [...parameterNames],
  };
}
