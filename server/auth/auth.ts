import { betterAuth } from 'better-auth';
import { drizzleAdapter } from 'better-auth/adapters/drizzle';
import { AppError } from '../../shared/errors.ts';
import type { DatabaseClient } from '../db/client.ts';
import { accounts, sessions, users, verifications } from '../db/schema/people.ts';
import type { PeopleService } from '../features/people/people.service.ts';
import type { MailService } from '../mail/mail.service.ts';
import {
  confirmAddressMail,
  hasAccountMail,
  passwordChangedMail,
  resetPasswordMail,
} from '../mail/templates.ts';
import { openSession } from './open-session.ts';

const day = 24 * 60 * 60;

export interface AuthOptions {
  client: DatabaseClient;
  people: PeopleService;
  mail: MailService;
  secret: string;
  /** Where people reach the server, for the links in mails. */
  address(): string;
  /** Whether that is by https alone, so that cookies need never travel in the clear. */
  isSecure: boolean;
}

/**
 * Passwords, sessions and what a mail's link proves. Its own handler of requests is not mounted: the routes
 * under /api/auth name what is offered, and what the package may come to offer besides stays shut.
 */
export function createAuth(options: AuthOptions) {
  const { people, mail } = options;
  // Behind the number sign: what stands there is never sent to a server, so no log has it.
  const link = (page: string, token: string) =>
    `${options.address()}/${page}#token=${encodeURIComponent(token)}`;

  return betterAuth({
    appName: 'Tallyroot',
    baseURL: 'http://localhost',
    basePath: '/api/auth',
    secret: options.secret,
    telemetry: { enabled: false },
    // It would name people's addresses.
    logger: { disabled: true },
    // The routes have limits of their own.
    rateLimit: { enabled: false },
    database: drizzleAdapter(options.client.db, {
      provider: 'sqlite',
      schema: { user: users, session: sessions, account: accounts, verification: verifications },
    }),
    user: {
      additionalFields: {
        isAdmin: { type: 'boolean', input: false, defaultValue: false },
        isDemo: { type: 'boolean', input: false, defaultValue: false },
        disabledAt: { type: 'date', input: false, required: false },
      },
    },
    emailAndPassword: {
      enabled: true,
      autoSignIn: false,
      requireEmailVerification: true,
      minPasswordLength: 10,
      maxPasswordLength: 128,
      resetPasswordTokenExpiresIn: 60 * 60,
      revokeSessionsOnPasswordReset: true,
      async sendResetPassword({ user, token }) {
        if (people.isActive(user.id))
          mail.send(user.email, resetPasswordMail(user.name, link('reset-password', token)));
      },
      async onPasswordReset({ user }) {
        people.recordPasswordReset(user);
        mail.send(user.email, passwordChangedMail(user.name));
      },
      async onExistingUserSignUp({ user }) {
        mail.send(user.email, hasAccountMail(user.name, `${options.address()}/sign-in`));
      },
    },
    emailVerification: {
      sendOnSignUp: true,
      sendOnSignIn: true,
      autoSignInAfterVerification: false,
      expiresIn: day,
      async afterEmailVerification(user) {
        people.recordAccount(user);
      },
      async sendVerificationEmail({ user, token }) {
        mail.send(user.email, confirmAddressMail(user.name, link('confirm-address', token)));
      },
    },
    verification: { storeIdentifier: 'hashed' },
    session: { expiresIn: 14 * day, updateAge: day, cookieCache: { enabled: false } },
    advanced: {
      cookiePrefix: 'tallyroot',
      useSecureCookies: options.isSecure,
      defaultCookieAttributes: { httpOnly: true, sameSite: 'lax', path: '/' },
    },
    databaseHooks: {
      session: {
        create: {
          async before({ userId }) {
            if (!people.isActive(userId))
              throw new AppError('forbidden', 'This account has been disabled; ask the admin of this site.');
          },
        },
      },
    },
    plugins: [openSession],
  });
}

export type Auth = ReturnType<typeof createAuth>;
