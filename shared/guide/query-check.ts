import { lateAllowance } from '../numerics/query-check.ts';
import { type QueryFinding, queryFindings } from '../schemas/words.ts';
import { type Chapter, paragraph, table } from './section.ts';

export interface FindingMeaning {
  title: string;
  meaning: string;
  /** What most often is behind it. */
  cause: string;
}

export const findingMeanings: Record<QueryFinding, FindingMeaning> = {
  repeated: {
    title: 'asked again at the same x',
    meaning: 'The same kind of evaluation at an x, the same to the last bit, that was asked for before.',
    cause: 'A value that was not stored: the routine calls f where it should have kept what it had.',
  },
  outside: {
    title: 'asked outside the bracket',
    meaning:
      'An evaluation outside the bracket given, by a solver that takes one and does not widen it on purpose.',
    cause: 'An interpolation step that is not checked before it is taken.',
  },
  late: {
    title: 'asked after the answer was there',
    meaning: `Evaluations after the first x within twice the attainable accuracy of a root, beyond the ${lateAllowance} that a stopping test may need.`,
    cause: 'A stopping test that waits for more than the arithmetic can give.',
  },
  unused: {
    title: 'derivative not used',
    meaning: 'A derivative at the last x of a path that nothing can have depended on.',
    cause: 'f and f′ are asked for together before it is known whether another step is needed.',
  },
  nonFinite: {
    title: 'not finite',
    meaning: 'Asked at inf or nan, or answered so.',
    cause: 'A division by a difference of 0, or a step out of the domain of f.',
  },
};

export const queryCheckChapter: Chapter = {
  id: 'query-check',
  title: 'The query check',
  summary: 'What Tallyroot notices in a path without being asked.',
  sections: [
    {
      id: 'findings',
      title: 'Findings',
      blocks: [
        table(
          'Findings of the query check',
          ['finding', 'meaning', 'often behind it'],
          queryFindings.map((finding) => {
            const { title, meaning, cause } = findingMeanings[finding];
            return [title, meaning, cause];
          }),
        ),
        paragraph(
          'f at x and f′ at x are different kinds; −0 and 0 are the same x. A finding is no failure: each has its count, the x’s concerned, and the reference’s count beside it. What a solver does in more than half of its solves is named in the sentence that opens a comparison.',
        ),
      ],
    },
  ],
  see: ['digit-strip', 'changes'],
};
