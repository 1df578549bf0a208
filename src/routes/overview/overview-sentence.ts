import type { TextPiece } from '../../components/ui/rich-text.tsx';
import { formatCount, formatFigure } from '../../lib/format.ts';

export interface OverviewCounts {
  libraries: number;
  /** Newest builds of libraries that are beyond their allowances. */
  beyond: number;
  failed: number;
  running: number;
  /** Suites on which a library was run without reference results. */
  withoutReference: number;
}

const figure = (text: string): TextPiece => ({ text, figure: true });
const plain = (text: string): TextPiece => ({ text });
const strong = (text: string): TextPiece => ({ text, strong: true });

/** What waits for somebody, gravest first, in one sentence. */
export function overviewPieces(counts: OverviewCounts): TextPiece[] {
  const { libraries, beyond, failed, running, withoutReference } = counts;
  if (libraries === 0) return [plain('There is no library here for you yet.')];
  const rest: TextPiece[] =
    running === 0
      ? []
      : [
          plain(' '),
          figure(formatCount(running, 'run')),
          plain(running === 1 ? ' is' : ' are'),
          plain(' in progress.'),
        ];
  if (beyond > 0) {
    return [
      ...(beyond === 1 ? [plain('One build is ')] : [figure(formatFigure(beyond)), plain(' builds are ')]),
      strong('beyond allowances'),
      plain('.'),
      ...(failed === 0
        ? []
        : [
            plain(' '),
            figure(formatFigure(failed)),
            plain(failed === 1 ? ' build or run failed.' : ' builds or runs failed.'),
          ]),
      ...rest,
    ];
  }
  if (failed > 0)
    return [
      plain(failed === 1 ? 'One build or run failed' : `${formatFigure(failed)} builds or runs failed`),
      plain('; no build is beyond allowances.'),
      ...rest,
    ];
  if (withoutReference > 0)
    return [
      plain(
        withoutReference === 1
          ? 'Nothing is beyond allowances. One suite waits for its first reference results.'
          : `Nothing is beyond allowances. ${formatFigure(withoutReference)} suites wait for their first reference results.`,
      ),
      ...rest,
    ];
  return running > 0
    ? [plain('Nothing waits for you.'), ...rest]
    : [plain('Nothing waits for you: no build is beyond allowances, and none failed.')];
}
