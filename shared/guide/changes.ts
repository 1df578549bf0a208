import { gravity } from '../comparison/change.ts';
import { type Change, changes } from '../schemas/words.ts';
import { type Chapter, list, paragraph, table } from './section.ts';

export const changeMeanings: Record<Change, string> = {
  broke: 'The reference solved it (or rightly refused), the candidate does not.',
  'root moved': 'Both solve it, at different allowed roots.',
  'order lost':
    'The interval of the candidate’s order lies wholly below that of the reference, or below the claim by more than is allowed.',
  'less accurate':
    'Fewer correct digits by more than 0.5, or by more than the allowance where that is less, and beyond what can be attained.',
  costlier: 'Both solve it; the candidate needs more evaluations.',
  unsteady: 'A fresh process did not repeat the candidate’s solve to the last bit.',
  drifted: 'Another path at the same cost; or neither solves it and the path or the outcome is another one.',
  mended: 'The reference did not solve it, the candidate does.',
  'order gained': 'The mirror of order lost.',
  'more accurate': 'The mirror of less accurate.',
  cheaper: 'Both solve it; the candidate needs fewer evaluations.',
  new: 'Only the candidate has this solve: a new solver, case or start.',
  gone: 'Only the reference has it.',
  same: 'The same path to the last bit; across different arithmetic, the same outcome at the same cost.',
};

export const changesChapter: Chapter = {
  id: 'changes',
  title: 'Changes',
  summary: 'How the solves of two builds are paired, and what each pair is said to show.',
  sections: [
    {
      id: 'pairs',
      title: 'Pairs',
      blocks: [
        paragraph(
          'A solve of the candidate is paired with that of the reference with the same solver, case and start. A renamed solver pairs by its `aliases`. A case whose content changed is set aside, and so is one that the candidate’s run did not come to. A deterministic solver takes the same path every time, so differences are exact, down to one evaluation, and need no statistics.',
        ),
      ],
    },
    {
      id: 'list',
      title: 'The changes',
      blocks: [
        table(
          'Changes',
          ['change', 'meaning'],
          changes.map((change) => [change, changeMeanings[change]]),
        ),
        paragraph(
          `A pair has one change, the gravest that holds; the others stand beside it. From the gravest on: ${gravity.join(', ')}.`,
        ),
      ],
    },
    {
      id: 'cost',
      title: 'What is not compared',
      blocks: [
        list(
          'Cost is compared only over pairs that both builds solved. A solver that became cheap by giving up, or by claiming falsely, is broke and never cheaper.',
          'Where the two runs were made in different arithmetic another path is no change.',
          'Time is never compared.',
          'No difference in the listed cases is no proof that two builds are equal elsewhere.',
        ),
      ],
    },
    {
      id: 'totals',
      title: 'Totals',
      blocks: [
        paragraph(
          'Totals stand in three ways side by side: the sum of the evaluations, the mean relative change of a case, and that of a family. They can disagree; where they do, the pairs say why. Solved counts always stand beside them.',
        ),
      ],
    },
    {
      id: 'exports',
      title: 'Taking a comparison with you',
      blocks: [
        table(
          'Exports of a comparison',
          ['format', 'holds'],
          [
            ['CSV', 'one row a pair, units in the header, empty where nothing is known'],
            ['JSON', 'everything but the paths, with the allowances that it was judged by'],
            ['Markdown', 'the sentence, the totals and the ten gravest changes'],
            [
              'JUnit XML',
              'a testsuite a solver, a testcase a pair; a failure where the pair is part of a breach, an error where the candidate has no result',
            ],
          ],
        ),
        paragraph(
          'Programs for tables take a cell that begins with =, +, -, @ or a tab for a formula. In CSV a name that begins so, or with an apostrophe, has an apostrophe put before it: take one off to have the name back. Plain numbers such as -3 stay as they are.',
        ),
      ],
    },
  ],
  see: ['allowances', 'order', 'accuracy', 'fingerprint'],
};
