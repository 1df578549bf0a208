import { describe, expect, it } from 'vitest';
import {
  formatArrow,
  formatClaim,
  formatCommit,
  formatCount,
  formatDate,
  formatDateTime,
  formatDifference,
  formatDigits,
  formatElapsed,
  formatExact,
  formatFigure,
  formatOrder,
  formatPathDigits,
  formatPercent,
  formatShortDate,
  formatValue,
} from '../../../src/lib/format.ts';
import { formatEquation } from '../../../src/lib/format-equation.ts';

describe('figures', () => {
  it('carry a true minus and group from five digits on', () => {
    expect(formatFigure(-14)).toBe('−14');
    expect(formatFigure(1488)).toBe('1488');
    expect(formatFigure(1234567)).toBe('1\u202f234\u202f567');
  });

  it('are an en dash where there is nothing, never 0', () => {
    for (const format of [
      formatFigure,
      formatDigits,
      formatOrder,
      formatPercent,
      formatDifference,
      formatElapsed,
    ]) {
      expect(format(null)).toBe('–');
    }
  });

  it('carry their sign as a difference, and 0 none', () => {
    expect([39, -14, 0].map(formatDifference)).toEqual(['+39', '−14', '0']);
  });

  it('have a narrow no-break space before % and one place that is not .0', () => {
    expect([68.75, -7.33, 0, 5].map(formatPercent)).toEqual([
      '+68.8\u202f%',
      '−7.3\u202f%',
      '0\u202f%',
      '+5\u202f%',
    ]);
  });

  it('never round a change in percent to 0', () => {
    expect(formatPercent(0.01)).toBe('+<0.1\u202f%');
  });

  it('show digits to one place, order to two, the claim as declared', () => {
    expect(formatDigits(15.68)).toBe('15.7');
    expect(formatPathDigits(15.821)).toBe('15.82');
    expect(formatPathDigits(16)).toBe('16');
    expect(formatOrder(1.6180339)).toBe('1.62');
    expect(formatClaim(1.6180339887)).toBe('1.618');
    expect(formatClaim(null)).toBe('none');
  });

  it('keep an arrow and its figures on one line', () => {
    expect(formatArrow('128', '216')).toBe('128\u202f→\u202f216');
  });

  it('name function values that are no numbers', () => {
    expect(formatValue(-0.18808)).toBe('−1.8808e−1');
    expect(formatValue(Number.POSITIVE_INFINITY)).toBe('∞');
    expect(formatValue(Number.NaN)).toBe('not a number');
  });

  it('write an x so that it reads back to the same bits, −0 too', () => {
    expect(formatExact(0.1 + 0.2)).toBe('0.30000000000000004');
    expect(formatExact(-0)).toBe('−0');
  });
});

describe('dates, times and labels', () => {
  const late = '2026-03-14T23:59:30.000Z';

  it('are in UTC', () => {
    expect(formatDate(late)).toBe('14 March 2026');
    expect(formatShortDate(late)).toBe('14 Mar 2026');
    expect(formatDateTime(late)).toBe('14 March 2026 23:59');
  });

  it('give elapsed time in the unit that fits', () => {
    expect([840, 3200, 125_000].map(formatElapsed)).toEqual(['840 ms', '3.2 s', '2 min 5 s']);
  });

  it('shorten a full commit hash and nothing else', () => {
    expect(formatCommit('c41e9a7f00c41e9a7f00c41e9a7f00c41e9a7f00')).toBe('c41e9a7');
    expect(formatCommit('release-1.2')).toBe('release-1.2');
  });

  it('count in words', () => {
    expect([formatCount(1, 'case'), formatCount(12, 'case')]).toEqual(['1 case', '12 cases']);
  });
});

describe('formatEquation', () => {
  it.each([
    ['x^3 - 2*x - 5', 'x³ − 2x − 5'],
    ['x - 0.95*sin(x) - 0.2', 'x − 0.95 sin(x) − 0.2'],
    ['atan(30*(x - 0.42))', 'atan(30(x − 0.42))'],
    ['x*exp(x) - 1e-9', 'x exp(x) − 10⁻⁹'],
    ['x^20 - 2', 'x²⁰ − 2'],
    ['x^(-2)', 'x⁻²'],
    ['(x-1)*(x+2)', '(x−1)(x+2)'],
    ['x^2*y', 'x² y'],
  ])('writes %s as a person does', (source, written) => {
    expect(formatEquation(source)).toBe(written);
  });

  it('keeps the sign of a product that would change its meaning if left out', () => {
    expect(formatEquation('1/2*x')).toBe('1/2 · x');
    expect(formatEquation('2*3*x')).toBe('2 · 3x');
  });

  it('raises only the last of a tower of exponents', () => {
    expect(formatEquation('x^2^3')).toBe('x^2³');
  });
});
