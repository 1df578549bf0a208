import { type Allowances, allowances, defaultAllowances } from '../schemas/allowances.ts';
import { type Verdict, verdicts } from '../schemas/words.ts';
import { type Chapter, list, paragraph, table } from './section.ts';

export interface AllowanceMeaning {
  title: string;
  unit: string;
  meaning: string;
}

export const allowanceMeanings: Record<keyof Allowances, AllowanceMeaning> = {
  broke: { title: 'broke', unit: 'pairs', meaning: 'Pairs that may break.' },
  rootMoved: { title: 'root moved', unit: 'pairs', meaning: 'Pairs that may end at another allowed root.' },
  unsteady: { title: 'unsteady', unit: 'pairs', meaning: 'Pairs that may fail to repeat themselves.' },
  totalPercent: {
    title: 'evaluations in total',
    unit: '%',
    meaning: 'How much dearer a solver may become, over all pairs that both builds solved.',
  },
  caseEvaluations: {
    title: 'evaluations on one case',
    unit: 'evaluations',
    meaning: 'How many more a single pair may need that both builds solved.',
  },
  orderUnder: {
    title: 'order under the claim',
    unit: 'dimensionless',
    meaning:
      'How far a lost order may lie under the claim of the solver; without a claim, under the order of the reference.',
  },
  digits: {
    title: 'digits fewer',
    unit: 'decimal digits',
    meaning: 'How many correct digits fewer a pair may have, unless the case cannot give them.',
  },
};

export const verdictMeanings: Record<Verdict, string> = {
  'within allowances': 'Everything could be compared, and nothing goes beyond what the team tolerates.',
  'beyond allowances': 'At least one allowance is exceeded. The breaches are listed, each with its pairs.',
  'could not tell':
    'Nothing could be compared, or the candidate has no result for some solves of the reference.',
};

export const allowancesChapter: Chapter = {
  id: 'allowances',
  title: 'Allowances and verdicts',
  summary: 'What a team tolerates, and how a comparison is judged by it.',
  sections: [
    {
      id: 'allowances',
      title: 'The allowances',
      blocks: [
        table(
          'Allowances and their values where a team has set none',
          ['allowance', 'unit', 'at first', 'meaning'],
          allowances.keyof().options.map((name) => {
            const { title, unit, meaning } = allowanceMeanings[name];
            return [
              title,
              unit,
              defaultAllowances[name] === null ? 'no limit' : String(defaultAllowances[name]),
              meaning,
            ];
          }),
        ),
        list(
          'Exactly at a limit is within it.',
          'A solver, or the cases with a trait, can have limits of their own. The exception of the solver comes first, then that of a trait (the most tolerant, where several hold), then the base.',
          'An exception takes its pairs out of the count of the base.',
          'No limit is a choice too: what is not limited is still shown.',
        ),
      ],
    },
    {
      id: 'verdicts',
      title: 'The verdicts',
      blocks: [
        table(
          'Verdicts',
          ['verdict', 'meaning'],
          verdicts.map((verdict) => [verdict, verdictMeanings[verdict]]),
        ),
      ],
    },
    {
      id: 'reference',
      title: 'Changing what is agreed',
      blocks: [
        paragraph(
          'Where a change is worth its price, propose its results as the new reference. A reviewer accepts or declines each entry with a reason, and never decides on a proposal of their own. Nothing is overwritten: every revision says who, when and why.',
        ),
      ],
    },
  ],
  see: ['changes', 'order'],
};
