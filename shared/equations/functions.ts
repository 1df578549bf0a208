/** One function that an equation may call. */
export interface FunctionEntry {
  name: string;
  /** Names of the arguments as the guide prints them. */
  arguments: readonly string[];
  /** min and max take any number of arguments from this one on. */
  repeats?: boolean;
  /** One line: the value, and where it is not defined. */
  meaning: string;
}

/**
 * The closed list of functions. All are real-valued: outside the stated domain the value is undefined
 * (NaN in binary64 and decimals, null in intervals), never complex.
 */
export const functionTable = [
  { name: 'exp', arguments: ['x'], meaning: 'e to the power x' },
  { name: 'expm1', arguments: ['x'], meaning: 'exp(x) - 1, accurate for small x' },
  { name: 'log', arguments: ['x'], meaning: 'natural logarithm, x > 0' },
  { name: 'log1p', arguments: ['x'], meaning: 'log(1 + x), accurate for small x, x > -1' },
  { name: 'log2', arguments: ['x'], meaning: 'logarithm to base 2, x > 0' },
  { name: 'log10', arguments: ['x'], meaning: 'logarithm to base 10, x > 0' },
  { name: 'sqrt', arguments: ['x'], meaning: 'square root, x >= 0' },
  { name: 'cbrt', arguments: ['x'], meaning: 'real cube root, also of a negative x' },
  { name: 'sin', arguments: ['x'], meaning: 'sine of x radians' },
  { name: 'cos', arguments: ['x'], meaning: 'cosine of x radians' },
  { name: 'tan', arguments: ['x'], meaning: 'tangent of x radians' },
  { name: 'asin', arguments: ['x'], meaning: 'arc sine in radians, -1 <= x <= 1' },
  { name: 'acos', arguments: ['x'], meaning: 'arc cosine in radians, -1 <= x <= 1' },
  { name: 'atan', arguments: ['x'], meaning: 'arc tangent in radians' },
  { name: 'atan2', arguments: ['y', 'x'], meaning: 'angle of the point (x, y) in radians, -pi to pi' },
  { name: 'sinh', arguments: ['x'], meaning: 'hyperbolic sine' },
  { name: 'cosh', arguments: ['x'], meaning: 'hyperbolic cosine' },
  { name: 'tanh', arguments: ['x'], meaning: 'hyperbolic tangent' },
  { name: 'asinh', arguments: ['x'], meaning: 'inverse hyperbolic sine' },
  { name: 'acosh', arguments: ['x'], meaning: 'inverse hyperbolic cosine, x >= 1' },
  { name: 'atanh', arguments: ['x'], meaning: 'inverse hyperbolic tangent, -1 < x < 1' },
  { name: 'abs', arguments: ['x'], meaning: 'absolute value' },
  { name: 'sign', arguments: ['x'], meaning: '-1, 0 or 1' },
  { name: 'min', arguments: ['x', 'y'], repeats: true, meaning: 'the least of two or more values' },
  { name: 'max', arguments: ['x', 'y'], repeats: true, meaning: 'the greatest of two or more values' },
  { name: 'hypot', arguments: ['x', 'y'], meaning: 'sqrt(x^2 + y^2) without overflow on the way' },
  { name: 'erf', arguments: ['x'], meaning: 'error function' },
  { name: 'pow', arguments: ['x', 'y'], meaning: 'the same as x ^ y' },
] as const satisfies readonly FunctionEntry[];

export type FunctionName = (typeof functionTable)[number]['name'];

/** The two named constants. */
export const constantTable = [
  { name: 'pi', meaning: 'ratio of a circle to its diameter, 3.14159…' },
  { name: 'e', meaning: "Euler's number, 2.71828…" },
] as const;

export type ConstantName = (typeof constantTable)[number]['name'];

const functions = new Map<string, FunctionEntry & { name: FunctionName }>(
  functionTable.map((entry) => [entry.name, entry]),
);

/** The entry of an allowed function, or undefined. */
export function findFunction(name: string): (FunctionEntry & { name: FunctionName }) | undefined {
  return functions.get(name);
}

/** The named constant, or undefined. */
export function findConstant(name: string): ConstantName | undefined {
  return constantTable.find((entry) => entry.name === name)?.name;
}
