import { useQuery } from '@tanstack/react-query';
import type { LibraryView } from '../../../shared/schemas/libraries.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { InvitationTable } from '../../features/invitations/invitation-table.tsx';
import { invitationsQuery } from '../../features/invitations/invitations.queries.ts';
import { InviteForm } from '../../features/invitations/invite-form.tsx';
import { MemberTable } from '../../features/members/member-table.tsx';
import { membersQuery } from '../../features/members/members.queries.ts';
import { useMay, usePerson } from '../../features/session/use-may.ts';

function Invitations({ library }: { library: LibraryView }) {
  const query = useQuery(invitationsQuery(library.slug));
  return (
    <>
      <Entry
        title="Invite"
        note="The mail has a link that is good for seven days, and for that address alone. Whoever has no account makes one there."
      >
        <InviteForm library={library.slug} />
      </Entry>
      <Entry title="Invitations" note="Sending one again makes a new link; the one before is no longer good.">
        <QueryState
          query={query}
          what="the invitations"
          isEmpty={(list) => list.length === 0}
          empty={
            <StateNote title="Nobody has been invited yet">Those whom you invite are listed here.</StateNote>
          }
        >
          {(list) => <InvitationTable library={library.slug} invitations={list} />}
        </QueryState>
      </Entry>
    </>
  );
}

/** Who belongs to the library, and who is to. */
export function MembersSection({ library }: { library: LibraryView }) {
  const may = useMay();
  const person = usePerson();
  const query = useQuery(membersQuery(library.slug));
  const canEdit = may('members.edit', library);
  return (
    <>
      <Entry
        title="Members"
        note={
          <>
            <p>
              Contributors register builds and propose. Reviewers also accept results of others. Maintainers
              decide on all of it.
            </p>
            {!canEdit && <p>Maintainers change who is one.</p>}
          </>
        }
      >
        <QueryState
          query={query}
          what="the members"
          isEmpty={(list) => list.length === 0}
          empty={
            <StateNote title="No member yet">
              {canEdit ? 'Invite somebody below.' : 'An admin of the site can make somebody a member.'}
            </StateNote>
          }
        >
          {(list) => (
            <MemberTable library={library.slug} members={list} canEdit={canEdit} ownId={person?.id ?? ''} />
          )}
        </QueryState>
      </Entry>
      {canEdit && <Invitations library={library} />}
    </>
  );
}
