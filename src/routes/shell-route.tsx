import { useQuery } from '@tanstack/react-query';
import { Link, Navigate, useLocation } from 'react-router';
import { BrandMark } from '../components/sheet/brand-mark.tsx';
import { Entry } from '../components/sheet/entry.tsx';
import { type NavWord, Shell } from '../components/sheet/shell.tsx';
import { QueryState } from '../components/ui/query-state.tsx';
import { type Person, personMay } from '../features/session/asker.ts';
import { PersonMenu } from '../features/session/person-menu.tsx';
import { meQuery } from '../features/session/session.queries.ts';
import { paths } from '../paths.ts';
import { CommandListRoute } from './command-list-route.tsx';
import { useServerEvents } from './use-server-events.ts';

/** The guide says how things are done here; it can be read without an account. */
function isOpenToAll(pathname: string): boolean {
  return pathname === paths.guide() || pathname.startsWith(`${paths.guide()}/`);
}

function navFor(person: Person | null): NavWord[] {
  if (person === null) return [{ to: paths.guide(), label: 'Guide' }];
  const words = [
    { to: paths.overview(), label: 'Overview' },
    { to: paths.libraries(), label: 'Libraries' },
    { to: paths.suites(), label: 'Suites' },
    { to: paths.guide(), label: 'Guide' },
  ];
  return personMay(person, 'site.people') ? [...words, { to: paths.site(), label: 'Site' }] : words;
}

function SignedInShell({ person }: { person: Person }) {
  useServerEvents();
  return (
    <Shell nav={navFor(person)} canSearch>
      <CommandListRoute person={person} />
      <PersonMenu person={person} />
    </Shell>
  );
}

/** The frame of every page. Who is not signed in goes to sign in, and comes back to where they wanted to be. */
export function ShellRoute() {
  const me = useQuery(meQuery);
  const { pathname, search, hash } = useLocation();
  if (me.data === undefined) {
    return (
      <div className="sheet">
        <div className="ledger border-b-2 border-ink pb-2.5 pt-3.5">
          <span className="flex items-center gap-[9px] text-[17px] font-medium">
            <BrandMark /> Tallyroot
          </span>
        </div>
        <main>
          <Entry title="Tallyroot">
            <QueryState<unknown> query={me} what="who is signed in">
              {() => null}
            </QueryState>
          </Entry>
        </main>
      </div>
    );
  }
  const { person } = me.data;
  if (person !== null) return <SignedInShell person={person} />;
  if (!isOpenToAll(pathname)) return <Navigate to={paths.signIn(pathname + search + hash)} replace />;
  return (
    <Shell nav={navFor(null)} canSearch={false}>
      <Link to={paths.signIn(pathname + search + hash)}>Sign in</Link>
    </Shell>
  );
}
