import { z } from 'zod';
import { runPhases, runProgress, runStatuses } from './runs.ts';

/** What the server pushes. A hint to read again, with the figures that change often. */
export const serverEvent = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('run'),
    run: z.int().min(1),
    library: z.string(),
    status: z.enum(runStatuses),
    phase: z.enum(runPhases),
    progress: runProgress,
  }),
  z.strictObject({ kind: z.literal('library'), library: z.string() }),
  z.strictObject({ kind: z.literal('build'), library: z.string(), build: z.int().min(1) }),
  z.strictObject({ kind: z.literal('suite'), suite: z.string(), revision: z.int().min(1) }),
  z.strictObject({ kind: z.literal('reference'), library: z.string(), revision: z.int().min(1) }),
  z.strictObject({ kind: z.literal('allowances'), library: z.string(), number: z.int().min(1) }),
]);
export type ServerEvent = z.infer<typeof serverEvent>;
