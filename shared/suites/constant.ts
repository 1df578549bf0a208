import { Decimal } from 'decimal.js';
import { evaluateDecimal } from '../equations/decimal.ts';
import { EquationError } from '../equations/equation-error.ts';
import { parseEquation } from '../equations/parse-equation.ts';
import { isConstant } from '../equations/tree.ts';

const decimalPattern = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;

/** Digits to which constant expressions are worked out: enough that rounding to 50 digits or binary64 is safe. */
const workingDigits = 70;

/** What is wrong with a constant expression, at an offset of its text. */
export class ConstantError extends Error {
  readonly offset: number;

  constructor(message: string, offset: number) {
    super(message);
    this.name = 'ConstantError';
    this.offset = offset;
  }
}

export function isDecimalText(text: string): boolean {
  return decimalPattern.test(text) && new Decimal(text).isFinite();
}

/** Offset in a text of a line and column, both from 1. */
export function offsetOf(text: string, line: number, column: number): number {
  let offset = 0;
  for (let i = 1; i < line; i += 1) {
    const next = text.slice(offset).search(/\r\n|\n|\r/);
    if (next < 0) break;
    offset += next + (text.startsWith('\r\n', offset + next) ? 2 : 1);
  }
  return offset + column - 1;
}

/**
 * The value of a number or of an expression in the parameters alone, to about 70 significant digits.
 * @throws ConstantError where it is no such expression or has no value
 */
export function evaluateConstant(text: string, parameters: Readonly<Record<string, string>>): Decimal {
  if (decimalPattern.test(text)) return new Decimal(text);
  try {
    const equation = parseEquation(text, Object.keys(parameters));
    if (!isConstant(equation.tree)) {
      throw new ConstantError(
        'a constant was expected here, x is not known yet',
        Math.max(0, text.search(/\bx\b/)),
      );
    }
    const { value } = evaluateDecimal(equation, parameters, '0', workingDigits);
    if (!value.isFinite()) throw new ConstantError('this expression has no finite value', 0);
    return value;
  } catch (error) {
    if (!(error instanceof EquationError)) throw error;
    const issue = error.issues[0];
    throw new ConstantError(
      issue?.message ?? error.message,
      offsetOf(text, issue?.line ?? 1, issue?.column ?? 1),
    );
  }
}
