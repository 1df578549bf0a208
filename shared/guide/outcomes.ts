import { type Outcome, outcomes, type RemarkCode, remarkCodes } from '../schemas/words.ts';
import { type Chapter, paragraph, table } from './section.ts';

export const outcomeMeanings: Record<Outcome, string> = {
  solved:
    'The solver claimed convergence, and its x is a root that the case allows, as near as it can be expected to come.',
  'other root': 'The solver claimed convergence at a true root, but at one that the case does not allow.',
  refused: 'The solver said that it did not converge. Honest, and right where there is no root.',
  'false claim':
    'The solver claimed convergence where no root is: at a pole, at an end of the bracket, far from everything.',
  'over budget': 'The solver asked for more evaluations than the suite allows.',
  'timed out': 'The solve did not end in time.',
  crashed: 'The adapter ended during the solve; its exit status or signal and the end of its log are kept.',
  garbled: 'The adapter broke the rules of the wire; the line is kept.',
  'not applicable': 'The case does not offer what the solver takes, so that it was not run.',
};

export const remarkMeanings: Record<RemarkCode, string> = {
  loose: 'The x is a root to about five digits, but not to the tolerance that the solver promises.',
  'rightly refused': 'The case has no root, and the solver said so. It counts as a success.',
  said: 'What the solver gave as its reason.',
  line: 'The line that broke the wire.',
  exit: 'The exit status or the signal of the adapter, with the end of its log.',
  'iterations not credible': 'The library reported a count of iterations that cannot be.',
  'not tried': 'Ten solves of this solver in a row had gone wrong, so that this one was left out.',
  'path cut': 'The path was too long to be kept whole; counts and hash are of all of it.',
  'after end': 'The adapter wrote something, or exited, after its end line.',
  'fresh start': 'The adapter had asked too early; it was started afresh and the solve was tried again.',
  'certified here': 'The root was not on file and was certified on the spot.',
  'claimed non-finite': 'The solver returned inf or nan as its root.',
  why: 'Why a pair is not applicable.',
  time: 'The limit of time that was reached.',
};

export const outcomesChapter: Chapter = {
  id: 'outcomes',
  title: 'Outcomes',
  summary: 'What came of a solve, in one word, and the remarks that can stand beside it.',
  sections: [
    {
      id: 'outcomes',
      title: 'The nine outcomes',
      blocks: [
        table(
          'Outcomes',
          ['outcome', 'meaning'],
          outcomes.map((outcome) => [outcome, outcomeMeanings[outcome]]),
        ),
        paragraph(
          'A solve has exactly one; the first reason to stop wins. Where a case has no root, a refusal is right: it is shown as rightly refused and counts as a success. Everything but solved and rightly refused counts as a failure, and a false claim is the worst of them, since nobody downstream will notice.',
        ),
      ],
    },
    {
      id: 'judged',
      title: 'How a claim is judged',
      blocks: [
        paragraph(
          'Only where x is counts, not how it was come by. A claim is solved within max(4 ulp(r), 16 F, 4 (xabs + xrel |r|)) of an allowed root r, with F the attainable accuracy of that root and xabs, xrel the promise in the manifest; or where |f(x)| ≤ fabs, if a residual alone was promised. The factor 4 is there because the width of a bracket, half of it and the last step mean different things in different libraries. Within 1e-5 |r| it is still solved, with the remark loose.',
        ),
      ],
    },
    {
      id: 'remarks',
      title: 'Remarks',
      blocks: [
        table(
          'Remarks',
          ['remark', 'meaning'],
          remarkCodes.map((code) => [code, remarkMeanings[code]]),
        ),
      ],
    },
  ],
  see: ['accuracy', 'changes', 'wire'],
};
