import type { Arithmetic, CallName } from './arithmetic.ts';
import type { Program, Ref, Test } from './program.ts';
import { ProgramBuilder } from './program-builder.ts';
import { slopesOf } from './slopes.ts';
import type { Condition, Equation, Tree } from './tree.ts';

/** A derivative: a value of the program, or 0 or 1 for every x, which cost nothing. */
type Slope = Ref | 'zero' | 'one';

/** A value with its first and second derivative by the variable (forward mode); unused orders stay 'zero'. */
interface Dual {
  value: Ref;
  first: Slope;
  second: Slope;
}

/** What the results of a program are: value, first and second derivative. */
export type Order = 0 | 1 | 2;

/**
 * Builds the program whose results are the derivatives of the wanted orders by one of the variables.
 *
 * Forward-mode differentiation of order two; every rule is here or in slopes.ts and serves all arithmetics.
 * Powers: a constant exponent n that is whole with |n| <= 64 means multiplications (any base); one half means
 * sqrt; any other exponent the general power, undefined for a negative base unless the exponent is whole.
 * `e ^ u` means exp(u).
 */
export function buildProgram<Value>(
  equation: Equation,
  arithmetic: Arithmetic<Value>,
  wanted: readonly Order[],
  by = 0,
): Program<Value> {
  const build = new ProgramBuilder(arithmetic, equation.variables.length);
  const order = wanted.includes(2) ? 2 : wanted.includes(1) ? 1 : 0;
  const dual = new Derivation(build, equation, order, by).dual(equation.tree);
  const refs = [dual.value, dual.first, dual.second].map((slope) => asRef(build, slope));
  return build.finish(wanted.map((each) => refs[each]!));
}

function asRef<Value>(build: ProgramBuilder<Value>, slope: Slope): Ref {
  return slope === 'zero' ? build.number('0') : slope === 'one' ? build.number('1') : slope;
}

class Derivation<Value> {
  readonly #build: ProgramBuilder<Value>;
  readonly #equation: Equation;
  readonly #order: Order;
  readonly #by: number;

  constructor(build: ProgramBuilder<Value>, equation: Equation, order: Order, by: number) {
    this.#build = build;
    this.#equation = equation;
    this.#order = order;
    this.#by = by;
  }

  dual(tree: Tree): Dual {
    const result = this.#dual(tree);
    if (!this.#build.isLiteral(result.value)) return result;
    // A constant that is not defined, such as sqrt(-1), has no derivative either.
    const isUndefined = this.#build.arithmetic.isUndefined(this.#build.literalValue(result.value)!);
    const slope = isUndefined ? this.#build.undefinedValue() : 'zero';
    return { value: result.value, first: slope, second: slope };
  }

  #dual(tree: Tree): Dual {
    switch (tree.kind) {
      case 'number':
        return this.#fixed(this.#build.number(tree.text));
      case 'constant':
        return this.#fixed(this.#build.constant(tree.name));
      case 'parameter':
        return this.#fixed(this.#build.parameter(tree.name));
      case 'variable': {
        const index = this.#equation.variables.indexOf(tree.name);
        const first = index === this.#by ? 'one' : 'zero';
        return { value: this.#build.variables[index]!, first, second: 'zero' };
      }
      case 'negate': {
        const u = this.dual(tree.of);
        return {
          value: this.#build.apply({ kind: 'negate' }, u.value),
          first: this.#negate(u.first),
          second: this.#negate(u.second),
        };
      }
      case 'binary':
        return tree.operator === '^' ? this.#power(tree.left, tree.right) : this.#binary(tree);
      case 'call':
        return this.#call(
          tree.name,
          tree.arguments.map((argument) => this.dual(argument)),
        );
      case 'choice':
        return this.#choice(tree.condition, tree.yes, tree.no);
    }
  }

