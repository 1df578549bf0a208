import type { CallName, Operation } from './arithmetic.ts';
import type { Block, Program, Ref, Test } from './program.ts';

/** Prints a number so that it reads back to the same bits; negative ones in brackets. */
function printNumber(value: number): string {
  return value < 0 || Object.is(value, -0) ? `(-${String(-value)})` : String(value);
}

class SourceWriter {
  readonly functions = new Set<CallName | 'pow'>();
  readonly #program: Program<number>;

  constructor(program: Program<number>) {
    this.#program = program;
  }

  name(ref: Ref): string {
    const literal = this.#program.literals.get(ref);
    return literal === undefined ? `t${ref}` : printNumber(literal);
  }

  statements(block: Block): string {
    let source = '';
    for (const instruction of block.instructions) {
      if (instruction.kind === 'apply') {
        source += this.#apply(instruction.id, instruction.operation, instruction.operands);
        continue;
      }
      const branch = (inner: Block) =>
        this.statements(inner) +
        instruction.ids.map((id, index) => `t${id} = ${this.name(inner.results[index]!)};\n`).join('');
      source += `let ${instruction.ids.map((id) => `t${id}`).join(', ')};\n`;
      source += `if (${this.#test(instruction.test)}) {\n${branch(instruction.yes)}} else {\n${branch(instruction.no)}}\n`;
    }
    return source;
  }

  #test(test: Test): string {
    if (test.kind === 'not') return `!(${this.#test(test.of)})`;
    if (test.kind !== 'relation') {
      return `(${this.#test(test.left)}) ${test.kind === 'and' ? '&&' : '||'} (${this.#test(test.right)})`;
    }
    const sign = test.relation === '==' ? '===' : test.relation === '!=' ? '!==' : test.relation;
    return `${this.name(test.left)} ${sign} ${this.name(test.right)}`;
  }

  #apply(id: Ref, operation: Operation, operands: readonly Ref[]): string {
    const [a = '', b = '', c = '', d = ''] = operands.map((operand) => this.name(operand));
    const define = (expression: string) => `const t${id} = ${expression};\n`;
    switch (operation.kind) {
      case 'negate':
        return define(`-${a}`);
      case 'add':
        return define(`${a} + ${b}`);
      case 'subtract':
        return define(`${a} - ${b}`);
      case 'multiply':
        return define(`${a} * ${b}`);
      case 'divide':
        return define(`${a} / ${b}`);
      case 'power':
        this.functions.add('pow');
        return define(`pow(${a}, ${b})`);
      case 'call':
        this.functions.add(operation.name);
        return define(`${operation.name}(${operands.length === 2 ? `${a}, ${b}` : a})`);
      case 'gate':
        return define(
          `${operation.test === 'notNegative' ? `${a} >= 0` : `${a} < 0 || ${a} > 0`} ? ${b} : NaN`,
        );
      case 'pick':
        return define(`${a} < ${b} ? ${c} : ${a} > ${b} ? ${d} : ${a} === ${b} ? (${c} + ${d}) * 0.5 : NaN`);
      case 'integerPower':
        return this.#integerPower(id, operation.exponent, a);
    }
  }

  /** The rule of `integerPower` in double-functions.ts, unrolled. */
  #integerPower(id: Ref, exponent: number, base: string): string {
    let source = '';
    let result = base;
    let step = 0;
    const next = (expression: string) => {
      step += 1;
      source += `const t${id}_${step} = ${expression};\n`;
      result = `t${id}_${step}`;
    };
    for (const digit of Math.abs(exponent).toString(2).slice(1)) {
      next(`${result} * ${result}`);
      if (digit === '1') next(`${result} * ${base}`);
    }
    return `${source}const t${id} = ${exponent < 0 ? `1 / ${result}` : result};\n`;
  }
}

/** Source of a function body that returns the program's function, given the functions named in `functions`. */
export function generateSource(program: Program<number>): {
  source: string;
  functions: (CallName | 'pow')[];
} {
  const writer = new SourceWriter(program);
  const body = writer.statements(program.body);
  const names = program.variables.map((ref) => `t${ref}`).join(', ');
  const results = program.body.results.map((ref) => writer.name(ref));
  const returned = results.length === 1 ? results[0] : `[${results.join(', ')}]`;
  return {
    source: `"use strict";\nreturn function (${names}) {\n${body}return ${returned};\n};`,
    functions: [...writer.functions],
  };
}
