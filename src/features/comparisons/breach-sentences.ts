import type { ComparisonView } from '../../../shared/schemas/comparisons.ts';
import type { TextPiece } from '../../components/ui/rich-text.tsx';
import { formatFigure, formatPercent } from '../../lib/format.ts';

type Breach = ComparisonView['breaches'][number];

const figure = (text: string): TextPiece => ({ text, figure: true });
const plain = (text: string): TextPiece => ({ text });

export const breachTerms: Record<Breach['allowance'], string> = {
  broke: 'broke',
  rootMoved: 'root moved',
  unsteady: 'unsteady',
  totalPercent: 'evaluations',
  caseEvaluations: 'one case',
  orderUnder: 'order',
  digits: 'accuracy',
};

const oneMore = (value: number): string => String(Number(value.toFixed(2)));

/** What goes beyond an allowance, in a sentence. */
export function breachSentence(breach: Breach): TextPiece[] {
  const { allowance, limit, scope } = breach;
  const where: TextPiece[] =
    scope.solver !== null
      ? [{ text: scope.solver, strong: true }, plain(': ')]
      : scope.trait !== null
        ? [plain(`cases with the trait “${scope.trait}”: `)]
        : [];
  const found = breach.figure;
  if (allowance === 'totalPercent') {
    return [
      ...where,
      ...(found === null
        ? [plain('evaluations where there were none')]
        : [figure(formatPercent(found)), plain(' evaluations in total')]),
      plain('; allowed are '),
      figure(formatPercent(limit)),
      plain('.'),
    ];
  }
  if (allowance === 'caseEvaluations') {
    return [
      ...where,
      figure(formatFigure(breach.pairs.length)),
      plain(breach.pairs.length === 1 ? ' pair is' : ' pairs are'),
      plain(' dearer by more than '),
      figure(`+${formatFigure(limit)}`),
      plain(', the worst by '),
      figure(`+${formatFigure(found)}`),
      plain('.'),
    ];
  }
  if (allowance === 'orderUnder' || allowance === 'digits') {
    const what = allowance === 'digits' ? ' digits fewer' : ' under the claimed order';
    return [
      ...where,
      plain('up to '),
      figure(found === null ? '–' : oneMore(found)),
      plain(`${what}; allowed are `),
      figure(oneMore(limit)),
      plain('.'),
    ];
  }
  return [
    ...where,
    figure(formatFigure(found)),
    plain(found === 1 ? ' pair; ' : ' pairs; '),
    ...(limit === 0
      ? [plain('none is allowed.')]
      : [plain('allowed are '), figure(formatFigure(limit)), plain('.')]),
  ];
}