  #fixed(value: Ref): Dual {
    return { value, first: 'zero', second: 'zero' };
  }

  #binary(tree: Extract<Tree, { kind: 'binary' }>): Dual {
    const u = this.dual(tree.left);
    const v = this.dual(tree.right);
    switch (tree.operator) {
      case '+':
        return {
          value: this.#build.apply({ kind: 'add' }, u.value, v.value),
          first: this.#add(u.first, v.first),
          second: this.#add(u.second, v.second),
        };
      case '-':
        return {
          value: this.#build.apply({ kind: 'subtract' }, u.value, v.value),
          first: this.#subtract(u.first, v.first),
          second: this.#subtract(u.second, v.second),
        };
      case '*':
        return this.#product(u, v);
      default:
        return this.#quotient(u, v);
    }
  }

  #product(u: Dual, v: Dual): Dual {
    const value = this.#build.apply({ kind: 'multiply' }, u.value, v.value);
    const first = this.#add(this.#multiply(u.first, v.value), this.#multiply(u.value, v.first));
    if (this.#order < 2) return { value, first, second: 'zero' };
    const cross = this.#multiply(u.first, v.first);
    const outer = this.#add(this.#multiply(u.second, v.value), this.#multiply(u.value, v.second));
    return { value, first, second: this.#add(outer, this.#add(cross, cross)) };
  }

  /** q = u / v: q' = (u' - q v') / v and q'' = (u'' - 2 q' v' - q v'') / v. */
  #quotient(u: Dual, v: Dual): Dual {
    const value = this.#build.apply({ kind: 'divide' }, u.value, v.value);
    const first = this.#divide(this.#subtract(u.first, this.#multiply(value, v.first)), v.value);
    if (this.#order < 2) return { value, first, second: 'zero' };
    const cross = this.#multiply(first, v.first);
    const inner = this.#subtract(u.second, this.#add(cross, cross));
    return {
      value,
      first,
      second: this.#divide(this.#subtract(inner, this.#multiply(value, v.second)), v.value),
    };
  }

  /** f(u): f'(u) u' and f''(u) u'^2 + f'(u) u''. */
  #chain(value: Ref, u: Dual, first: Ref, second: () => Ref | null): Dual {
    const slope = this.#multiply(first, u.first);
    if (this.#order < 2) return { value, first: slope, second: 'zero' };
    const bend = this.#multiply(second() ?? 'zero', this.#square(u.first));
    return { value, first: slope, second: this.#add(bend, this.#multiply(first, u.second)) };
  }

  #power(baseTree: Tree, exponentTree: Tree): Dual {
    const w = this.dual(exponentTree);
    if (baseTree.kind === 'constant' && baseTree.name === 'e') return this.#call('exp', [w]);
    const u = this.dual(baseTree);
    const exponent = this.#build.literalValue(w.value);
    if (exponent === undefined) return this.#generalPower(u, w);
    const simple = this.#build.arithmetic.simpleExponent(exponent);
    if (simple === 0.5) return this.#call('sqrt', [u]);
    if (simple !== null) return this.#wholePower(u, simple);
    const value = this.#build.apply({ kind: 'power' }, u.value, w.value);
    if (this.#order === 0) return this.#fixed(value);
    const less = (by: string) => {
      const lower = this.#build.apply({ kind: 'subtract' }, w.value, this.#build.number(by));
      return { lower, power: this.#build.apply({ kind: 'power' }, u.value, lower) };
    };
    const { lower, power } = less('1');
    const times = (a: Ref, b: Ref) => this.#build.apply({ kind: 'multiply' }, a, b);
    return this.#chain(value, u, times(w.value, power), () => times(times(w.value, lower), less('2').power));
  }

  #wholePower(u: Dual, exponent: number): Dual {
    if (exponent === 0) return this.#fixed(this.#build.number('1'));
    if (exponent === 1) return u;
    const raise = (to: number): Ref =>
      to === 0
        ? this.#build.number('1')
        : to === 1
          ? u.value
          : this.#build.apply({ kind: 'integerPower', exponent: to }, u.value);
    const value = raise(exponent);
    if (this.#order === 0) return this.#fixed(value);
    const times = (factor: number, power: Ref): Ref =>
      this.#build.number('1') === power
        ? this.#build.number(String(factor))
        : this.#build.apply({ kind: 'multiply' }, this.#build.number(String(factor)), power);
    return this.#chain(value, u, times(exponent, raise(exponent - 1)), () =>
      times(exponent * (exponent - 1), raise(exponent - 2)),
    );
  }

  /** p = u^w = exp(w log u): with L = w log u, p' = p L' and p'' = p (L'^2 + L''). */
  #generalPower(u: Dual, w: Dual): Dual {
    const value = this.#build.apply({ kind: 'power' }, u.value, w.value);
    if (this.#order === 0) return this.#fixed(value);
    const exponent = this.#product(w, this.#call('log', [u]));
    const first = this.#multiply(value, exponent.first);
    if (this.#order < 2) return { value, first, second: 'zero' };
    const bend = this.#add(this.#square(exponent.first), exponent.second);
    return { value, first, second: this.#multiply(value, bend) };
  }

  #call(name: CallName, duals: readonly Dual[]): Dual {
    const [u, v] = duals;
    if (name === 'atan2') return this.#angle(u!, v!);
    if (name === 'hypot') return this.#length(u!, v!);
    if (name === 'min' || name === 'max') {
      return duals.slice(1).reduce((left, right) => this.#extreme(name, left, right), u!);
    }
    const value = this.#build.apply({ kind: 'call', name }, u!.value);
    if (this.#order === 0 || this.#build.isLiteral(value)) return this.#fixed(value);
    const slopes = slopesOf(this.#build, name, u!.value, value);
    return this.#chain(value, u!, slopes.first, slopes.second);
  }

  /** h = hypot(u, v): h' = (u/h) u' + (v/h) v', h'' = (u/h) u'' + (v/h) v'' + ((u/h) v' - (v/h) u')^2 / h. */
  #length(u: Dual, v: Dual): Dual {
    const value = this.#build.apply({ kind: 'call', name: 'hypot' }, u.value, v.value);
    if (this.#order === 0) return this.#fixed(value);
    const a = this.#build.apply({ kind: 'divide' }, u.value, value);
    const b = this.#build.apply({ kind: 'divide' }, v.value, value);
    const first = this.#add(this.#multiply(a, u.first), this.#multiply(b, v.first));
    if (this.#order < 2) return { value, first, second: 'zero' };
    const turn = this.#square(this.#subtract(this.#multiply(a, v.first), this.#multiply(b, u.first)));
    const second = this.#add(this.#multiply(a, u.second), this.#multiply(b, v.second));
    return { value, first, second: this.#add(second, this.#divide(turn, value)) };
  }

  /** t = atan2(y, x) with a = x / r^2 and b = y / r^2: t' = a y' - b x', t'' = a y'' - b x'' - 2 t' (a x' + b y'). */
  #angle(y: Dual, x: Dual): Dual {
    const value = this.#build.apply({ kind: 'call', name: 'atan2' }, y.value, x.value);
    if (this.#order === 0) return this.#fixed(value);
    const r = this.#build.apply({ kind: 'call', name: 'hypot' }, y.value, x.value);
    const over = (ref: Ref) => this.#divide(this.#divide(ref, r), r);
    const a = over(x.value);
    const b = over(y.value);
    const first = this.#subtract(this.#multiply(a, y.first), this.#multiply(b, x.first));
    if (this.#order < 2) return { value, first, second: 'zero' };
    const growth = this.#multiply(first, this.#add(this.#multiply(a, x.first), this.#multiply(b, y.first)));
    const outer = this.#subtract(this.#multiply(a, y.second), this.#multiply(b, x.second));
    return { value, first, second: this.#subtract(outer, this.#add(growth, growth)) };
  }

  #extreme(name: 'min' | 'max', u: Dual, v: Dual): Dual {
    const value = this.#build.apply({ kind: 'call', name }, u.value, v.value);
    const [less, greater] = name === 'min' ? [u, v] : [v, u];
    const pick = (a: Slope, b: Slope): Slope => {
      if (a === b) return a;
      return this.#build.apply(
        { kind: 'pick' },
        u.value,
        v.value,
        asRef(this.#build, a),
        asRef(this.#build, b),
      );
    };
    return { value, first: pick(less.first, greater.first), second: pick(less.second, greater.second) };
  }

  #choice(condition: Condition, yes: Tree, no: Tree): Dual {
    const test = this.#test(condition);
    const decided = this.#build.decideNow(test);
    if (decided !== undefined) return this.dual(decided ? yes : no);
    const branch = (tree: Tree) =>
      this.#build.block(() => {
        const dual = this.dual(tree);
        const slopes = [dual.first, dual.second].slice(0, this.#order);
        return [dual.value, ...slopes.map((slope) => asRef(this.#build, slope))];
      });
    const ids = this.#build.choose(test, branch(yes), branch(no));
    return { value: ids[0]!, first: ids[1] ?? 'zero', second: ids[2] ?? 'zero' };
  }

  #test(condition: Condition): Test {
    if (condition.kind === 'not') return { kind: 'not', of: this.#test(condition.of) };
    if (condition.kind !== 'relation') {
      return { kind: condition.kind, left: this.#test(condition.left), right: this.#test(condition.right) };
    }
    const left = this.dual(condition.left).value;
    return { kind: 'relation', relation: condition.relation, left, right: this.dual(condition.right).value };
  }

  #negate(a: Slope): Slope {
    if (a === 'zero') return a;
    return this.#build.apply({ kind: 'negate' }, asRef(this.#build, a));
  }

  #add(a: Slope, b: Slope): Slope {
    if (a === 'zero') return b;
    if (b === 'zero') return a;
    return this.#build.apply({ kind: 'add' }, asRef(this.#build, a), asRef(this.#build, b));
  }

  #subtract(a: Slope, b: Slope): Slope {
    if (b === 'zero') return a;
    if (a === 'zero') return this.#negate(b);
    return this.#build.apply({ kind: 'subtract' }, asRef(this.#build, a), asRef(this.#build, b));
  }

  #multiply(a: Slope, b: Slope): Slope {
    if (a === 'zero' || b === 'zero') return 'zero';
    if (a === 'one') return b;
    if (b === 'one') return a;
    return this.#build.apply({ kind: 'multiply' }, a, b);
  }

  #divide(a: Slope, b: Ref): Slope {
    if (a === 'zero') return a;
    return this.#build.apply({ kind: 'divide' }, asRef(this.#build, a), b);
  }

  #square(a: Slope): Slope {
    if (typeof a === 'string') return a;
    return this.#build.apply({ kind: 'integerPower', exponent: 2 }, a);
  }
}
