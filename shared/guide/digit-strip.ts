import { type Chapter, list, paragraph, table } from './section.ts';

export const digitStripChapter: Chapter = {
  id: 'digit-strip',
  title: 'The digit strip',
  summary: 'How to read the picture of a solve that stands in every row.',
  sections: [
    {
      id: 'reading',
      title: 'Reading a strip',
      blocks: [
        paragraph(
          'The axis is correct digits, from 0 at the left to 16 at the right. Each evaluation of f is a stroke at the digits that its x has, so that time does not run from left to right: progress does.',
        ),
        table(
          'Parts of a strip',
          ['part', 'means'],
          [
            ['stroke', 'an evaluation of f'],
            [
              'short mark above a stroke',
              'the derivative was asked for at the same x; two marks for the second derivative',
            ],
            ['foot below a stroke', 'the same x was asked for again'],
            ['strokes left of 0', 'no correct digit yet; the latest is nearest to 0'],
            ['strokes beyond 16', 'asked when the answer was already there'],
            ['post on the axis', 'the digits that can be attained in this case; dots beyond it'],
            ['dot at the end', 'solved'],
            ['dot in a ring', 'another root'],
            ['open square', 'false claim'],
            [
              'half circle, open',
              'refused, over budget, timed out, crashed or garbled; the word beside it says which',
            ],
          ],
        ),
      ],
    },
    {
      id: 'shapes',
      title: 'Shapes to know',
      blocks: [
        list(
          'Bisection is an even comb.',
          'The gaps of the secant method grow by 1.6, those of Newton’s double.',
          'A foot under nearly every stroke: a stored value was lost.',
          'Strokes left of 0 alone, with an open end: the solver never came near; a safeguard may be gone.',
          'A fringe at the right end: the stopping test comes late.',
          'A grey tone that ends at a post: linear convergence to a multiple root.',
        ),
        paragraph(
          'Of two strips the upper one is the reference and the lower one the candidate, on the same axis. Each strip is also said in words, for readers who do not see it: “9 evaluations, 15.7 digits”.',
        ),
      ],
    },
  ],
  see: ['accuracy', 'query-check', 'order'],
};
