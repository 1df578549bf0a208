import { Decimal } from 'decimal.js';
import type { CertifiedRoot } from '../schemas/case.ts';
import { certainSign, changesSign, guardDigits, isUniqueSimple } from './certify-interval.ts';
import { type Problem, problemOf } from './problem.ts';
import { refineRoot } from './refine-root.ts';
import type { Equation } from './tree.ts';

/** Raised with every change that can alter a certificate, so that kept ones are made anew. */
export const certifierVersion = 1;

/** Significant digits that are certified unless a case asks for fewer. */
export const usualDigits = 45;
/** Digits to which a stated root has to be right before it is refined. */
export const statedDigits = 40;
const writtenDigits = 50;
/** Digits beyond those certified, tried in turn: few suffice unless f is far smaller than its terms. */
const guards = [20, 60, 160] as const;

export interface Claimed {
  /** The root as stated: a decimal, exact or right to `statedDigits`. */
  value: string;
  /** Fewer digits where the equation does not allow the usual ones; null otherwise. */
  digits: number | null;
  multiplicity: number;
  /** A base with a simple root here, for multiple roots by construction. */
  simple: Equation | null;
  /** Why this is the root although no certificate reaches it. */
  statement: string | null;
}

/** What has been shown of a root, with all that somebody needs to check it again. */
export interface Certificate {
  value: string;
  digits: number;
  certificate: CertifiedRoot['certificate'];
  /** Ends of the interval that holds the root. */
  low: string;
  high: string;
  /** Decimal digits carried. */
  precision: number;
}

export type Certification =
  | { isCertified: true; certificate: Certificate }
  | { isCertified: false; reason: string };

const refuse = (reason: string): Certification => ({ isCertified: false, reason });

/**
 * Certifies one stated root of f(x) = 0.
 *
 * The root is derived again by Newton's method in decimals and compared with what is stated; then, in this
 * order: sign change and interval Newton over x ± 10^−N |x| (`sign change, unique`), the sign change alone
 * (`sign change`), for a multiple root the construction f = g^m times a factor that is finite and not 0
 * (`by construction`, g certified as simple), and the author's statement where nothing else holds and f at
 * least vanishes, changes sign or falls towards 0 there (`by statement`).
 *
 * Refused, with the reason: a value that is no root, or right to fewer than 40 digits; a multiplicity that
 * f does not have; a pole or jump taken for a root.
 *
 * Accuracy: signs and Newton intervals are rigorous as far as evaluateInterval is; that no jump smaller than
 * the enclosures hides at the root, and the factor of a construction, are checked by evaluation only.
 */
export function certifyRoot(problem: Problem, claimed: Claimed): Certification {
  const digits = claimed.digits ?? usualDigits;
  const base: Problem = claimed.simple === null ? problem : problemOf(claimed.simple, problem.parameters);
  const refined = refine(base, claimed, digits);
  if ('reason' in refined) return refuse(refined.reason);
  const x = refined.root;
  for (const guard of guards) {
    const attempt = certifyAt(problem, base, claimed, x, digits, digits + guard);
    if (attempt !== null) return attempt;
  }
  return byStatement(problem, claimed, x, digits);
}

function halfWidth(x: Decimal, digits: number): Decimal {
  const unit = new Decimal(10).pow(-digits);
  return x.isZero() ? unit : x.abs().times(unit);
}

function refine(base: Problem, claimed: Claimed, digits: number): { root: Decimal } | { reason: string } {
  const Full = Decimal.clone({ precision: writtenDigits + guardDigits, minE: -9e15, maxE: 9e15 });
  const stated = new Full(claimed.value);
  const isMultipleAlone = claimed.multiplicity > 1 && claimed.simple === null;
  // Without a base Newton's method on a multiple root is hopeless; the stated value must then be exact.
  if (isMultipleAlone) return { root: stated };
  const refined = refineRoot(base, stated, digits);
  if ('reason' in refined) return { root: stated };
  const distance = refined.root.minus(stated).abs();
  const wanted = Math.min(statedDigits, digits);
  if (distance.gt(halfWidth(stated, wanted))) {
    const found = refined.root.toSignificantDigits(writtenDigits).toString();
    const isNear = distance.lte(halfWidth(stated, 3));
    return {
      reason: isNear
        ? `${claimed.value} is not the root to ${wanted} digits: it is ${found}`
        : `${claimed.value} is no root: Newton's method leads from there to ${found}`,
    };
  }
  return { root: refined.isExact ? refined.root : new Full(refined.root.toSignificantDigits(writtenDigits)) };
}

function certificateOf(
  x: Decimal,
  digits: number,
  precision: number,
  kind: CertifiedRoot['certificate'],
): Certification {
  const Wide = Decimal.clone({ precision: digits + writtenDigits });
  const h = halfWidth(x, digits);
  const certificate: Certificate = {
    value: x.toString(),
    digits,
    certificate: kind,
    low: new Wide(x).minus(h).toString(),
    high: new Wide(x).plus(h).toString(),
    precision,
  };
  return { isCertified: true, certificate };
}

