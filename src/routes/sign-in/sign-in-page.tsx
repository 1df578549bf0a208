import { useQuery } from '@tanstack/react-query';
import { Link, Navigate, useLocation, useNavigate } from 'react-router';
import { aboutQuery, meQuery, setUpQuery } from '../../features/session/session.queries.ts';
import { readWayBack } from '../../features/session/way-back.ts';
import { paths } from '../../paths.ts';
import { DemoPeople } from './demo-people.tsx';
import { Door } from './door.tsx';
import { DoorStrips } from './door-strips.tsx';
import { SignInForm } from './sign-in-form.tsx';

/** The way in; after it one is where one wanted to be. */
export function SignInPage() {
  const about = useQuery(aboutQuery);
  const setUp = useQuery(setUpQuery);
  const me = useQuery(meQuery);
  const navigate = useNavigate();
  const back = readWayBack(useLocation().search, paths.home());
  if (setUp.data?.isOpen === true) return <Navigate to={paths.setUp()} replace />;
  if (me.data !== undefined && me.data.person !== null) return <Navigate to={back} replace />;
  const enter = (): void => void navigate(back, { replace: true });
  const hasDemo = about.data?.hasDemo === true;
  const isOpen = about.data?.signUp === 'open';
  return (
    <Door
      title="Sign in"
      notes={[
        isOpen ? (
          <>
            Whoever proves an address has an account: <Link to={paths.signUp()}>make one</Link>.
          </>
        ) : (
          'Accounts are for people who have been invited to a library; the invitation comes by mail.'
        ),
        'What a public library has can be read by everyone who is signed in; a private one exists for its members only.',
      ]}
      heading="What did this change do to your solvers?"
      beside={<DoorStrips />}
    >
      {hasDemo && (
        <section className="mb-7" aria-label="People of the demo">
          <p className="mb-2 text-ink-2">
            This is the demo. Its people are invented; be one of them, and see what they may do.
          </p>
          <DemoPeople onEntered={enter} />
          {about.data !== undefined && about.data.mailCatcher !== null && (
            <p className="pt-2 text-note text-ink-3">
              Mails go nowhere; they are shown <a href={about.data.mailCatcher}>by the mail catcher</a>.
            </p>
          )}
        </section>
      )}
      {hasDemo && <h2 className="mb-2.5 font-semibold">With an account of your own</h2>}
      <SignInForm isMain={!hasDemo} onEntered={enter} />
    </Door>
  );
}
