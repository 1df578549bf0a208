import { rootReference, signedError } from '../../shared/numerics/root-reference.ts';
import { nextDown, nextUp, ulpOf } from '../../shared/numerics/ulps.ts';
import { add, cos, cosh, exp, type Jet, log, mul, neg, pow, sin, sqrt, variable } from './jets.ts';

export interface TestEquation {
  name: string;
  at: (x: number) => Jet;
  root: string;
  /** Distance from the root within which every method is started. */
  reach: number;
}

function equation(name: string, root: string, reach: number, f: (x: Jet) => Jet): TestEquation {
  return { name, root, reach, at: (x) => f(variable(x)) };
}

/**
 * Thirty equations with a simple root each, to 45 digits. The equations are common in textbooks and in papers
 * on root finding (named where one is known, from memory); the roots were computed for this project by
 * isolating a change of sign to a relative width of 1e-80 in 130-digit arithmetic, or from a closed form.
 */
export const equations: TestEquation[] = [
  equation('x² − 2', '1.41421356237309504880168872420969807856967188', 0.4, (x) => add(pow(x, 2), -2)),
  equation('x³ − 28', '3.03658897187566251942080957850569663558145398', 0.8, (x) => add(pow(x, 3), -28)),
  equation('x⁷ − 28', '1.60967004297182729597508573905831074551010242', 0.15, (x) => add(pow(x, 7), -28)),
  // Wallis 1685
  equation('x³ − 2x − 5', '2.09455148154232659148238654057930296385730611', 0.5, (x) =>
    add(pow(x, 3), mul(-2, x), -5),
  ),
  equation('x³ − x − 1', '1.32471795724474602596090885447809734073440406', 0.25, (x) =>
    add(pow(x, 3), neg(x), -1),
  ),
  equation('x² − x − 1', '1.61803398874989484820458683436563811772030918', 0.5, (x) =>
    add(pow(x, 2), neg(x), -1),
  ),
  equation('x³ − x² − x − 1', '1.83928675521416113255185256465328660042417875', 0.3, (x) =>
    add(pow(x, 3), neg(pow(x, 2)), neg(x), -1),
  ),
  equation('x³ − 2x + 2', '-1.76929235423863141524040946433503349267055305', 0.4, (x) =>
    add(pow(x, 3), mul(-2, x), 2),
  ),
  // Moré, Garbow & Hillstrom 1981, problem 30 with one variable
  equation('(3 − 2x) x + 1', '-0.280776406404415137455352463993519256286799806', 0.4, (x) =>
    add(mul(add(3, mul(-2, x)), x), 1),
  ),
  equation('cos x − x', '0.739085133215160641655312087673873404013411759', 0.7, (x) => add(cos(x), neg(x))),
  equation('x eˣ − 1', '0.567143290409783872999968662210355549753815787', 0.4, (x) =>
    add(mul(x, exp(x)), -1),
  ),
  equation('e⁻ˣ − x', '0.567143290409783872999968662210355549753815787', 0.7, (x) =>
    add(exp(neg(x)), neg(x)),
  ),
  equation('x eˣ − 10', '1.74552800274069938307430126487538991153528813', 0.3, (x) =>
    add(mul(x, exp(x)), -10),
  ),
  // Wien's displacement law in wavelengths
  equation('x − 5 (1 − e⁻ˣ)', '4.96511423174427630369875913132289394405558499', 2, (x) =>
    add(x, mul(-5, add(1, neg(exp(neg(x)))))),
  ),
  equation('x ln x − 1', '1.76322283435189671022520177695170708043601799', 0.6, (x) =>
    add(mul(x, log(x)), -1),
  ),
  equation('cos x cosh x + 1', '1.87510406871196116644530824107821416257011173', 0.4, (x) =>
    add(mul(cos(x), cosh(x)), 1),
  ),
  // Burden & Faires, exercises
  equation('√x − cos x', '0.641714370872882658398565300316522371852717814', 0.4, (x) =>
    add(sqrt(x), neg(cos(x))),
  ),
  equation('3x − eˣ', '1.51213455165784247389673967807203870460365039', 0.25, (x) =>
    add(mul(3, x), neg(exp(x))),
  ),
  equation('ln(x − 1) + cos(x − 1)', '1.39774847595874698231238834092568003021899651', 0.2, (x) =>
    add(log(add(x, -1)), cos(add(x, -1))),
  ),
  // Common test functions for methods of higher order, among others in Weerakoon & Fernando 2000
  equation('sin² x − x² + 1', '1.40449164821534122603508681778686807717660258', 0.4, (x) =>
    add(pow(sin(x), 2), neg(pow(x, 2)), 1),
  ),
  equation('x² − eˣ − 3x + 2', '0.257530285439860760455367304937241781384536993', 0.7, (x) =>
    add(pow(x, 2), neg(exp(x)), mul(-3, x), 2),
  ),
  equation('(x − 1)³ − 1', '2', 0.35, (x) => add(pow(add(x, -1), 3), -1)),
  equation('x³ − 10', '2.15443469003188372175929356651935049525934494', 0.6, (x) => add(pow(x, 3), -10)),
  equation('x e^(x²) − sin² x + 3 cos x + 5', '-1.20764782713091892700941675835608409776023582', 0.15, (x) =>
    add(mul(x, exp(pow(x, 2))), neg(pow(sin(x), 2)), mul(3, cos(x)), 5),
  ),
  equation('x⁵ + x − 10000', '6.30877712997268909476757177178305911337755806', 1.2, (x) =>
    add(pow(x, 5), x, -10000),
  ),
  equation('eˣ + x − 20', '2.84243895378444706781658594015095007229011052', 0.5, (x) => add(exp(x), x, -20)),
  equation('ln x + √x − 5', '8.30943269423157179534695568269206861822217271', 4, (x) =>
    add(log(x), sqrt(x), -5),
  ),
  equation('sin x − x/3', '2.27886266007582731269995110456188862881827474', 0.5, (x) =>
    add(sin(x), mul(-1 / 3, x)),
  ),
  // Kepler's equation and Anderson & Björck 1973
  equation('x − sin(x)/2 − 1/5', '0.390175249624977304299738008517604844643783904', 0.6, (x) =>
    add(x, mul(-0.5, sin(x)), -0.2),
  ),
  equation('x² + sin(x/5) − 1/4', '0.40999201798913713162125837649907538612395771', 0.25, (x) =>
    add(pow(x, 2), sin(mul(0.2, x)), -0.25),
  ),
];

