import { Decimal } from 'decimal.js';
import { attainableAccuracy, binaryParameters, isFlatRoot } from '../equations/attainable.ts';
import { certifyRoot } from '../equations/certify.ts';
import { certainSign } from '../equations/certify-interval.ts';
import { certifyNear } from '../equations/certify-near.ts';
import { compileDouble } from '../equations/double.ts';
import { parseEquation } from '../equations/parse-equation.ts';
import { type Problem, problemOf } from '../equations/problem.ts';
import { exactDecimal } from '../numerics/root-reference.ts';
import type { CertifiedRoot } from '../schemas/case.ts';
import { type CertificationCache, certificationKey } from './certification-cache.ts';
import type { CaseProblem, PlainCase, StatedRoot } from './write-out.ts';

const signDigits = 80;
/** Points at which a case without a root is searched for a change of sign. */
const searchPoints = 129;

export interface CertifiedCase {
  roots: CertifiedRoot[];
  /** Claims of the case that are refused, each with its reason. */
  problems: CaseProblem[];
}

/** Certifies one root and measures its attainable accuracy. */
function certified(
  problem: Problem,
  plain: PlainCase,
  stated: StatedRoot,
): CertifiedRoot | { reason: string } {
  const { value, digits, multiplicity, statement, allowed } = stated;
  const names = Object.keys(plain.parameters);
  const simple = stated.simple === null ? null : parseEquation(stated.simple, names);
  const result = certifyRoot(problem, { value, digits, multiplicity, simple, statement });
  if (!result.isCertified) return { reason: result.reason };
  const { certificate } = result;
  const bracket: [number, number] | null =
    plain.bracket === null ? null : [Number(plain.bracket[0]), Number(plain.bracket[1])];
  return {
    value: certificate.value,
    digits: certificate.digits,
    multiplicity,
    allowed,
    certificate: certificate.certificate,
    attainable: attainableAccuracy(problem, { value: certificate.value, multiplicity }, bracket),
  };
}

/** Whether a decimal lies in the bracket, ends included. */
function isInside(value: string, bracket: readonly [string, string]): boolean {
  return new Decimal(value).gte(bracket[0]) && new Decimal(value).lte(bracket[1]);
}

/** The sign of f at a binary64 x, for certain; 0 also where decimals give exactly 0. */
function signAt(problem: Problem, x: number): -1 | 0 | 1 | null {
  const exact = exactDecimal(x);
  return (
    certainSign(problem, exact, signDigits) ?? (problem.decimal(signDigits)(exact).value.isZero() ? 0 : null)
  );
}

/** What the ends of the bracket do, against the traits that the case claims. */
function bracketProblem(problem: Problem, plain: PlainCase): string | null {
  if (plain.bracket === null) return null;
  const [low, high] = plain.bracket.map((end) => signAt(problem, Number(end)));
  if (low === undefined || high === undefined || low === null || high === null) {
    return 'f has no certain sign at an end of the bracket: it is undefined or unbounded there';
  }
  const isAtEnd = low === 0 || high === 0;
  if (isAtEnd)
    return plain.traits.includes('endpoint')
      ? null
      : 'f is 0 at an end of the bracket: the trait "endpoint" was expected';
  if (low === high && !plain.traits.includes('same signs')) {
    return 'f has the same sign at both ends of the bracket; leave the bracket out or add the trait "same signs"';
  }
  if (low !== high && plain.traits.includes('same signs'))
    return 'f changes sign over the bracket: the trait "same signs" is wrong';
  return null;
}

/** Traits that follow from the certified roots have to agree with them. */
function traitProblem(problem: Problem, plain: PlainCase): string | null {
  const allowed = plain.roots.filter((root) => root.allowed);
  const check = (trait: string, holds: boolean): string | null => {
    if (plain.traits.includes(trait) === holds) return null;
    return holds ? `the trait "${trait}" was expected` : `the trait "${trait}" does not hold`;
  };
  return (
    check(
      'multiple',
      allowed.some((root) => root.multiplicity > 1),
    ) ??
    check('many roots', allowed.length > 1) ??
    check(
      'flat',
      allowed.some((root) => root.multiplicity === 1 && isFlatRoot(problem, root.value)),
    )
  );
}

/** A root in the region of a case that expects none, certified after a change of sign between search points. */
function unexpectedRoot(problem: Problem, plain: PlainCase): string | null {
  const { f } = compileDouble(problem.equation, binaryParameters(plain.parameters));
  const [low, high] =
    plain.bracket === null ? [-1e3, 1e3] : [Number(plain.bracket[0]), Number(plain.bracket[1])];
  let before: { x: number; y: number } | null = null;
  for (let i = 0; i < searchPoints; i += 1) {
    const share = i / (searchPoints - 1);
    const x = low * (1 - share) + high * share;
    const y = f(x);
    if (y === 0 || (before !== null && before.y * y < 0)) {
      const from = y === 0 || before === null ? x : before.x;
      const middle = from / 2 + x / 2;
      const found = certifyNear(problem.equation, problem.parameters, middle, Math.abs(x - from) / 2 || 1e-9);
      if (found !== null) return found;
    }
    before = Number.isFinite(y) && y !== 0 ? { x, y } : null;
  }
  return null;
}

/**
 * Certifies all that a case claims: its roots and their multiplicities, that allowed roots lie in the bracket,
 * the signs at the bracket's ends, traits that follow from these, and that a case without a root has none that
 * a change of sign finds. `cache`: asked first, and told what was certified.
 */
export function certifyCase(plain: PlainCase, cache: CertificationCache | null): CertifiedCase {
  const key = cache === null ? '' : certificationKey(plain);
  const kept = cache?.get(key);
  if (kept !== undefined) return { roots: kept, problems: [] };
  const result = certifyAfresh(plain);
  if (result.problems.length === 0) cache?.set(key, result.roots);
  return result;
}

function certifyAfresh(plain: PlainCase): CertifiedCase {
  const equation = parseEquation(plain.equation, Object.keys(plain.parameters));
  const problem = problemOf(equation, plain.parameters);
  const problems: CaseProblem[] = [];
  const refuse = (path: (string | number)[], reason: string) => {
    problems.push({ path: [...plain.path, ...path], offset: 0, message: `${plain.id}: ${reason}` });
  };
  const roots: CertifiedRoot[] = [];
  plain.roots.forEach((stated, index) => {
    const result = certified(problem, plain, stated);
    if ('reason' in result) refuse(['roots', index, 'value'], result.reason);
    else roots.push(result);
    if (stated.allowed && plain.bracket !== null && !isInside(stated.value, plain.bracket)) {
      refuse(['roots', index, 'value'], `the allowed root ${stated.value} lies outside the bracket`);
    }
  });
  const bracket = bracketProblem(problem, plain);
  if (bracket !== null) refuse(['bracket'], bracket);
  const trait = traitProblem(problem, plain);
  if (trait !== null) refuse(['traits'], trait);
  if (plain.expectation === 'none') {
    const found = unexpectedRoot(problem, plain);
    if (found !== null) refuse(['expectation'], `no root is expected, but one is certified at ${found}`);
  }
  return { roots, problems };
}
