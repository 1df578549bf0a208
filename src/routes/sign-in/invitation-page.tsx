import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useLocation, useNavigate } from 'react-router';
import type { OpenInvitationView } from '../../../shared/schemas/invitations.ts';
import { Button } from '../../components/ui/button.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { openInvitationQuery, useAcceptInvitation } from '../../features/invitations/invitations.queries.ts';
import type { Person } from '../../features/session/asker.ts';
import { meQuery, useReadMeAgain, useSignOut } from '../../features/session/session.queries.ts';
import { readToken } from '../../features/session/way-back.ts';
import { sentenceOf } from '../../lib/check-form.ts';
import { formatDate } from '../../lib/format.ts';
import { paths } from '../../paths.ts';
import { Door } from './door.tsx';
import { LinkIncomplete } from './link-incomplete.tsx';
import { SignInForm } from './sign-in-form.tsx';
import { SignUpForm } from './sign-up-form.tsx';

interface AnswerProps {
  token: string;
  invitation: OpenInvitationView;
  person: Person | null;
}

/** Accepts as who one is; where that is somebody else, signs out first. */
function AcceptHere({ token, invitation, person }: AnswerProps & { person: Person }) {
  const navigate = useNavigate();
  const accept = useAcceptInvitation();
  const readMeAgain = useReadMeAgain();
  const signOut = useSignOut();
  if (person.email !== invitation.email) {
    return (
      <>
        <p className="mb-3 text-ink-2">
          It is for <b className="font-medium">{invitation.email}</b>; you are signed in as {person.name} (
          {person.email}).
        </p>
        <TextAction disabled={signOut.isPending} onClick={() => signOut.mutate()}>
          Sign out, and go on with that address
        </TextAction>
      </>
    );
  }
  return (
    <>
      <FormAlert>{sentenceOf(accept.error)}</FormAlert>
      <div className="mt-2 flex flex-wrap items-center gap-x-5.5 gap-y-2">
        <Button
          isMain
          disabled={accept.isPending}
          onClick={() =>
            accept.mutate(token, {
              onSuccess: async ({ library }) => {
                await readMeAgain();
                void navigate(paths.library(library), { replace: true });
              },
            })
          }
        >
          Accept it
        </Button>
        <Link to={paths.home()}>Not now</Link>
      </div>
    </>
  );
}

function Answer({ token, invitation, person }: AnswerProps) {
  const navigate = useNavigate();
  const [hasSaidAccount, setHasSaidAccount] = useState(invitation.hasAccount);
  if (person !== null) return <AcceptHere token={token} invitation={invitation} person={person} />;
  if (hasSaidAccount) {
    return (
      <>
        <p className="mb-4 text-ink-2">This address has an account. Sign in, then accept.</p>
        <SignInForm email={invitation.email} onEntered={() => setHasSaidAccount(true)} />
      </>
    );
  }
  return (
    <SignUpForm
      invitation={{ token, email: invitation.email }}
      onDone={() => void navigate(paths.library(invitation.library), { replace: true })}
    />
  );
}

/** What the link of an invitation leads to. */
export function InvitationPage() {
  const token = readToken(useLocation().hash);
  const query = useQuery({ ...openInvitationQuery(token ?? ''), enabled: token !== null });
  const me = useQuery(meQuery);
  const invitation = query.data;
  return (
    <Door
      title="Invitation"
      notes={
        invitation === undefined
          ? []
          : [
              `From ${invitation.invitedBy}, good until ${formatDate(invitation.expiresAt)}.`,
              `A ${invitation.role} ${roleWords[invitation.role]}`,
            ]
      }
      heading={
        invitation === undefined ? (
          'An invitation to a library.'
        ) : (
          <>
            {invitation.invitedBy} invites you to <b className="font-semibold">{invitation.name}</b>, as{' '}
            {invitation.role}.
          </>
        )
      }
    >
      {token === null ? (
        <LinkIncomplete>Ask for another invitation where it does not work.</LinkIncomplete>
      ) : (
        <QueryState query={query} what="the invitation">
          {(data) => <Answer token={token} invitation={data} person={me.data?.person ?? null} />}
        </QueryState>
      )}
    </Door>
  );
}

const roleWords: Record<OpenInvitationView['role'], string> = {
  contributor: 'registers builds, runs them, and proposes new reference results.',
  reviewer: 'does that too, and accepts or declines new reference results of others.',
  maintainer: 'does all that, and decides on members, tokens and allowances.',
};