/**
 * F of a simple root: max(ulp(r)/2, η / |f′(r)|), η the largest deviation of f in binary64 at r rounded and at
 * 1 to 16 steps to either side. So close to r the true f is f′(r) (x − r) + f″(r) (x − r)²/2 to 15 digits, and
 * x − r is known exactly.
 */
export function attainableOf({ at, root }: TestEquation): number {
  const ref = rootReference(root);
  const { d, e } = at(ref.hi);
  let [up, down, eta] = [ref.hi, ref.hi, 0];
  for (let k = 0; k <= 16; k += 1) {
    for (const x of [up, down]) {
      const error = signedError(x, ref);
      eta = Math.max(eta, Math.abs(at(x).v - (d * error + (e * error * error) / 2)));
    }
    [up, down] = [nextUp(up), nextDown(down)];
  }
  return Math.max(ulpOf(ref.hi) / 2, eta / Math.abs(d));
}

/** f^m: the same root with multiplicity m, evaluated in factored form. */
export function powerOf(base: TestEquation, m: number): TestEquation {
  return {
    ...base,
    name: `(${base.name})^${m}`,
    at: (x) => {
      const { v, d, e } = base.at(x);
      return {
        v: v ** m,
        d: m * v ** (m - 1) * d,
        e: m * (m - 1) * v ** (m - 2) * d * d + m * v ** (m - 1) * e,
      };
    },
  };
}
