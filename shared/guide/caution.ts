import { careSentence } from './care.ts';
import { type Chapter, list, paragraph } from './section.ts';

export const cautionChapter: Chapter = {
  id: 'caution',
  title: 'What results are, and what they are not',
  summary: 'What may be concluded from a run, and what may not.',
  sections: [
    {
      id: 'care',
      title: 'In one paragraph',
      blocks: [paragraph(careSentence)],
    },
    {
      id: 'limits',
      title: 'What a run does not say',
      blocks: [
        list(
          'A suite is a choice of equations. Others may behave otherwise, and a solver can be fitted to a suite without getting better.',
          'A certified root is certified for the equation as written; whether the equation describes the thing that you mean is for you to judge.',
          'Counts say what an answer cost in evaluations, not in seconds or in memory.',
          'Within allowances means that nothing got worse than your team agreed to bear. It does not mean right.',
          'A build that ran on one machine may behave otherwise on another, with another compiler or another library beneath it.',
        ),
        paragraph(
          'Where people can be hurt, where a load, a dose, a pressure or a path in the air is computed, use what the codes of the place and its licensed practice require, and have the work checked by those who answer for it.',
        ),
      ],
    },
  ],
  see: ['fingerprint', 'allowances'],
};
