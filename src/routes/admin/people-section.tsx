import { useInfiniteQuery } from '@tanstack/react-query';
import { Entry } from '../../components/sheet/entry.tsx';
import { Button } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { peopleQuery } from '../../features/people/people.queries.ts';
import { PeopleTable } from '../../features/people/people-table.tsx';
import { usePerson } from '../../features/session/use-may.ts';
import { useViewState } from '../../lib/use-view-state.ts';

/** Everyone who has an account. */
export function PeopleSection() {
  const view = useViewState();
  const text = view.get('text');
  const query = useInfiniteQuery(peopleQuery(text));
  const person = usePerson();
  return (
    <Entry
      title="People"
      note={
        <>
          <p>
            Accounts are never deleted: what people did keeps their name. One that is disabled cannot sign in.
          </p>
          <p>Roles are given in a library’s settings, under members.</p>
        </>
      }
    >
      <div className="pb-4">
        <Field
          label="Name or address"
          type="search"
          value={text}
          onChange={(event) => view.set({ text: event.target.value })}
          className="w-[18em] max-w-full"
        />
      </div>
      <QueryState
        query={query}
        what="the people"
        isEmpty={(data) => data.pages[0]?.items.length === 0}
        empty={
          <StateNote title="Nobody has that in their name or address">Try a shorter part of it.</StateNote>
        }
      >
        {({ pages }) => <PeopleTable people={pages.flatMap((page) => page.items)} ownId={person?.id ?? ''} />}
      </QueryState>
      {query.hasNextPage && (
        <div className="pt-3">
          <Button disabled={query.isFetchingNextPage} onClick={() => void query.fetchNextPage()}>
            Read more
          </Button>
        </div>
      )}
    </Entry>
  );
}
