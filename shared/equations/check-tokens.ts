import { type EquationError, errorAt, quote } from './equation-error.ts';
import { findConstant, findFunction } from './functions.ts';
import { equationLimits } from './limits.ts';
import type { Token } from './tokens.ts';

interface Open {
  token: Token;
  isCall: boolean;
  /** Offsets of the `?` that still wait for their `:` at this level. */
  questions: Token[];
}

const mathsWords = new Map([
  ['ln', 'write log(x) for the natural logarithm'],
  ['lg', 'write log10(x)'],
  ['lb', 'write log2(x)'],
  ['arcsin', 'write asin(x)'],
  ['arccos', 'write acos(x)'],
  ['arctan', 'write atan(x)'],
  ['tg', 'write tan(x)'],
  ['sec', 'write 1 / cos(x)'],
  ['csc', 'write 1 / sin(x)'],
  ['cot', 'write 1 / tan(x)'],
  ['i', 'equations are real-valued; there is no imaginary unit'],
  ['xor', 'write (a and not b) or (b and not a)'],
  ['mod', 'there is no remainder'],
  ['if', 'write condition ? value : value'],
  ['Infinity', 'there is no infinity here'],
  ['NaN', 'every value is a real number'],
  ['true', 'write a relation such as x < 1'],
  ['false', 'write a relation such as x < 1'],
]);

function unknownName(text: string, token: Token, isCalled: boolean, known: readonly string[]): EquationError {
  const lower = token.text.toLowerCase();
  const hint =
    mathsWords.get(token.text) ??
    (findFunction(lower) || findConstant(lower) || known.includes(lower)
      ? `names are in lower case: write ${lower}`
      : isCalled
        ? 'the guide lists the functions that an equation may call'
        : known.length > 0
          ? `this equation knows ${known.slice(0, 8).map(quote).join(', ')}${known.length > 8 ? ' and more' : ''}, pi and e`
          : 'this equation knows pi and e only');
  return errorAt(text, token.offset, `${quote(token.text)} is not known: ${hint}`);
}

/**
 * Refuses what can be told from the order of the tokens alone: unknown names, products without `*`, functions
 * without brackets, brackets, commas and colons out of place, and nesting beyond the limit, so that the parser
 * never sees a text that could exhaust its stack.
 */
export function checkTokens(text: string, tokens: readonly Token[], known: readonly string[]): void {
  const levels: Open[] = [{ token: { kind: 'end', text: '', offset: 0 }, isCall: false, questions: [] }];
  let prefixes = 0;
  let previous: Token | undefined;
  for (const [index, token] of tokens.entries()) {
    const level = levels.at(-1)!;
    const afterValue = previous !== undefined && ['number', 'name', ')'].includes(previous.kind);
    const next = tokens[index + 1];
    const isFunction = token.kind === 'name' && findFunction(token.text) !== undefined;
    if (token.kind === 'name') {
      if (isFunction && next?.kind !== '(') {
        throw errorAt(text, token.offset, `${token.text} needs round brackets: write ${token.text}(…)`);
      }
      if (!isFunction && !known.includes(token.text) && findConstant(token.text) === undefined) {
        throw unknownName(text, token, next?.kind === '(', known);
      }
    }
    const isCall =
      token.kind === '(' && previous?.kind === 'name' && findFunction(previous.text) !== undefined;
    if (afterValue && (token.kind === 'number' || token.kind === 'name' || (token.kind === '(' && !isCall))) {
      const before = quote(previous?.text ?? '');
      throw errorAt(
        text,
        token.offset,
        `an operator is missing between ${before} and ${quote(token.text)}: write * for a product`,
      );
    }
    const isPrefix = !afterValue && (token.text === '-' || token.text === '+' || token.text === 'not');
    prefixes = isPrefix ? prefixes + 1 : 0;
    if (levels.length + prefixes > equationLimits.depth) {
      throw errorAt(
        text,
        token.offset,
        `the equation is nested more than ${equationLimits.depth} levels deep`,
      );
    }
    if (token.kind === '(') levels.push({ token, isCall, questions: [] });
    else if (token.kind === '?') level.questions.push(token);
    else if (token.kind === ':' && level.questions.pop() === undefined) {
      throw errorAt(text, token.offset, '“:” belongs to a choice: write condition ? value : value');
    } else if (token.kind === ',' && !level.isCall) {
      throw errorAt(
        text,
        token.offset,
        '“,” stands between the arguments of a function only; the decimal sign is a point',
      );
    }
    if (token.kind === ')' || token.kind === ',' || token.kind === 'end') {
      const question = level.questions.at(-1);
      if (question)
        throw errorAt(text, question.offset, 'this “?” has no “:”; write condition ? value : value');
    }
    if (token.kind === ')') {
      if (levels.length === 1) throw errorAt(text, token.offset, 'this “)” closes nothing');
      levels.pop();
    }
    if (token.kind === 'end' && levels.length > 1) {
      throw errorAt(text, level.token.offset, 'this “(” is never closed');
    }
    previous = token;
  }
}

/** The message for a token that stands where the grammar allows none. `index` is the token's place in the list. */
export function misplaced(text: string, tokens: readonly Token[], index: number): EquationError {
  const token = tokens[index]!;
  const previous = tokens[index - 1];
  if (token.kind === 'end') {
    return previous === undefined
      ? errorAt(text, 0, 'the equation is empty; write an expression such as x^2 - 2')
      : errorAt(
          text,
          token.offset,
          `the equation ends too early: a value is missing after ${quote(previous.text)}`,
        );
  }
  const after = previous === undefined ? 'at the start' : `after ${quote(previous.text)}`;
  const isValue = previous !== undefined && ['number', 'name', ')'].includes(previous.kind);
  return errorAt(
    text,
    token.offset,
    isValue
      ? `an operator was expected ${after}, not ${quote(token.text)}`
      : `a value (a number, a name, a function or a bracket) was expected ${after}, not ${quote(token.text)}`,
  );
}
