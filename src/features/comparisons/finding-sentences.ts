import type { ComparisonView } from '../../../shared/schemas/comparisons.ts';
import { type QueryFinding, queryFindings } from '../../../shared/schemas/words.ts';
import type { TextPiece } from '../../components/ui/rich-text.tsx';
import { formatFigure } from '../../lib/format.ts';

export interface FindingLine {
  term: string;
  /** One sentence a solver; empty where nothing was noticed. */
  sentences: { key: string; pieces: TextPiece[] }[];
}

const terms: Record<QueryFinding, string> = {
  repeated: 'asked again',
  outside: 'outside',
  late: 'late',
  unused: 'unused',
  nonFinite: 'non-finite',
};

const doing: Record<QueryFinding, string> = {
  repeated: ' asks again at a bit-identical x in ',
  outside: ' asks outside the bracket it was given in ',
  late: ' goes on after the answer is there in ',
  unused: ' asks for a derivative that it does not use in ',
  nonFinite: ' asks at, or is answered by, something that is no finite number in ',
};

type Totals = ComparisonView['totals'][number];

const figure = (text: string): TextPiece => ({ text, figure: true });

function sentence(totals: Totals, finding: QueryFinding): TextPiece[] | null {
  const counts = totals.findings[finding];
  if (counts === undefined) return null;
  const { reference, candidate } = counts;
  if (candidate.solves === 0 && reference.solves === 0) return null;
  const name: TextPiece = { text: totals.solver, strong: true };
  if (candidate.solves === 0) {
    return [
      name,
      { text: ' no longer does, which the reference did in ' },
      figure(formatFigure(reference.solves)),
      { text: ' solves.' },
    ];
  }
  const before: TextPiece[] =
    totals.presence === 'new'
      ? []
      : reference.evaluations === 0
        ? [{ text: '; the reference never does' }]
        : reference.evaluations === candidate.evaluations && reference.solves === candidate.solves
          ? [{ text: ', as the reference does' }]
          : [{ text: ' (reference: ' }, figure(formatFigure(reference.evaluations)), { text: ')' }];
  return [
    name,
    { text: doing[finding] },
    figure(`${formatFigure(candidate.solves)} of ${formatFigure(candidate.of)}`),
    { text: ' solves, ' },
    figure(formatFigure(candidate.evaluations)),
    { text: candidate.evaluations === 1 ? ' evaluation' : ' evaluations in all' },
    ...before,
    { text: '.' },
  ];
}

/** What the query check noticed, by finding, the candidate beside the reference. */
export function findingLines(totals: readonly Totals[]): FindingLine[] {
  return queryFindings.map((finding) => ({
    term: terms[finding],
    sentences: totals.flatMap((one) => {
      const pieces = sentence(one, finding);
      return pieces === null ? [] : [{ key: one.solver, pieces }];
    }),
  }));
}
