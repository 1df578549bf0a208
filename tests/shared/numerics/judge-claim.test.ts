import { describe, expect, it } from 'vitest';
import { type Claim, isRightlyRefused, isSuccess, judgeClaim } from '../../../shared/numerics/judge-claim.ts';
import { rootReference } from '../../../shared/numerics/root-reference.ts';

const two = { ref: rootReference('2'), attainable: 1e-15, allowed: true };
const minusTwo = { ref: rootReference('-2'), attainable: 1e-15, allowed: false };
const claim: Claim = {
  x: 2,
  roots: [two, minusTwo],
  expectation: 'root',
  tolerance: { xabs: 0, xrel: 1e-15, fabs: 0 },
  residual: 0,
};
const outcomeAt = (x: number, change: Partial<Claim> = {}) => judgeClaim({ ...claim, x, ...change });
const codes = (x: number, change: Partial<Claim> = {}) => outcomeAt(x, change).remarks.map((one) => one.code);

describe('judgeClaim', () => {
  it('takes an x within 16 F for solved, and just beyond for loose', () => {
    const roots = [{ ...two, attainable: 1e-10 }];
    expect(outcomeAt(2 + 1.59e-9, { roots })).toEqual({ outcome: 'solved', remarks: [], nearest: 0 });
    expect(outcomeAt(2 + 1.61e-9, { roots }).outcome).toBe('solved');
    expect(codes(2 + 1.61e-9, { roots })).toEqual(['loose']);
  });

  it('grants 4 ulps of the root however small F and the tolerance are', () => {
    const strict = { roots: [{ ...two, attainable: 0 }], tolerance: { xabs: 0, xrel: 0, fabs: 0 } };
    expect(codes(2 + 4 * 2 ** -51, strict)).toEqual([]);
    expect(codes(2 + 5 * 2 ** -51, strict)).toEqual(['loose']);
  });

  it('grants four times the tolerance that was promised', () => {
    expect(codes(2 + 0.99e-7, { tolerance: { xabs: 1e-8, xrel: 0.75e-8, fabs: 0 } })).toEqual([]);
    expect(codes(2 + 1.01e-7, { tolerance: { xabs: 1e-8, xrel: 0.75e-8, fabs: 0 } })).toEqual(['loose']);
  });

  it('takes 1e-5 of the root for loose and more for a false claim', () => {
    expect(codes(2 + 1.99e-5)).toEqual(['loose']);
    expect(outcomeAt(2 + 2.01e-5)).toEqual({ outcome: 'false claim', remarks: [], nearest: 0 });
    const zero = { roots: [{ ...two, ref: rootReference('0') }] };
    expect(codes(0.99e-5, zero)).toEqual(['loose']);
    expect(outcomeAt(1.01e-5, zero).outcome).toBe('false claim');
  });

  it('says by how much a loose claim missed', () => {
    expect(outcomeAt(2 + 1e-6).remarks[0]?.text).toBe(
      '1.0e−6 from the root, where at most 1.6e−14 was expected.',
    );
  });

  it('takes a small residual for solved only where nothing else was promised', () => {
    const fabs = { tolerance: { xabs: 0, xrel: 0, fabs: 1e-6 }, residual: -1e-6 };
    expect(outcomeAt(2.1, fabs).outcome).toBe('solved');
    expect(outcomeAt(2.1, { ...fabs, residual: 1.1e-6 }).outcome).toBe('false claim');
    expect(outcomeAt(2.1, { ...fabs, residual: null }).outcome).toBe('false claim');
    expect(outcomeAt(2.1, { ...fabs, residual: Number.NaN }).outcome).toBe('false claim');
    expect(outcomeAt(2.1, { ...fabs, expectation: 'none', roots: [] }).outcome).toBe('false claim');
    expect(outcomeAt(2.1, { ...fabs, tolerance: { xabs: 0, xrel: 1e-15, fabs: 1e-6 } }).outcome).toBe(
      'false claim',
    );
  });

  it('tells another root from the ones that the case allows', () => {
    expect(outcomeAt(-2)).toEqual({ outcome: 'other root', remarks: [], nearest: 1 });
    expect(outcomeAt(-2 - 1e-6).outcome).toBe('other root');
    expect(codes(-2 - 1e-6)).toEqual(['loose']);
  });

  it('takes an x strictly on another root for that root, even close to an allowed one', () => {
    const close = { ref: rootReference('2.000001'), attainable: 1e-15, allowed: false };
    expect(outcomeAt(2.000001, { roots: [two, close] }).outcome).toBe('other root');
    expect(outcomeAt(2.0000009, { roots: [two, close] }).outcome).toBe('solved');
  });

  it('certifies a root on the spot before it calls a claim false', () => {
    const asked: [number, number][] = [];
    const certifyNear = (x: number, radius: number) => {
      asked.push([x, radius]);
      return '3.000001';
    };
    const found = outcomeAt(3.000001, { certifyNear });
    expect(found.outcome).toBe('other root');
    expect(found.remarks.map((one) => one.code)).toEqual(['certified here']);
    expect(asked).toEqual([[3.000001, 1e-5 * 3.000001]]);
    expect(codes(3, { certifyNear })).toEqual(['certified here', 'loose']);
    expect(outcomeAt(3.1, { certifyNear }).outcome).toBe('false claim');
    expect(outcomeAt(3, { certifyNear: () => null }).outcome).toBe('false claim');
  });

  it('does not look for a root where one on file already fits', () => {
    const certifyNear = () => {
      throw new Error('not needed');
    };
    expect(outcomeAt(2, { certifyNear }).outcome).toBe('solved');
    expect(outcomeAt(-2, { certifyNear }).outcome).toBe('other root');
  });

  it('takes every claim on a case without root for false', () => {
    expect(outcomeAt(0.5, { roots: [], expectation: 'none' })).toEqual({
      outcome: 'false claim',
      remarks: [],
      nearest: null,
    });
  });

  it('takes a claim that is not finite for false and says so', () => {
    expect(outcomeAt(Number.NaN)).toMatchObject({ outcome: 'false claim', nearest: null });
    expect(codes(Number.POSITIVE_INFINITY)).toEqual(['claimed non-finite']);
    expect(outcomeAt(Number.NEGATIVE_INFINITY).remarks[0]?.text).toContain('−inf');
  });
});

describe('isSuccess', () => {
  const rightly = [{ code: 'rightly refused' as const, text: 'There is no root.' }];

  it('counts solved and rightly refused, nothing else', () => {
    expect(isSuccess({ outcome: 'solved', remarks: [] })).toBe(true);
    expect(isSuccess({ outcome: 'refused', remarks: rightly })).toBe(true);
    expect(isSuccess({ outcome: 'refused', remarks: [] })).toBe(false);
    expect(isSuccess({ outcome: 'other root', remarks: [] })).toBe(false);
    expect(isSuccess({ outcome: 'crashed', remarks: rightly })).toBe(false);
  });

  it('tells rightly refused from solved', () => {
    expect(isRightlyRefused({ outcome: 'refused', remarks: rightly })).toBe(true);
    expect(isRightlyRefused({ outcome: 'solved', remarks: rightly })).toBe(false);
  });
});
