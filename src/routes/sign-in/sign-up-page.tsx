import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate } from 'react-router';
import { StateNote } from '../../components/ui/state-note.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { aboutQuery, useAskForConfirmation } from '../../features/session/session.queries.ts';
import { sentenceOf } from '../../lib/check-form.ts';
import { paths } from '../../paths.ts';
import { Door } from './door.tsx';
import { SignUpForm } from './sign-up-form.tsx';

function MailSent({ email }: { email: string }) {
  const again = useAskForConfirmation();
  return (
    <StateNote
      title="A mail is on its way"
      actions={
        <TextAction disabled={again.isPending} onClick={() => again.mutate(email)}>
          Send it again
        </TextAction>
      }
    >
      Open the link in the mail to <b>{email}</b> within a day; then sign in.
      {again.isSuccess && ' Another one is on its way.'}
      {again.error !== null && ` ${sentenceOf(again.error)}`}
    </StateNote>
  );
}

/** An account without an invitation, where the site lets everyone in who proves an address. */
export function SignUpPage() {
  const about = useQuery(aboutQuery);
  const navigate = useNavigate();
  const [sentTo, setSentTo] = useState<string | null>(null);
  const isClosed = about.data?.signUp === 'invited';
  return (
    <Door
      title="Make an account"
      notes={[
        <>
          Have one already? <Link to={paths.signIn()}>Sign in</Link>.
        </>,
      ]}
      heading={isClosed ? 'Accounts here are for people who have been invited.' : 'Make an account.'}
    >
      {isClosed ? (
        <p className="text-ink-2">
          Ask a maintainer of the library for an invitation; it comes by mail, and its link leads to an
          account.
        </p>
      ) : sentTo === null ? (
        <SignUpForm
          onDone={({ isSignedIn, email }) => {
            if (isSignedIn) void navigate(paths.home(), { replace: true });
            else setSentTo(email);
          }}
        />
      ) : (
        <MailSent email={sentTo} />
      )}
    </Door>
  );
}
