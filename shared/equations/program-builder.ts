import { type Arithmetic, applyOperation, type Operation, type ProgramConstant } from './arithmetic.ts';
import {
  type Block,
  decideTest,
  type Instruction,
  type Program,
  type Ref,
  type Test,
  visitTest,
} from './program.ts';

interface Scope {
  instructions: Instruction[];
  known: Map<string, Ref>;
}

/** Collects the instructions of a program; equal operations on equal operands become one value. */
export class ProgramBuilder<Value> {
  readonly arithmetic: Arithmetic<Value>;
  readonly variables: readonly Ref[];
  readonly #literals = new Map<Ref, Value>();
  readonly #literalRefs = new Map<string, Ref>();
  #scopes: Scope[] = [{ instructions: [], known: new Map() }];
  #size: number;

  constructor(arithmetic: Arithmetic<Value>, variableCount: number) {
    this.arithmetic = arithmetic;
    this.variables = Array.from({ length: variableCount }, (_, index) => index);
    this.#size = variableCount;
  }

  number(text: string): Ref {
    return this.#literal(`number ${text}`, () => this.arithmetic.number(text));
  }

  constant(name: ProgramConstant): Ref {
    return this.#literal(`constant ${name}`, () => this.arithmetic.constant(name));
  }

  parameter(name: string): Ref {
    return this.#literal(`parameter ${name}`, () => this.arithmetic.parameter(name));
  }

  undefinedValue(): Ref {
    return this.#literal('undefined', () => this.arithmetic.undefinedValue);
  }

  #literal(key: string, lookUp: () => Value): Ref {
    const known = this.#literalRefs.get(key);
    if (known !== undefined) return known;
    const ref = this.#size++;
    this.#literalRefs.set(key, ref);
    this.#literals.set(ref, lookUp());
    return ref;
  }

  isLiteral(ref: Ref): boolean {
    return this.#literals.has(ref);
  }

  literalValue(ref: Ref): Value | undefined {
    return this.#literals.get(ref);
  }

  apply(operation: Operation, ...operands: readonly Ref[]): Ref {
    const detail =
      operation.kind === 'call'
        ? operation.name
        : operation.kind === 'gate'
          ? operation.test
          : operation.kind === 'integerPower'
            ? operation.exponent
            : '';
    const key = `${operation.kind} ${detail} ${operands.join(' ')}`;
    if (operands.every((operand) => this.#literals.has(operand))) {
      const values = operands.map((operand) => this.#literals.get(operand)!);
      return this.#literal(key, () => applyOperation(this.arithmetic, operation, values));
    }
    for (const scope of this.#scopes) {
      const known = scope.known.get(key);
      if (known !== undefined) return known;
    }
    const id = this.#size++;
    const scope = this.#scopes.at(-1)!;
    scope.known.set(key, id);
    scope.instructions.push({ kind: 'apply', id, operation, operands });
    return id;
  }

  /** The outcome of a test that looks at literals only and is decided by them. */
  decideNow(test: Test): boolean | undefined {
    let isNow = true;
    visitTest(test, (ref) => {
      isNow &&= this.#literals.has(ref);
    });
    return isNow ? decideTest(this.arithmetic, test, (ref) => this.#literals.get(ref)!) : undefined;
  }

  /** Runs `build` inside a new block, whose values are not visible outside. */
  block(build: () => Ref[]): Block {
    const scope: Scope = { instructions: [], known: new Map() };
    this.#scopes.push(scope);
    const results = build();
    this.#scopes.pop();
    return { instructions: scope.instructions, results };
  }

  /** A choice between two blocks whose first result is the value and whose others are its derivatives. */
  choose(test: Test, yes: Block, no: Block): Ref[] {
    const ids = yes.results.map(() => this.#size++);
    this.#scopes.at(-1)!.instructions.push({ kind: 'choose', ids, value: ids[0]!, test, yes, no });
    return ids;
  }

  /** The program with these results, without the instructions that they do not need. */
  finish(results: Ref[]): Program<Value> {
    const body = withoutUnused({ instructions: this.#scopes[0]!.instructions, results });
    return { literals: this.#literals, variables: this.variables, body, size: this.#size };
  }
}

/** Leaves out what no result needs. Every use of a ref comes after its definition, so one backward walk does. */
function withoutUnused(body: Block): Block {
  const needed = new Set<Ref>();
  const clean = (block: Block): Block => {
    for (const result of block.results) needed.add(result);
    const kept: Instruction[] = [];
    for (const instruction of block.instructions.toReversed()) {
      if (instruction.kind === 'apply') {
        if (!needed.has(instruction.id)) continue;
        for (const operand of instruction.operands) needed.add(operand);
        kept.push(instruction);
        continue;
      }
      const used = [...instruction.ids.keys()].filter((index) => needed.has(instruction.ids[index]!));
      if (used.length === 0) continue;
      const pickUsed = (refs: Ref[]) => used.map((index) => refs[index]!);
      const narrow = (inner: Block) =>
        clean({ instructions: inner.instructions, results: pickUsed(inner.results) });
      kept.push({
        kind: 'choose',
        ids: pickUsed(instruction.ids),
        value: instruction.value,
        test: instruction.test,
        yes: narrow(instruction.yes),
        no: narrow(instruction.no),
      });
      visitTest(instruction.test, (ref) => needed.add(ref));
    }
    return { instructions: kept.toReversed(), results: block.results };
  };
  return clean(body);
}
