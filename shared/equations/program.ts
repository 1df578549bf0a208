import { type Arithmetic, applyOperation, type Operation } from './arithmetic.ts';
import type { Relation } from './tree.ts';

/** Number of a value within a program. */
export type Ref = number;

/** A condition over values that are already computed. */
export type Test =
  | { kind: 'relation'; relation: Relation; left: Ref; right: Ref }
  | { kind: 'not'; of: Test }
  | { kind: 'and' | 'or'; left: Test; right: Test };

export interface Block {
  instructions: Instruction[];
  results: Ref[];
}

/** One step of a program; a choice computes several values at once and only one of its blocks is evaluated. */
export type Instruction =
  | { kind: 'apply'; id: Ref; operation: Operation; operands: readonly Ref[] }
  /** `value` is the id of the value itself, if it is needed; the other ids are derivatives. */
  | { kind: 'choose'; ids: Ref[]; value: Ref; test: Test; yes: Block; no: Block };

/**
 * An equation or its derivatives as straight-line code in which every value is named once. Everything
 * that does not depend on a variable has been evaluated already and stands in `literals`.
 */
export interface Program<Value> {
  literals: ReadonlyMap<Ref, Value>;
  /** Refs of the variables, in their order. */
  variables: readonly Ref[];
  body: Block;
  /** All refs are below this number. */
  size: number;
}

/** Decides a test by the values of its refs; undefined where they do not decide it. */
export function decideTest<Value>(
  arithmetic: Arithmetic<Value>,
  test: Test,
  lookUp: (ref: Ref) => Value,
): boolean | undefined {
  if (test.kind === 'relation') {
    return arithmetic.compare(test.relation, lookUp(test.left), lookUp(test.right));
  }
  if (test.kind === 'not') {
    const inner = decideTest(arithmetic, test.of, lookUp);
    return inner === undefined ? undefined : !inner;
  }
  const left = decideTest(arithmetic, test.left, lookUp);
  const right = decideTest(arithmetic, test.right, lookUp);
  const settles = test.kind === 'or';
  if (left === settles || right === settles) return settles;
  return left === undefined || right === undefined ? undefined : !settles;
}

/** Calls `visit` with every ref that a test looks at. */
export function visitTest(test: Test, visit: (ref: Ref) => void): void {
  if (test.kind === 'not') visitTest(test.of, visit);
  else if (test.kind === 'relation') {
    visit(test.left);
    visit(test.right);
  } else {
    visitTest(test.left, visit);
    visitTest(test.right, visit);
  }
}

/** Runs a program in the arithmetic it was built for; returns its results. */
export function runProgram<Value>(
  program: Program<Value>,
  arithmetic: Arithmetic<Value>,
  variables: readonly Value[],
): Value[] {
  const values = new Map<Ref, Value>(program.literals);
  for (const [index, ref] of program.variables.entries()) values.set(ref, variables[index]!);
  const lookUp = (ref: Ref): Value => values.get(ref)!;
  const run = (block: Block): Value[] => {
    for (const instruction of block.instructions) {
      if (instruction.kind === 'apply') {
        const operands = instruction.operands.map(lookUp);
        values.set(instruction.id, applyOperation(arithmetic, instruction.operation, operands));
        continue;
      }
      const decided = decideTest(arithmetic, instruction.test, lookUp);
      const yes = decided === false ? undefined : run(instruction.yes);
      const no = decided === true ? undefined : run(instruction.no);
      for (const [index, id] of instruction.ids.entries()) {
        const ifYes = yes?.[index];
        const ifNo = no?.[index];
        const isOpen = decided === undefined;
        if (!isOpen) values.set(id, (decided ? ifYes : ifNo)!);
        else if (id === instruction.value) values.set(id, arithmetic.hull(ifYes!, ifNo!));
        // Where it is open which branch holds, the value may jump, so nothing can be said about a slope.
        else values.set(id, arithmetic.undefinedValue);
      }
    }
    return block.results.map(lookUp);
  };
  return run(program.body);
}
