import { describe, expect, it } from 'vitest';
import { type Claimed, certifyRoot } from '../../../shared/equations/certify.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import { problemOf } from '../../../shared/equations/problem.ts';

const sqrt2 = '1.4142135623730950488016887242096980785696718753769';

function certify(
  text: string,
  value: string,
  claim: { multiplicity?: number; simple?: string; statement?: string; digits?: number } = {},
) {
  const claimed: Claimed = {
    value,
    digits: claim.digits ?? null,
    multiplicity: claim.multiplicity ?? 1,
    simple: claim.simple === undefined ? null : parseEquation(claim.simple),
    statement: claim.statement ?? null,
  };
  return certifyRoot(problemOf(parseEquation(text), {}), claimed);
}

function kindOf(...input: Parameters<typeof certify>): string {
  const result = certify(...input);
  return result.isCertified ? result.certificate.certificate : `refused: ${result.reason}`;
}

describe('certifyRoot', () => {
  it('certifies a simple root by sign change and interval Newton, to 45 digits', () => {
    const result = certify('x^2 - 2', sqrt2);
    expect(result).toMatchObject({ isCertified: true, certificate: { value: sqrt2, digits: 45 } });
    expect(kindOf('x^2 - 2', sqrt2)).toBe('sign change, unique');
  });

  it('refines a value of 40 digits to 50', () => {
    const result = certify('x^2 - 2', sqrt2.slice(0, 42));
    expect(result).toMatchObject({ certificate: { value: sqrt2 } });
  });

  it('gives the interval that holds the root, with the root inside', () => {
    const result = certify('x^2 - 2', sqrt2);
    if (!result.isCertified) throw new Error(result.reason);
    const { low, high } = result.certificate;
    expect(low < sqrt2 && sqrt2 < high).toBe(true);
    expect(low.slice(0, 45)).toBe(sqrt2.slice(0, 45));
  });

  it.each([
    ['cbrt(x)', '0', 'an infinite derivative'],
    ['x < 1 ? 10*(x - 1) : 0.1*(x - 1)', '1', 'a kink'],
    ['sign(x)*sqrt(abs(x))', '0', 'a vertical tangent'],
  ])('certifies the root of %s at %s by its sign change alone (%s)', (text, value) => {
    expect(kindOf(text, value)).toBe('sign change');
  });

  it.each([
    ['(x^2 - 2)^2', sqrt2, 2, 'x^2 - 2'],
    ['(x^2 - 2)^7*exp(x)', sqrt2, 7, 'x^2 - 2'],
    ['x - sin(x)', '0', 3, 'x'],
    ['(x - 1)*log(x)', '1', 2, 'x - 1'],
    ['x^3 - 3*x^2 + 3*x - 1', '1', 3, 'x - 1'],
    ['(x - 3)^20', '3', 20, 'x - 3'],
  ])('certifies %s by construction', (text, value, multiplicity, simple) => {
    expect(kindOf(text, value, { multiplicity, simple })).toBe('by construction');
  });

  it('certifies an exact double or triple root without a base where the derivatives are exactly 0', () => {
    expect(kindOf('x^2 - 2*x + 1', '1', { multiplicity: 2 })).toBe('by construction');
    expect(kindOf('x^3 - 3*x^2 + 3*x - 1', '1', { multiplicity: 3 })).toBe('by construction');
  });

  it('takes a statement only where nothing else holds', () => {
    const statement = 'the author says so';
    expect(kindOf('x^2 - 2', sqrt2, { statement })).toBe('sign change, unique');
    expect(kindOf('sign(x)', '0', { statement })).toBe('by statement');
    expect(kindOf('x == 0 ? 0 : exp(-1/x^2)', '0', { statement })).toBe('by statement');
    expect(kindOf('sqrt(x)', '0', { statement })).toBe('by statement');
  });

  it.each([
    ['a root that is none', 'x^2 - 2', '1.5', {}, /is no root: Newton's method leads from there to 1\.41421/],
    [
      'a root right to 10 digits',
      'x^2 - 2',
      '1.414213562',
      {},
      /not the root to 40 digits: it is 1\.41421356237309504880/,
    ],
    ['a value where f has no root', 'x^2 + 1', '0', {}, /does not change sign/],
    ['a double root called simple', '(x - 1)^2', '1', {}, /does not change sign/],
    ['a triple root called simple', '(x - 1)^3', '1', {}, /like the power 3/],
    ['a simple root called double', 'x - 1', '1', { multiplicity: 2, simple: 'x - 1' }, /like the power 1/],
    [
      'a triple root called double',
      '(x - 1)^3',
      '1',
      { multiplicity: 2, simple: 'x - 1' },
      /like the power 3/,
    ],
    [
      'a double root called triple',
      '(x - 1)^2*(x + 1)',
      '1',
      { multiplicity: 3, simple: 'x - 1' },
      /like the power 2/,
    ],
    [
      'a base without a root there',
      '(x - 1)^2',
      '1',
      { multiplicity: 2, simple: 'x - 2' },
      /leads from there to 2/,
    ],
    [
      'a base with a double root',
      '(x - 1)^4',
      '1',
      { multiplicity: 2, simple: '(x - 1)^2' },
      /no simple root/,
    ],
    ['a simple root called double without a base', 'x - 1', '1', { multiplicity: 2 }, /f′ is not 0/],
    ['a double root called triple without a base', '(x - 1)^2', '1', { multiplicity: 3 }, /f″ is not 0/],
    ['multiplicity 4 without a base', 'x^4', '0', { multiplicity: 4 }, /needs its base/],
    ['a pole', '1/x', '0', {}, /no root|pole|undefined/],
    [
      'a pole that no decimal hits',
      '1/(x - 1/3)',
      '0.33333333333333333333333333333333333333333333333333',
      {},
      /pole or a jump/,
    ],
    ['a pole of tan', 'tan(x)', '1.5707963267948966192313216916397514420985846996876', {}, /pole or a jump/],
    ['a jump', 'x < 0.5 ? -1 : 1', '0.5', {}, /pole or a jump|no certificate/],
    ['a jump of 1e-9', 'x < 0.5 ? x - 0.5 - 1e-9 : x - 0.5 + 1e-9', '0.5', {}, /pole or a jump|no root/],
    ['a statement about nothing', 'x^2 + 1', '0', { statement: 'it looks like one' }, /is not 0 at 0/],
    [
      'a flat root without a statement',
      'x == 0 ? 0 : x*exp(-1/x^2)',
      '0',
      {},
      /no finite one|no certificate/,
    ],
  ])('refuses %s', (_what, text, value, claim, reason) => {
    const result = certify(text, value, claim);
    expect(result.isCertified ? 'certified' : result.reason).toMatch(reason);
  });
});
