import { z } from 'zod';

/** One evaluation or step of a path as a digit strip shows it. */
export const stripEvent = z.strictObject({
  kind: z.enum(['f', 'df', 'd2f', 'step']),
  /** Correct digits of its x, 0 to 17; null where x is not finite. */
  digits: z.number().nullable(),
  /** Index of the first event of the same kind at the same x, or null. */
  repeatOf: z.int().min(0).nullable(),
});
export type StripEvent = z.infer<typeof stripEvent>;

/** The strip of one solve. `events` is null where no root is certified or no path was kept. */
export const solveStrip = z.strictObject({ solve: z.int().min(1), events: z.array(stripEvent).nullable() });
export type SolveStrip = z.infer<typeof solveStrip>;
export const solveStripList = z.strictObject({ items: z.array(solveStrip) });

/** Ids of solves, separated by commas: those that a page is about to show. */
export const stripsQuery = z.strictObject({
  solves: z
    .string()
    .regex(/^\d{1,15}(,\d{1,15}){0,199}$/, 'up to 200 ids of solves, separated by commas, were expected')
    .transform((text) => [...new Set(text.split(',').map(Number))]),
});
