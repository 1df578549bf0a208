import { isRightlyRefused } from '../../../shared/numerics/judge-claim.ts';
import type { SolveView } from '../../../shared/schemas/runs.ts';
import type { TextPiece } from '../../components/ui/rich-text.tsx';
import { formatDigits, formatFigure } from '../../lib/format.ts';
import { orderWords } from '../../lib/order-words.ts';

const figure = (text: string): TextPiece => ({ text, figure: true });
const plain = (text: string): TextPiece => ({ text });
const strong = (text: string): TextPiece => ({ text, strong: true });
const evaluations = (solve: SolveView): TextPiece[] => [
  figure(formatFigure(solve.evaluations)),
  plain(solve.evaluations === 1 ? ' evaluation' : ' evaluations'),
];

/** How one solve ended, as the second half of a sentence. */
export function endingPieces(solve: SolveView): TextPiece[] {
  if (isRightlyRefused(solve)) return [plain('rightly finds no root in '), ...evaluations(solve)];
  switch (solve.outcome) {
    case 'solved':
      return [
        plain('takes '),
        ...evaluations(solve),
        plain(' to '),
        figure(formatDigits(solve.digits)),
        plain(' digits'),
      ];
    case 'other root':
      return [plain('returns a root that is not asked for, after '), ...evaluations(solve)];
    case 'false claim':
      return [plain('claims a root that is none, after '), ...evaluations(solve)];
    case 'refused':
      return [plain('gives up after '), ...evaluations(solve)];
    case 'over budget':
      return [plain('spends all its '), ...evaluations(solve)];
    case 'timed out':
      return [plain('is not done in time, after '), ...evaluations(solve)];
    case 'crashed':
      return [plain('crashes after '), ...evaluations(solve)];
    case 'garbled':
      return [plain('breaks the wire after '), ...evaluations(solve)];
    default:
      return [plain('does not take what the case gives')];
  }
}

/** The sentence of a solve that stands alone. */
export function aloneSentence(solve: SolveView): TextPiece[] {
  return [
    strong(solve.solver),
    plain(' on '),
    strong(solve.case),
    plain(' '),
    ...endingPieces(solve),
    plain('.'),
  ];
}

/** A second sentence: steps, accuracy and order of both. */
export function pairLead(reference: SolveView, candidate: SolveView, claim: number | null): string {
  const parts: string[] = [];
  if (reference.iterations !== null && candidate.iterations !== null) {
    parts.push(
      reference.iterations === candidate.iterations
        ? `Both take ${formatFigure(candidate.iterations)} steps.`
        : `The reference takes ${formatFigure(reference.iterations)} steps, the candidate ${formatFigure(candidate.iterations)}.`,
    );
  }
  const [was, is] = [orderWords(reference.order), orderWords(candidate.order)];
  const claimed = claim === null ? '' : `; claimed is ${Number(claim.toFixed(4))}`;
  if (was !== '–' || is !== '–') {
    parts.push(
      was === is
        ? `Order of convergence: ${is} in both${claimed}.`
        : `Order of convergence: ${was}, now ${is}${claimed}.`,
    );
  }
  return parts.join(' ');
}
