import type { TextPiece } from '../../components/ui/rich-text.tsx';
import { formatCount, formatFigure } from '../../lib/format.ts';

/** A build beyond its allowances, as far as the sentence needs it. */
export interface BeyondBuild {
  what: string;
  /** Pairs that it broke. */
  broke: number;
}

export interface OverviewCounts {
  libraries: number;
  /** Newest first. */
  beyond: readonly BeyondBuild[];
  failed: number;
  running: number;
  /** Suites on which a library was run without reference results. */
  withoutReference: number;
}

const figure = (text: string): TextPiece => ({ text, figure: true });
const plain = (text: string): TextPiece => ({ text });
const strong = (text: string): TextPiece => ({ text, strong: true });

/** The gravest of them: the one that broke most; of equals the newest. */
function gravestOf(beyond: readonly BeyondBuild[]): BeyondBuild | undefined {
  return beyond.toSorted((a, b) => b.broke - a.broke)[0];
}

function beyondPieces(gravest: BeyondBuild, others: number): TextPiece[] {
  const did: TextPiece[] =
    gravest.broke === 0
      ? [plain(' is ')]
      : [plain(' broke '), figure(formatCount(gravest.broke, 'pair')), plain(' and is ')];
  const end: TextPiece[] =
    others === 0
      ? [plain('.')]
      : others === 1
        ? [plain('; so is one other build.')]
        : [plain('; so are '), figure(formatFigure(others)), plain(' other builds.')];
  return [strong(gravest.what), ...did, strong('beyond allowances'), ...end];
}

function failedPieces(failed: number): TextPiece[] {
  return failed === 1
    ? [plain('One build or run failed')]
    : [figure(formatFigure(failed)), plain(' builds or runs failed')];
}

function runningPieces(running: number): TextPiece[] {
  if (running === 0) return [];
  return [
    plain(' '),
    figure(formatCount(running, 'run')),
    plain(running === 1 ? ' is' : ' are'),
    plain(' in progress.'),
  ];
}

/** What waits for somebody, gravest first, in one sentence or two. */
export function overviewPieces(counts: OverviewCounts): TextPiece[] {
  const { libraries, beyond, failed, running, withoutReference } = counts;
  if (libraries === 0) return [plain('There is no library here for you yet.')];
  const gravest = gravestOf(beyond);
  if (gravest !== undefined)
    return [
      ...beyondPieces(gravest, beyond.length - 1),
      ...(failed === 0 ? [] : [plain(' '), ...failedPieces(failed), plain('.')]),
      ...runningPieces(running),
    ];
  if (failed > 0)
    return [...failedPieces(failed), plain('; no build is beyond allowances.'), ...runningPieces(running)];
  if (withoutReference > 0)
    return [
      plain('Nothing is beyond allowances. '),
      ...(withoutReference === 1
        ? [plain('One suite waits for its first reference results.')]
        : [figure(formatFigure(withoutReference)), plain(' suites wait for their first reference results.')]),
      ...runningPieces(running),
    ];
  return running > 0
    ? [plain('Nothing waits for you.'), ...runningPieces(running)]
    : [plain('Nothing waits for you: no build is beyond allowances, and none failed.')];
}
