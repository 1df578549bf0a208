import { describe, expect, it } from 'vitest';
import {
  fixed,
  fromTo,
  list,
  name,
  paragraph,
  percent,
  plainText,
  say,
} from '../../../shared/comparison/rich-text.ts';

describe('rich text', () => {
  it('makes numbers figures and keeps names strong', () => {
    expect(say`${name('secant')} asks ${3} times.`).toEqual([
      { text: 'secant', strong: true },
      { text: ' asks ' },
      { text: '3', figure: true },
      { text: ' times.' },
    ]);
  });

  it('writes a true minus, and no minus before a rounded nothing', () => {
    expect(fixed(-1.25, 1).text).toBe('−1.3');
    expect(fixed(-0.01, 1).text).toBe('0.0');
    expect(plainText(say`${-3}`)).toBe('−3');
  });

  it('puts a thin no-break space before the percent sign, and no empty decimal', () => {
    expect(plainText(percent(68.75))).toBe('68.8\u202f%');
    expect(plainText(percent(2))).toBe('2\u202f%');
    expect(plainText(percent(-7.3))).toBe('−7.3\u202f%');
  });

  it('puts thin spaces round the arrow', () => {
    expect(plainText(fromTo(30, 16))).toBe('30\u202f→\u202f16');
    expect(plainText(fromTo(1.634, 1.6, 2))).toBe('1.63\u202f→\u202f1.60');
  });

  it('lists one, two and three things', () => {
    expect(plainText(list(['a']))).toBe('a');
    expect(plainText(list(['a', 'b']))).toBe('a and b');
    expect(plainText(list(['a', 'b', 'c']))).toBe('a, b and c');
  });

  it('joins sentences with a space', () => {
    expect(paragraph([say`One.`, say`Two.`])).toEqual([{ text: 'One. Two.' }]);
  });
});
