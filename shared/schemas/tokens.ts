import { z } from 'zod';
import { tokenScopes } from '../permissions.ts';

export const makeTokenBody = z.strictObject({
  name: z.string().trim().min(1).max(100),
  scopes: z
    .array(z.enum(tokenScopes))
    .min(1)
    .max(tokenScopes.length)
    .transform((given) => tokenScopes.filter((scope) => given.includes(scope))),
  /** Null for one that is good until it is revoked. */
  days: z.int().min(1).max(366).nullable().default(90),
});
export type MakeTokenBody = z.infer<typeof makeTokenBody>;

export const tokenStates = ['good', 'expired', 'revoked'] as const;

export const tokenView = z.strictObject({
  id: z.int().min(1),
  name: z.string(),
  /** The first characters of the token, to know it by. */
  prefix: z.string(),
  scopes: z.array(z.enum(tokenScopes)),
  state: z.enum(tokenStates),
  createdAt: z.iso.datetime(),
  createdBy: z.string(),
  expiresAt: z.iso.datetime().nullable(),
  lastUsedAt: z.iso.datetime().nullable(),
});
export type TokenView = z.infer<typeof tokenView>;
export const tokenList = z.strictObject({ items: z.array(tokenView) });

/** The only answer that holds the token itself. */
export const madeTokenView = z.strictObject({ token: z.string(), made: tokenView });
export type MadeTokenView = z.infer<typeof madeTokenView>;
