import type { Change } from '../../../shared/schemas/words.ts';

/** Colour of a change's word and mark. Blue means better, vermilion worse, plum different. */
export const changeColour: Record<Change, string> = {
  broke: 'text-worse',
  'root moved': 'text-other',
  'order lost': 'text-worse',
  'less accurate': 'text-worse',
  costlier: 'text-worse',
  unsteady: 'text-other',
  drifted: 'text-other',
  mended: 'text-better',
  'order gained': 'text-better',
  'more accurate': 'text-better',
  cheaper: 'text-better',
  new: 'text-ink',
  gone: 'text-ink',
  same: 'text-same',
};

/** One line of meaning, for the margin beside the rows. */
export const changeMeaning: Record<Change, string> = {
  broke: 'Solved by the reference, not by the candidate.',
  'root moved': 'Another root than the reference found.',
  'order lost': 'Converges at a lower order than the reference.',
  'less accurate': 'Fewer digits, by over half a digit, than the case can give.',
  costlier: 'The same root for more evaluations.',
  unsteady: 'Does not repeat itself: two runs, two paths.',
  drifted:
    'Another path at the same cost, or between two solves of which neither solved, where cost is not compared.',
  mended: 'Not solved by the reference, solved by the candidate.',
  'order gained': 'Converges at a higher order than the reference.',
  'more accurate': 'More digits, by over half a digit.',
  cheaper: 'The same root for fewer evaluations.',
  new: 'Only the candidate has it.',
  gone: 'Only the reference has it.',
  same: 'To the last bit.',
};
