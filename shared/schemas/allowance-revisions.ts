import { z } from 'zod';
import { allowanceSet } from './allowances.ts';
import { pageOf } from './paging.ts';

export const setAllowancesBody = z.strictObject({
  allowances: allowanceSet,
  reason: z.string().trim().min(1).max(2000),
  /** The revision that the author looked at; a newer one in between is a conflict. 0 where there was none. */
  basedOn: z.int().min(0),
});
export type SetAllowancesBody = z.input<typeof setAllowancesBody>;

/** Number 0 is the product's own default, which holds until a library sets its own. */
export const allowanceRevisionView = z.strictObject({
  library: z.string(),
  number: z.int().min(0),
  allowances: allowanceSet,
  reason: z.string(),
  createdAt: z.iso.datetime().nullable(),
  createdBy: z.string().nullable(),
});
export type AllowanceRevisionView = z.infer<typeof allowanceRevisionView>;
export const allowanceRevisionPage = pageOf(allowanceRevisionView);
