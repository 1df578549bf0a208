import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SolveView } from '../../../shared/schemas/runs.ts';
import { stripHeight } from '../../components/digit-strip/digit-strip.tsx';
import { StripPair } from '../../components/digit-strip/strip-pair.tsx';
import type { SolvePicture } from '../../lib/strip-of-solve.ts';
import { useSolvePicture } from './solve-picture.tsx';

export interface PairPictureProps {
  reference: SolveView | null;
  candidate: SolveView | null;
  suiteCase: SuiteCase | undefined;
}

const stripOf = (picture: SolvePicture | undefined) => (picture?.kind === 'strip' ? picture.strip : null);

/** Both strips of a pair, the reference above; words where the case has no root. */
export function PairPicture({ reference, candidate, suiteCase }: PairPictureProps) {
  const above = useSolvePicture(reference, suiteCase);
  const below = useSolvePicture(candidate, suiteCase);
  if (above === undefined || below === undefined) return <div style={{ height: 2 * stripHeight }} />;
  const hasStrip = above.kind === 'strip' || below.kind === 'strip';
  const words = below.kind === 'words' ? below.words : above.kind === 'words' ? above.words : null;
  return <StripPair reference={stripOf(above)} candidate={stripOf(below)} words={hasStrip ? null : words} />;
}
