import type { ReactNode } from 'react';
import type { Change } from '../../../shared/schemas/words.ts';

/**
 * The drawing of each change on 16 × 16, in currentColor. Seven ideas, each with its mirror image, so that the
 * shape alone tells them apart at 14 px in one colour.
 */
export const changeShapes: Record<Change, ReactNode> = {
  // A solid diamond, split, its halves shifted: the heaviest mark.
  broke: (
    <>
      <path d="M7.1 1 1.4 7l5.7 6z" fill="currentColor" />
      <path d="M8.9 3 14.6 9l-5.7 6z" fill="currentColor" />
    </>
  ),
  // The same diamond, whole and open, a seam across.
  mended: (
    <>
      <path d="M8 1.8 14.2 8 8 14.2 1.8 8z" fill="none" stroke="currentColor" strokeWidth={1.9} />
      <path d="M5 8h6" stroke="currentColor" strokeWidth={2.2} />
    </>
  ),
  // Three strokes that rise: more evaluations.
  costlier: <path d="M3 14v-4M8 14V6M13 14V1.6" stroke="currentColor" strokeWidth={2.6} />,
  // Three strokes that fall.
  cheaper: <path d="M3 14V1.6M8 14V6M13 14v-4" stroke="currentColor" strokeWidth={2.6} />,
  // An arrowhead away from the post at 16 digits.
  'less accurate': (
    <>
      <path d="M1 8 9 3.2v9.6z" fill="currentColor" />
      <path d="M14 1.5v13" stroke="currentColor" strokeWidth={2} />
    </>
  ),
  // An arrowhead up to the post.
  'more accurate': (
    <>
      <path d="M12.6 8l-9-4.8v9.6z" fill="currentColor" />
      <path d="M14 1.5v13" stroke="currentColor" strokeWidth={2} />
    </>
  ),
  // Two axes and a straight line: linear.
  'order lost': (
    <>
      <path d="M2 1.5V14h13" fill="none" stroke="currentColor" strokeWidth={1.2} />
      <path d="M4.5 3 14 11.5" stroke="currentColor" strokeWidth={2.2} />
    </>
  ),
  // The same axes and a curve that plunges: superlinear.
  'order gained': (
    <>
      <path d="M2 1.5V14h13" fill="none" stroke="currentColor" strokeWidth={1.2} />
      <path d="M4.5 3C9.4 3.2 12 5.6 12.8 12.5" fill="none" stroke="currentColor" strokeWidth={2.2} />
    </>
  ),
  // Ring, line, dot: from here to there.
  'root moved': (
    <>
      <circle cx={3.8} cy={8} r={2.6} fill="none" stroke="currentColor" strokeWidth={1.5} />
      <path d="M6.5 8H10" stroke="currentColor" strokeWidth={1.5} />
      <circle cx={12.2} cy={8} r={3.1} fill="currentColor" />
    </>
  ),
  // Two waves: nearly equal.
  drifted: (
    <path
      d="M1.2 6.2c2.2-3.6 4.6-3.6 6.8-.8s4.6 2.8 6.8-.8M1.2 12.2c2.2-3.6 4.6-3.6 6.8-.8s4.6 2.8 6.8-.8"
      fill="none"
      stroke="currentColor"
      strokeWidth={1.8}
    />
  ),
  // Two lines: equal.
  same: <path d="M2.5 6h11M2.5 10.4h11" stroke="currentColor" strokeWidth={1.6} />,
  // Only the candidate is there: dotted above, solid below.
  new: (
    <>
      <path d="M1.5 5h13" stroke="currentColor" strokeWidth={1.6} strokeDasharray="1.8 2.2" />
      <path d="M1.5 11h13" stroke="currentColor" strokeWidth={2.8} />
    </>
  ),
  // Only the reference is there: solid above, dotted below.
  gone: (
    <>
      <path d="M1.5 5h13" stroke="currentColor" strokeWidth={2.8} />
      <path d="M1.5 11h13" stroke="currentColor" strokeWidth={1.6} strokeDasharray="1.8 2.2" />
    </>
  ),
  // A zigzag: it does not repeat itself.
  unsteady: (
    <path
      d="M1.5 12 4.7 3.5 8 12.5l3.3-9 3.2 8.5"
      fill="none"
      stroke="currentColor"
      strokeWidth={1.8}
      strokeLinejoin="bevel"
    />
  ),
};
