import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { plainText, RichText } from '../../../src/components/ui/rich-text.tsx';

const pieces = [
  { text: 'secant', strong: true },
  { text: ' needs ' },
  { text: '12 of 57', figure: true },
  { text: ' evaluations.' },
];

describe('RichText', () => {
  it('sets names in 600 and only the digits of a figure in Mono', () => {
    expect(renderToStaticMarkup(<RichText pieces={pieces} />)).toBe(
      '<b>secant</b> needs <span class="num">12</span> of <span class="num">57</span> evaluations.',
    );
  });

  it('escapes what a sentence carries', () => {
    expect(renderToStaticMarkup(<RichText pieces={[{ text: '<script>' }]} />)).toBe('&lt;script&gt;');
  });

  it('reads as one plain sentence', () => {
    expect(plainText(pieces)).toBe('secant needs 12 of 57 evaluations.');
  });
});
