import type { Remark } from '../schemas/solve.ts';
import type { Tolerance } from '../schemas/solver.ts';
import type { Outcome } from '../schemas/words.ts';
import { nearestRoot } from './digits.ts';
import { type RootReference, rootReference, signedError } from './root-reference.ts';
import { ulpOf } from './ulps.ts';

/** A certified root to judge against. `attainable`: F, absolute. `allowed`: the case takes it as its answer. */
export interface JudgedRoot {
  ref: RootReference;
  attainable: number;
  allowed: boolean;
}

export interface Claim {
  /** The x that the solver returned; any double. */
  x: number;
  roots: readonly JudgedRoot[];
  /** `none`: the case has no root, so that every claim is wrong unless a root is certified on the spot. */
  expectation: 'root' | 'none';
  /** What the solver promises. */
  tolerance: Tolerance;
  /** f(x) in binary64; null or not finite where there is none. */
  residual: number | null;
  /** Looks for a root within `radius` of x and returns it as a decimal of 40 digits and more, or null. */
  certifyNear?: (x: number, radius: number) => string | null;
}

export interface Judgement {
  outcome: Extract<Outcome, 'solved' | 'other root' | 'false claim'>;
  remarks: Remark[];
  /** Index of the nearest certified root among `roots`; null where there is none. */
  nearest: number | null;
}

/** Relative distance (absolute where r = 0) up to which a root that was missed counts as found loosely. */
export const looseDistance = 1e-5;
/** Whole bracket, half bracket and last step mean different things in different libraries. */
const toleranceFactor = 4;
/** Binary64 cannot tell x from the root within F; sixteen of them are what a sound solver stays within. */
const attainableFactor = 16;
const ulpFactor = 4;

/**
 * The distance from r within which x counts as the root: max(4 ulp(r), 16 F, 4 (xabs + xrel |r|)), in the unit
 * of x. Common practice, no source.
 */
export function strictDistance(ref: RootReference, attainable: number, { xabs, xrel }: Tolerance): number {
  return Math.max(
    ulpFactor * ulpOf(ref.hi),
    attainableFactor * attainable,
    toleranceFactor * (xabs + xrel * Math.abs(ref.hi)),
  );
}

/**
 * What a claim of convergence at x is worth. In this order:
 * `solved` within the strict distance of an allowed root, or |f(x)| ≤ fabs where only a residual was promised ·
 * `other root` where x is nearest to a root that the case does not allow and strictly on it ·
 * `solved`, loose, within 1e-5 |r| of an allowed one · `other root`, loose, of another · `other root` where one
 * is certified on the spot within that distance · else `false claim`, which an x that is not finite always is.
 *
 * Only where x is counts, not how it was come by; a change of sign across a pole is no root, because none is
 * certified there. A root certified on the spot cannot make a claim `solved`: nobody has allowed it.
 */
export function judgeClaim(claim: Claim): Judgement {
  const { x, roots, tolerance } = claim;
  if (!Number.isFinite(x)) {
    const text = `The solver returned ${Number.isNaN(x) ? 'nan' : x > 0 ? 'inf' : '−inf'} as its root.`;
    return { outcome: 'false claim', remarks: [{ code: 'claimed non-finite', text }], nearest: null };
  }
  const refs = roots.map((root) => root.ref);
  const nearest = nearestRoot(x, refs)?.index ?? null;
  const judged = roots.map((root) => {
    const distance = Math.abs(signedError(x, root.ref));
    const strict = strictDistance(root.ref, root.attainable, tolerance);
    return { ...root, distance, strict, isOn: distance <= strict, isNear: distance <= looseRadius(root.ref) };
  });
  const allowed = claim.expectation === 'root' ? judged.filter((root) => root.allowed) : [];
  const others = judged.filter((root) => !allowed.includes(root));

  if (allowed.some((root) => root.isOn) || keepsResidual(claim))
    return { outcome: 'solved', remarks: [], nearest };
  if (others.some((root) => root.isOn && root.ref === refs[nearest ?? -1])) {
    return { outcome: 'other root', remarks: [], nearest };
  }
  const missed = allowed.find((root) => root.isNear);
  if (missed !== undefined)
    return { outcome: 'solved', remarks: [loose(missed.distance, missed.strict)], nearest };
  const other = others.find((root) => root.isOn) ?? others.find((root) => root.isNear);
  if (other !== undefined) {
    const remarks = other.isOn ? [] : [loose(other.distance, other.strict)];
    return { outcome: 'other root', remarks, nearest };
  }
  const remarks = certifiedHere(claim);
  return { outcome: remarks === null ? 'false claim' : 'other root', remarks: remarks ?? [], nearest };
}

/** Whether a solve did what the case asks for: solved, or refused where there is no root. */
export function isSuccess(solve: { outcome: Outcome; remarks: readonly Remark[] }): boolean {
  return solve.outcome === 'solved' || isRightlyRefused(solve);
}

/** Refused on a case that has no root. */
export function isRightlyRefused(solve: { outcome: Outcome; remarks: readonly Remark[] }): boolean {
  return solve.outcome === 'refused' && solve.remarks.some((remark) => remark.code === 'rightly refused');
}

function keepsResidual({ expectation, tolerance, residual }: Claim): boolean {
  const isResidualOnly = tolerance.fabs > 0 && tolerance.xabs === 0 && tolerance.xrel === 0;
  if (expectation === 'none' || !isResidualOnly || residual === null) return false;
  return Math.abs(residual) <= tolerance.fabs;
}

function certifiedHere({ x, tolerance, certifyNear }: Claim): Remark[] | null {
  const text = certifyNear?.(x, looseDistance * (Math.abs(x) || 1)) ?? null;
  if (text === null) return null;
  const ref = rootReference(text);
  const distance = Math.abs(signedError(x, ref));
  if (!(distance <= looseRadius(ref))) return null;
  const found: Remark = { code: 'certified here', text: `A root was certified at ${text}.` };
  // The attainable accuracy of this root has not been measured: rounding alone is granted.
  const strict = strictDistance(ref, 0, tolerance);
  return distance <= strict ? [found] : [found, loose(distance, strict)];
}

function looseRadius(ref: RootReference): number {
  return looseDistance * (Math.abs(ref.hi) || 1);
}

function loose(distance: number, strict: number): Remark {
  const text = `${brief(distance)} from the root, where at most ${brief(strict)} was expected.`;
  return { code: 'loose', text };
}

function brief(value: number): string {
  return value.toExponential(1).replace('e+', 'e').replace('-', '−');
}
