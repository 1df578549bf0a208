import { z } from 'zod';

/** An adapter kit: files to copy into the repository of a library. */
export const kitView = z.strictObject({
  /** Name of the language or platform, as in its address. */
  name: z.string(),
  /** First heading of its README. */
  title: z.string(),
  /** Paths of its files, in order. */
  files: z.array(z.string()),
  /** Size of the archive. */
  bytes: z.int().min(1),
});
export type KitView = z.infer<typeof kitView>;
export const kitList = z.strictObject({ items: z.array(kitView) });
