import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { isSuccess } from '../../../shared/numerics/judge-claim.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SolveView } from '../../../shared/schemas/runs.ts';
import { DigitStrip, stripWidth } from '../../components/digit-strip/digit-strip.tsx';
import { pictureOfStrip, type SolvePicture, wordsInsteadOfStrip } from '../../lib/strip-of-solve.ts';
import { useDrawn } from '../../lib/use-drawn.ts';
import { stripQuery } from './runs.queries.ts';

/** The picture of a stored solve; undefined while its strip is read. */
export function useSolvePicture(
  solve: SolveView | null,
  suiteCase: SuiteCase | undefined,
  isSeen: boolean,
): SolvePicture | undefined {
  const words = solve === null ? 'not there' : wordsInsteadOfStrip(solve, suiteCase);
  const query = useQuery({ ...stripQuery(solve?.id ?? 0), enabled: isSeen && words === null });
  const strip = query.data;
  return useMemo(() => {
    if (words !== null) return { kind: 'words', words };
    if (query.isError) return { kind: 'words', words: 'could not be read' };
    if (solve === null || strip === undefined) return undefined;
    return pictureOfStrip(solve, suiteCase, strip.events);
  }, [words, solve, suiteCase, strip, query.isError]);
}

export interface SolvePictureCellProps {
  solve: SolveView;
  suiteCase: SuiteCase | undefined;
  pitch: 10 | 8 | 7;
}

const isFailure = (solve: SolveView): boolean => !isSuccess(solve) && solve.outcome !== 'not applicable';

/** A strip, or the words that stand for it; an empty place of the same size while it is read. */
export function SolvePictureCell({ solve, suiteCase, pitch }: SolvePictureCellProps) {
  const [box, isSeen] = useDrawn<HTMLSpanElement>();
  const picture = useSolvePicture(solve, suiteCase, isSeen);
  return (
    <span
      ref={box}
      className="block min-h-5 min-w-0"
      style={{ minWidth: picture === undefined ? stripWidth(pitch) : 0 }}
    >
      {picture?.kind === 'strip' && (
        <DigitStrip strip={picture.strip} counts={picture.counts} pitch={pitch} />
      )}
      {picture?.kind === 'words' && (
        <span
          className={`block truncate text-header leading-5 ${isFailure(solve) ? 'text-worse' : 'text-ink-3'}`}
          title={picture.words}
        >
          {pitch < 10 ? picture.words.replace('no root here; ', '') : picture.words}
        </span>
      )}
    </span>
  );
}
