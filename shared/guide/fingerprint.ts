import { type Chapter, list, paragraph } from './section.ts';

export const fingerprintChapter: Chapter = {
  id: 'fingerprint',
  title: 'The arithmetic fingerprint',
  summary: 'Why two runs can be compared to the last bit, and how Tallyroot knows when they cannot.',
  sections: [
    {
      id: 'why',
      title: 'Why it is needed',
      blocks: [
        paragraph(
          'Sums, products, quotients and square roots in binary64 are the same everywhere. Exponentials, logarithms and circular functions are not: versions of one engine differ in the last bit, and one bit can move an iterate across a threshold and cost an evaluation. Tallyroot therefore evaluates them with code of its own choosing, and takes whole powers as multiplications in a fixed order.',
        ),
        paragraph(
          'The fingerprint is a hash of the result bits of every function at some thousands of fixed arguments. It is stored with each run. Where two agree, the same path was answered with the same bits, as far as those arguments can tell.',
        ),
      ],
    },
    {
      id: 'differs',
      title: 'Where two fingerprints differ',
      blocks: [
        list(
          'The comparison says so before anything else, and offers to run the reference again.',
          'Another path is then no change, since it may be the arithmetic’s.',
          'Outcome, cost, order and digits are still compared, but a difference need not be one of the builds.',
        ),
        paragraph(
          'The arithmetic of the library itself is not in the fingerprint: a library compiled with other flags, or run on another processor, may take another path with the same answers. That is a difference of the builds, and is shown as one.',
        ),
      ],
    },
  ],
  see: ['changes', 'equations'],
};
