import { z } from 'zod';
import { roles } from '../permissions.ts';
import { emailAddress } from './people.ts';

export const inviteBody = z.strictObject({ email: emailAddress, role: z.enum(roles) });
export type InviteBody = z.infer<typeof inviteBody>;

export const invitationStates = ['open', 'expired', 'accepted', 'revoked'] as const;

/** As the library's maintainers see it; what the link carries is in the mail alone. */
export const invitationView = z.strictObject({
  id: z.int().min(1),
  email: z.string(),
  role: z.enum(roles),
  state: z.enum(invitationStates),
  createdAt: z.iso.datetime(),
  createdBy: z.string(),
  expiresAt: z.iso.datetime(),
});
export type InvitationView = z.infer<typeof invitationView>;
export const invitationList = z.strictObject({ items: z.array(invitationView) });

export const invitationTokenBody = z.strictObject({ token: z.string().min(1).max(200) });

/** As the one who holds its link sees it. */
export const openInvitationView = z.strictObject({
  library: z.string(),
  name: z.string(),
  role: z.enum(roles),
  email: z.string(),
  invitedBy: z.string(),
  expiresAt: z.iso.datetime(),
  /** Whether the address has an account already, so that signing in is what is left to do. */
  hasAccount: z.boolean(),
});
export type OpenInvitationView = z.infer<typeof openInvitationView>;
