import { z } from 'zod';
import { roles } from '../permissions.ts';

export const setRoleBody = z.strictObject({ role: z.enum(roles) });

export const memberView = z.strictObject({
  person: z.string(),
  name: z.string(),
  /** Null for those who do not decide who is a member. */
  email: z.string().nullable(),
  role: z.enum(roles),
  isDisabled: z.boolean(),
  since: z.iso.datetime(),
});
export type MemberView = z.infer<typeof memberView>;
export const memberList = z.strictObject({ items: z.array(memberView) });
