import { exactDigits, mostDigits } from '../numerics/digits.ts';
import { type Chapter, list, paragraph } from './section.ts';

export const accuracyChapter: Chapter = {
  id: 'accuracy',
  title: 'Correct digits and attainable accuracy',
  summary: 'How near an x is to a root, and how near binary64 lets any solver come.',
  sections: [
    {
      id: 'digits',
      title: 'Correct digits',
      blocks: [
        paragraph(
          `The correct digits of x are −log10(|x − r| / |r|) against the nearest allowed root r; where r is 0 they are −log10 |x|, and the page says so. They are never below 0 and shown up to ${mostDigits}. Where x is the root rounded to binary64 they are ${exactDigits}: exact to rounding.`,
        ),
        paragraph(
          'The error is taken in decimal arithmetic against the certified root with its 40 digits and more, never against a rounded one. Beside it stands the error in units in the last place of the root.',
        ),
      ],
    },
    {
      id: 'attainable',
      title: 'Attainable accuracy',
      blocks: [
        paragraph(
          'Near a root f is small, and what is computed for it is rounding as much as value. Within a distance F of the root no solver can tell x from the root: F = max(ulp(r)/2, (m! η / |f⁽ᵐ⁾(r)|)^(1/m)), with m the multiplicity and η the error with which f is evaluated there. η is measured for each case by comparing with high precision on both sides of the root, because the form of the equation decides it.',
        ),
        list(
          'A simple, well conditioned root: F is about half a unit in the last place, nearly 16 digits.',
          'A double root: about 8 digits. A triple one: about 5.',
          'The same polynomial, expanded: often fewer digits than in factors.',
          'A flat root, where every derivative vanishes: F is half the width on which f is exactly 0.',
        ),
        paragraph(
          'F decides how near a claim has to be, what counts as late, and whether fewer digits are a loss. It is stored with the case, absolute, in the unit of x.',
        ),
      ],
    },
  ],
  see: ['outcomes', 'digit-strip', 'order'],
};
