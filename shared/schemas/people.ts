import { z } from 'zod';
import { roles, visibilities } from '../permissions.ts';
import { pageOf, pageQuery } from './paging.ts';

/** Addresses are compared in lower case. */
export const emailAddress = z
  .email()
  .max(254)
  .transform((text) => text.toLowerCase());
export const personName = z.string().trim().min(1).max(100);
/** Long enough to be hard to guess; no rules about kinds of characters, which only make them predictable. */
export const newPassword = z.string().min(10, 'at least 10 characters').max(128);
/** What a mail's link or the server's start carries. */
const secretText = z.string().min(1).max(2000);

export const signInBody = z.strictObject({ email: emailAddress, password: z.string().min(1).max(128) });
export const signUpBody = z.strictObject({
  name: personName,
  email: emailAddress,
  password: newPassword,
  /** From the link of an invitation: it proves the address, so that no mail has to. */
  invitation: secretText.optional(),
});
export type SignUpBody = z.infer<typeof signUpBody>;
export const emailBody = z.strictObject({ email: emailAddress });
export const resetPasswordBody = z.strictObject({ token: secretText, password: newPassword });
export const verifyEmailBody = z.strictObject({ token: secretText });
export const changePasswordBody = z.strictObject({ current: z.string().min(1).max(128), next: newPassword });
export const changeAccountBody = z.strictObject({ name: personName });

export const setUpBody = z.strictObject({
  /** Printed by the server when it starts. */
  code: secretText,
  name: personName,
  email: emailAddress,
  password: newPassword,
});
export const setUpView = z.strictObject({ isOpen: z.boolean() });

export const membershipView = z.strictObject({
  library: z.string(),
  name: z.string(),
  visibility: z.enum(visibilities),
  role: z.enum(roles),
});

/** Who makes the request, with everything that `mayDo` wants to know; `person` is null when signed out. */
export const meView = z.strictObject({
  person: z
    .strictObject({
      id: z.string(),
      name: z.string(),
      email: z.string(),
      isAdmin: z.boolean(),
      isDemo: z.boolean(),
      memberships: z.array(membershipView),
    })
    .nullable(),
});
export type MeView = z.infer<typeof meView>;

/** A place where the person is signed in. */
export const sessionView = z.strictObject({
  id: z.string(),
  isCurrent: z.boolean(),
  createdAt: z.iso.datetime(),
  expiresAt: z.iso.datetime(),
  address: z.string().nullable(),
  userAgent: z.string().nullable(),
});
export type SessionView = z.infer<typeof sessionView>;
export const sessionList = z.strictObject({ items: z.array(sessionView) });

/** `text` is looked for in names and addresses. */
export const peopleQuery = pageQuery.extend({ text: z.string().max(200).optional() });
export type PeopleQuery = z.infer<typeof peopleQuery>;
export const changePersonBody = z
  .strictObject({ isAdmin: z.boolean().optional(), isDisabled: z.boolean().optional() })
  .refine((body) => body.isAdmin !== undefined || body.isDisabled !== undefined, {
    message: 'give isAdmin, isDisabled or both',
  });
export type ChangePersonBody = z.infer<typeof changePersonBody>;
export const personView = z.strictObject({
  id: z.string(),
  name: z.string(),
  email: z.string(),
  isVerified: z.boolean(),
  isAdmin: z.boolean(),
  isDemo: z.boolean(),
  disabledAt: z.iso.datetime().nullable(),
  createdAt: z.iso.datetime(),
  libraryCount: z.int().min(0),
});
export type PersonView = z.infer<typeof personView>;
export const peoplePage = pageOf(personView);

export const demoPersonView = z.strictObject({
  id: z.string(),
  name: z.string(),
  isAdmin: z.boolean(),
  /** In the demo's library. */
  role: z.enum(roles).nullable(),
  library: z.string().nullable(),
});
export const demoPeopleList = z.strictObject({ items: z.array(demoPersonView) });
export type DemoPersonView = z.infer<typeof demoPersonView>;
export const demoSignInBody = z.strictObject({ person: z.string().min(1).max(100) });