/** One attempt at a precision; null where more precision or a statement might still help. */
function certifyAt(
  problem: Problem,
  base: Problem,
  claimed: Claimed,
  x: Decimal,
  digits: number,
  precision: number,
): Certification | null {
  const h = halfWidth(x, digits);
  if (claimed.multiplicity > 1) return certifyMultiple(problem, base, claimed, x, digits, precision);
  const sign = changesSign(problem, x, h, precision);
  if (sign === 'pole or jump') {
    if (claimed.statement !== null) return null;
    return refuse(
      `f changes sign at ${claimed.value} but does not shrink to 0 there: a pole or a jump is no root`,
    );
  }
  if (sign === 'no') return null;
  if (isUniqueSimple(problem, x, h, precision))
    return certificateOf(x, digits, precision, 'sign change, unique');
  const power = vanishingPower(problem, null, x, 1);
  if (power !== null && power > 1.2 && claimed.statement === null) {
    return refuse(
      `a simple root is claimed at ${claimed.value}, but f vanishes there like the power ${round(power)}`,
    );
  }
  return power !== null && power > 1.2 ? null : certificateOf(x, digits, precision, 'sign change');
}

function certifyMultiple(
  problem: Problem,
  base: Problem,
  claimed: Claimed,
  x: Decimal,
  digits: number,
  precision: number,
): Certification | null {
  const m = claimed.multiplicity;
  if (claimed.simple !== null) {
    const h = halfWidth(x, digits);
    if (changesSign(base, x, h, precision) !== 'yes' || !isUniqueSimple(base, x, h, precision)) {
      return precision - digits === guards.at(-1)
        ? refuse(`the base ${claimed.simple.text} has no simple root at ${claimed.value}`)
        : null;
    }
  } else {
    const reason = derivativesVanish(problem, claimed, x, precision);
    if (reason !== null) return refuse(reason);
  }
  const power = vanishingPower(problem, claimed.simple === null ? null : base, x, m);
  if (power === null)
    return refuse(`f could not be compared with the power ${m} of its base near ${claimed.value}`);
  if (Math.abs(power - m) > 0.05) {
    return refuse(
      `multiplicity ${m} is claimed at ${claimed.value}, but f vanishes there like the power ${round(power)}`,
    );
  }
  return certificateOf(x, digits, precision, 'by construction');
}

/** Without a base: the stated value is exact and f and its derivatives are exactly 0 there, as far as m asks. */
function derivativesVanish(problem: Problem, claimed: Claimed, x: Decimal, precision: number): string | null {
  if (claimed.multiplicity > 3)
    return `a root of multiplicity ${claimed.multiplicity} needs its base: simple: …`;
  const at = problem.decimal(precision)(x);
  if (!at.value.isZero())
    return `f is not exactly 0 at ${claimed.value}; a multiple root needs its base: simple: …`;
  if (!at.first.isZero()) return `f′ is not 0 at ${claimed.value}: the root is simple there`;
  if (claimed.multiplicity > 2 && !at.second.isZero())
    return `f″ is not 0 at ${claimed.value}: the root is double`;
  return null;
}

/**
 * The power p with which f vanishes at x, from |f / g^m| at two distances on both sides (g = t − x without a
 * base); null where f or g is undefined or 0 there, or the two sides disagree. The distances are far above the
 * rounding of x and small enough that the factor of f varies by less than the test tells apart.
 */
export function vanishingPower(problem: Problem, base: Problem | null, x: Decimal, m: number): number | null {
  const distances = [8, 12] as const;
  const precision = distances[1] * (m + 2) + guardDigits;
  const Work = Decimal.clone({ precision: precision + 20, minE: -9e15, maxE: 9e15 });
  const scale = x.isZero() ? new Work(1) : new Work(x).abs();
  const powers: number[] = [];
  for (const side of [-1, 1]) {
    const ratios: Decimal[] = [];
    for (const distance of distances) {
      const offset = scale.times(new Work(10).pow(-distance)).times(side);
      const t = new Work(x).plus(offset);
      const f = problem.value(precision)(t);
      const g = base === null ? offset : base.value(precision)(t);
      if (!f.isFinite() || !g.isFinite() || g.isZero()) return null;
      ratios.push(new Work(f).abs().div(new Work(g).abs().pow(m)));
    }
    const [far, near] = ratios;
    if (far === undefined || near === undefined || far.isZero() || near.isZero())
      return Number.POSITIVE_INFINITY;
    powers.push(m + far.div(near).log(10).toNumber() / (distances[1] - distances[0]));
  }
  const [left, right] = powers;
  if (left === undefined || right === undefined || Math.abs(left - right) > 0.1) return null;
  return (left + right) / 2;
}

function byStatement(problem: Problem, claimed: Claimed, x: Decimal, digits: number): Certification {
  const precision = digits + guardDigits;
  const h = halfWidth(x, digits);
  const Wide = Decimal.clone({ precision: precision + 20 });
  const at = certainSign(problem, x, precision);
  const left = certainSign(problem, new Wide(x).minus(h), precision);
  const right = certainSign(problem, new Wide(x).plus(h), precision);
  const isCrossed = left !== null && right !== null && left * right === -1;
  if (claimed.statement === null) {
    const isEven = left !== null && left === right;
    return isEven || (!isCrossed && at !== 0)
      ? refuse(`f does not change sign at ${claimed.value}: it is no root of odd multiplicity`)
      : refuse(
          `f is 0 at ${claimed.value} or changes sign there, but no certificate holds; say why it is a root: statement: …`,
        );
  }
  if (at !== 0 && !isCrossed) return refuse(`f is not 0 at ${claimed.value} and does not change sign there`);
  return certificateOf(x, digits, precision, 'by statement');
}

function round(power: number): string {
  return Number.isFinite(power) ? String(Math.round(power * 100) / 100) : 'no finite one (f is flat)';
}
