import type { ComparisonView } from '../../../shared/schemas/comparisons.ts';
import type { TextPiece } from '../../components/ui/rich-text.tsx';
import { formatCount, formatFigure } from '../../lib/format.ts';

const figure = (text: string): TextPiece => ({ text, figure: true });
const plain = (text: string): TextPiece => ({ text });
const strong = (text: string): TextPiece => ({ text, strong: true });

export interface LibraryStand {
  buildCount: number;
  /** What the newest build that was run is called. */
  newest: string | null;
  suite: string;
  /** Against what the build was run against; undefined while it is read, null where there is nothing. */
  comparison: ComparisonView | null | undefined;
  solved: number | null;
  of: number | null;
}

/** How a library stands, in one sentence. */
export function libraryPieces(stand: LibraryStand): TextPiece[] {
  if (stand.buildCount === 0) return [plain('No build is registered yet.')];
  if (stand.newest === null) {
    return [
      figure(formatCount(stand.buildCount, 'build')),
      plain(stand.buildCount === 1 ? ' is' : ' are'),
      plain(` registered; none has been run on ${stand.suite}.`),
    ];
  }
  const { comparison } = stand;
  const counts: TextPiece[] =
    stand.solved === null || stand.of === null
      ? []
      : [
          plain(': '),
          figure(`${formatFigure(stand.solved)} of ${formatFigure(stand.of)}`),
          plain(` solved or rightly refused on ${stand.suite}`),
        ];
  const name = strong(stand.newest);
  const base = comparison?.reference.revision === null ? 'the build before' : 'the reference results';
  if (comparison === undefined || comparison === null)
    return [name, plain(' is the newest build that was run'), ...counts, plain('.')];
  if (comparison.verdict === 'within allowances') {
    const isSame = Object.keys(comparison.changes).every((change) => change === 'same');
    return isSame
      ? [name, plain(` changed nothing against ${base}`), ...counts, plain('.')]
      : [name, plain(` is within allowances against ${base}`), ...counts, plain('.')];
  }
  if (comparison.verdict === 'beyond allowances') {
    return [
      name,
      plain(' is '),
      strong('beyond allowances'),
      plain(` against ${base}`),
      ...counts,
      plain('.'),
    ];
  }
  return [plain('Whether '), name, plain(` is as good as ${base} could not be told`), ...counts, plain('.')];
}
