import type { Operation } from './arithmetic.ts';
import { buildProgram, type Order } from './derive.ts';
import { type CompiledDouble, requireOneVariable } from './double.ts';
import { compareDoubles, doubleArithmetic } from './double-arithmetic.ts';
import { doubleFunctions, integerPower, pickDouble } from './double-functions.ts';
import type { Block, Program, Ref, Test } from './program.ts';
import type { Equation } from './tree.ts';

type Step = () => void;

/**
 * The same functions as `compileDouble`, bit for bit, as closures over an array: for pages whose content policy
 * forbids generated code. About 25 ns for each operation: 1.5 to 4 times the time of generated code where functions
 * such as exp dominate, some tens of times for a polynomial (tests/bench/evaluator.ts). Not re-entrant.
 */
export function interpretDouble(
  equation: Equation,
  parameters: Readonly<Record<string, number>> = {},
): CompiledDouble {
  requireOneVariable(equation);
  const arithmetic = doubleArithmetic(parameters);
  const interpret = (order: Order) => interpretProgram(buildProgram(equation, arithmetic, [order]));
  return { f: interpret(0), df: interpret(1), d2f: interpret(2) };
}

function interpretProgram(program: Program<number>): (x: number) => number {
  const values = new Float64Array(program.size);
  for (const [ref, literal] of program.literals) values[ref] = literal;
  const run = runnerOf(values, program.body);
  const variable = program.variables[0]!;
  const result = program.body.results[0]!;
  return (x) => {
    values[variable] = x;
    run();
    return values[result]!;
  };
}

function runnerOf(values: Float64Array, block: Block): Step {
  const steps = block.instructions.map((instruction): Step => {
    if (instruction.kind === 'apply') {
      return stepOf(values, instruction.id, instruction.operation, instruction.operands);
    }
    const decide = decider(values, instruction.test);
    const branch = (inner: Block): Step => {
      const run = runnerOf(values, inner);
      return () => {
        run();
        for (const [index, id] of instruction.ids.entries()) values[id] = values[inner.results[index]!]!;
      };
    };
    const yes = branch(instruction.yes);
    const no = branch(instruction.no);
    return () => (decide() ? yes() : no());
  });
  return () => {
    for (const step of steps) step();
  };
}

function decider(values: Float64Array, test: Test): () => boolean {
  if (test.kind === 'relation') {
    const { relation, left, right } = test;
    return () => compareDoubles(relation, values[left]!, values[right]!);
  }
  if (test.kind === 'not') {
    const inner = decider(values, test.of);
    return () => !inner();
  }
  const left = decider(values, test.left);
  const right = decider(values, test.right);
  return test.kind === 'and' ? () => left() && right() : () => left() || right();
}

function stepOf(values: Float64Array, id: Ref, operation: Operation, operands: readonly Ref[]): Step {
  const [a = 0, b = 0, c = 0, d = 0] = operands;
  switch (operation.kind) {
    case 'negate':
      return () => {
        values[id] = -values[a]!;
      };
    case 'add':
      return () => {
        values[id] = values[a]! + values[b]!;
      };
    case 'subtract':
      return () => {
        values[id] = values[a]! - values[b]!;
      };
    case 'multiply':
      return () => {
        values[id] = values[a]! * values[b]!;
      };
    case 'divide':
      return () => {
        values[id] = values[a]! / values[b]!;
      };
    case 'power':
      return () => {
        values[id] = doubleFunctions.pow(values[a]!, values[b]!);
      };
    case 'integerPower':
      return () => {
        values[id] = integerPower(values[a]!, operation.exponent);
      };
    case 'call': {
      const call = doubleFunctions[operation.name];
      return () => {
        values[id] = operands.length === 2 ? call(values[a]!, values[b]!) : call(values[a]!, 0);
      };
    }
    case 'gate':
      return operation.test === 'notNegative'
        ? () => {
            values[id] = values[a]! >= 0 ? values[b]! : Number.NaN;
          }
        : () => {
            values[id] = values[a]! < 0 || values[a]! > 0 ? values[b]! : Number.NaN;
          };
    case 'pick':
      return () => {
        values[id] = pickDouble(values[a]!, values[b]!, values[c]!, values[d]!);
      };
  }
}
