import { z } from 'zod';

export const problemCodes = [
  'invalid',
  'unauthenticated',
  'forbidden',
  'not_found',
  'conflict',
  'gone',
  'too_large',
  'unprocessable',
  'too_many',
  'internal',
  'unavailable',
] as const;

/** One thing that is wrong in an input; line and column from 1. */
export const issue = z.object({
  path: z.string().optional(),
  line: z.int().optional(),
  column: z.int().optional(),
  message: z.string(),
});

/** Problem details (RFC 9457) as every error answer carries them. */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  code: z.enum(problemCodes),
  requestId: z.string(),
  issues: z.array(issue).optional(),
});
export type Problem = z.infer<typeof problem>;
