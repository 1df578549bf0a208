import { z } from 'zod';
import {
  emailBody,
  resetPasswordBody,
  signInBody,
  signUpBody,
  verifyEmailBody,
} from '../../shared/schemas/people.ts';
import { type ApiEntry, empty, named } from '../openapi/entry.ts';

const chapter = 'Signing in';
const email = named('Email', emailBody);
const signUpResult = named('SignUpResult', z.strictObject({ isSignedIn: z.boolean() }));
const sent = {
  status: 202,
  meaning: 'If there is such an account, a mail is on its way; the answer is the same if there is none.',
  body: named('MailSent', z.strictObject({ isSent: z.literal(true) })),
};

export const authApi: readonly ApiEntry[] = [
  {
    method: 'post',
    path: '/auth/sign-in/email',
    chapter,
    summary: 'Signs in with address and password; the session is in a cookie.',
    body: named('SignIn', signInBody),
    answers: [empty('Signed in.')],
    problems: ['invalid', 'unauthenticated', 'forbidden', 'too_many'],
  },
  {
    method: 'post',
    path: '/auth/sign-up/email',
    chapter,
    summary: 'Makes an account.',
    about: 'With what an invitation’s link carries, the address is proved and the invitation accepted.',
    body: named('SignUp', signUpBody),
    answers: [
      { status: 201, meaning: 'Signed in, and a member of the library.', body: signUpResult },
      {
        status: 202,
        meaning: 'A mail is on its way; the same for an address that is known.',
        body: signUpResult,
      },
    ],
    problems: ['invalid', 'forbidden', 'conflict', 'gone', 'too_many'],
  },
  {
    method: 'post',
    path: '/auth/sign-out',
    chapter,
    summary: 'Ends the session.',
    answers: [empty('Signed out.')],
    problems: [],
  },
  {
    method: 'post',
    path: '/auth/request-password-reset',
    chapter,
    summary: 'Asks for a mail with a link to a new password.',
    body: email,
    answers: [sent],
    problems: ['invalid', 'too_many'],
  },
  {
    method: 'post',
    path: '/auth/reset-password',
    chapter,
    summary: 'Sets a new password with what the mail’s link carries; ends every session.',
    body: named('ResetPassword', resetPasswordBody),
    answers: [empty('The password is the new one.')],
    problems: ['invalid', 'gone', 'too_many'],
  },
  {
    method: 'post',
    path: '/auth/send-verification-email',
    chapter,
    summary: 'Asks once more for the mail that confirms an address.',
    body: email,
    answers: [sent],
    problems: ['invalid', 'too_many'],
  },
  {
    method: 'post',
    path: '/auth/verify-email',
    chapter,
    summary: 'Confirms an address with what the mail’s link carries.',
    body: named('VerifyEmail', verifyEmailBody),
    answers: [empty('The address is confirmed.')],
    problems: ['invalid', 'gone', 'too_many'],
  },
];
