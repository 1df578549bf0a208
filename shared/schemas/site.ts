import { z } from 'zod';
import { environment } from './measurement.ts';
import { pageOf, pageQuery } from './paging.ts';

/** Who may make an account: anyone who proves an address, or only who has been invited to a library. */
export const signUpRules = ['open', 'invited'] as const;

/** What is told to everyone, before they sign in. */
export const aboutView = z.strictObject({
  name: z.literal('Tallyroot'),
  signUp: z.enum(signUpRules),
  hasDemo: z.boolean(),
  /** Where the pages of the local mail catcher are, in the demo. */
  mailCatcher: z.string().nullable(),
  /** Where and with what this server measures; null for those who are not signed in. */
  environment: environment.nullable(),
});
export type AboutView = z.infer<typeof aboutView>;

export const mailStates = ['waiting', 'sent', 'given up'] as const;
export const outboxQuery = pageQuery.extend({ state: z.enum(mailStates).optional() });
export type OutboxQuery = z.infer<typeof outboxQuery>;

/** A mail without its text, which can hold a link that is a secret. */
export const outboxMailView = z.strictObject({
  id: z.int().min(1),
  to: z.string(),
  subject: z.string(),
  state: z.enum(mailStates),
  attempts: z.int().min(0),
  error: z.string().nullable(),
  createdAt: z.iso.datetime(),
  /** When it is tried next; null for those that are not. */
  nextAt: z.iso.datetime().nullable(),
  sentAt: z.iso.datetime().nullable(),
});
export type OutboxMailView = z.infer<typeof outboxMailView>;
export const outboxPage = pageOf(outboxMailView);
