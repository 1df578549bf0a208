import { DigitStrip, stripHeight } from './digit-strip.tsx';
import type { StripInput } from './strip-layout.ts';
import { describePair } from './strip-words.ts';

export interface StripPairProps {
  reference: StripInput | null;
  candidate: StripInput | null;
  pitch?: 10 | 8 | 7;
  /** No certified root: words stand instead of both strips. */
  words?: string | null;
}

/** Reference above, candidate below, on one scale and without a gap, so that the guides join. */
export function StripPair({ reference, candidate, pitch = 10, words = null }: StripPairProps) {
  if (words !== null) return <span className="text-header text-ink-3">{words}</span>;
  const hole = <div style={{ height: stripHeight }} />;
  return (
    <div role="img" aria-label={describePair(reference, candidate)}>
      {reference === null ? hole : <DigitStrip strip={reference} pitch={pitch} isReference isSilent />}
      {candidate === null ? hole : <DigitStrip strip={candidate} pitch={pitch} isSilent />}
    </div>
  );
}
