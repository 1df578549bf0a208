import { Link } from 'react-router';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { SchemeSwitch } from '../../components/sheet/scheme-switch.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { usePerson } from '../../features/session/use-may.ts';
import { paths } from '../../paths.ts';
import { NameForm, PasswordForm } from './account-forms.tsx';
import { Places } from './places.tsx';

/** One’s own account. */
export function AccountPage() {
  const person = usePerson();
  if (person === null) return null;
  const { memberships } = person;
  return (
    <Page title="Account" trail={[{ label: 'Account' }]}>
      <VerdictBlock
        sign="Account"
        colour="text-ink"
        sentence={
          <>
            You are <b>{person.name}</b>
            {person.isAdmin && ', an admin of this site'}.
          </>
        }
        lead={person.email}
      />
      <Entry title="Roles" note="A role belongs to a library; a maintainer there gives it.">
        {memberships.length === 0 ? (
          <StateNote title="No role yet">
            <Link to={paths.newLibrary()}>Create a library</Link>, or ask a maintainer for an invitation.
          </StateNote>
        ) : (
          <ul className="finds">
            {memberships.map((membership) => (
              <li key={membership.library}>
                <b className="font-medium">
                  <Link to={paths.library(membership.library)}>{membership.name}</Link>
                </b>
                <span>
                  {membership.role}, <span className="text-ink-3">{membership.visibility} library</span>
                </span>
              </li>
            ))}
          </ul>
        )}
      </Entry>
      <Entry
        title="Name"
        note="It stands beside what you do from now on; what is written already keeps the one of before."
      >
        <NameForm person={person} />
      </Entry>
      <Entry title="Password" note="Changing it signs you out everywhere else.">
        {person.isDemo ? (
          <StateNote title="No password">People of the demo sign in without one.</StateNote>
        ) : (
          <PasswordForm />
        )}
      </Entry>
      <Entry title="Signed in" note="Each browser is listed once for every time that it signed in.">
        <Places />
      </Entry>
      <Entry title="Colours" note="Kept in this browser.">
        <div className="border-t border-rule-strong pt-3">
          <SchemeSwitch />
        </div>
      </Entry>
    </Page>
  );
}
