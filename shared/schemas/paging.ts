import { z } from 'zod';

/** Query parameters that every list takes. `cursor` is opaque: what the previous page gave as `next`. */
export const pageQuery = z.strictObject({
  limit: z.coerce.number().int().min(1).max(500).default(50),
  cursor: z.string().max(1000).optional(),
});
export type PageQuery = z.infer<typeof pageQuery>;

/** One page of a list; `next` is null on the last page. */
export function pageOf<Item extends z.ZodType>(item: Item) {
  return z.strictObject({ items: z.array(item), next: z.string().nullable() });
}

export interface Page<Item> {
  items: Item[];
  next: string | null;
}

/** A row's number in a URL or a body. */
export const rowId = z.coerce.number().int().min(1).max(Number.MAX_SAFE_INTEGER);

/** Short names in addresses: libraries and suites. */
export const slug = z
  .string()
  .regex(/^[a-z0-9](?:[a-z0-9-]{0,62}[a-z0-9])?$/, 'lower-case letters, digits and hyphens (64 at most)');

/** True and false in a query string. */
export const queryBoolean = z.enum(['true', 'false']).transform((text) => text === 'true');
