import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SolveView } from '../../../shared/schemas/runs.ts';
import { stripHeight } from '../../components/digit-strip/digit-strip.tsx';
import { StripPair } from '../../components/digit-strip/strip-pair.tsx';
import type { SolvePicture } from '../../lib/strip-of-solve.ts';
import { useDrawn } from '../../lib/use-drawn.ts';
import { useSolvePicture } from './solve-picture.tsx';

export interface PairPictureProps {
  reference: SolveView | null;
  candidate: SolveView | null;
  suiteCase: SuiteCase | undefined;
}

const stripOf = (picture: SolvePicture | undefined) => (picture?.kind === 'strip' ? picture.strip : null);

/** Both strips of a pair, the reference above; words where the case has no root. */
export function PairPicture({ reference, candidate, suiteCase }: PairPictureProps) {
  const [box, isSeen] = useDrawn<HTMLDivElement>();
  const above = useSolvePicture(reference, suiteCase, isSeen);
  const below = useSolvePicture(candidate, suiteCase, isSeen);
  const isReady = above !== undefined && below !== undefined;
  const hasStrip = above?.kind === 'strip' || below?.kind === 'strip';
  const words = below?.kind === 'words' ? below.words : above?.kind === 'words' ? above.words : null;
  return (
    <div ref={box} style={{ minHeight: 2 * stripHeight }} className="flex items-center">
      {isReady && (
        <StripPair reference={stripOf(above)} candidate={stripOf(below)} words={hasStrip ? null : words} />
      )}
    </div>
  );
}
