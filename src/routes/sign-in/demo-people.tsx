import { useQuery } from '@tanstack/react-query';
import type { DemoPersonView } from '../../../shared/schemas/people.ts';
import { Button } from '../../components/ui/button.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { demoPeopleQuery, useDemoSignIn } from '../../features/session/session.queries.ts';
import { sentenceOf } from '../../lib/check-form.ts';

const does: Record<string, string> = {
  maintainer: 'registers builds, sets allowances, decides who is a member',
  reviewer: 'accepts or declines new reference results',
  contributor: 'registers builds and reads what they did',
};

function whatTheyDo({ isAdmin, role }: DemoPersonView): { term: string; text: string } {
  if (role !== null) return { term: role, text: does[role] ?? '' };
  return isAdmin
    ? { term: 'site admin', text: 'people, mail, lanes and the audit log of the site' }
    : { term: 'nobody in particular', text: 'reads what is public' };
}

const order = ['maintainer', 'reviewer', 'contributor'];

function byRole(a: DemoPersonView, b: DemoPersonView): number {
  const placeOf = ({ role }: DemoPersonView): number => (role === null ? order.length : order.indexOf(role));
  return placeOf(a) - placeOf(b) || a.name.localeCompare(b.name);
}

/** The demo's invented people, one button each: no password, and nothing to make up. */
export function DemoPeople({ onEntered }: { onEntered: () => void }) {
  const query = useQuery(demoPeopleQuery);
  const signIn = useDemoSignIn();
  return (
    <QueryState
      query={query}
      what="the people of the demo"
      isEmpty={(people) => people.length === 0}
      empty={
        <StateNote title="The demo is being put in place">Its people appear here within a minute.</StateNote>
      }
    >
      {(people) => (
        <>
          <ul className="border-t border-rule-strong">
            {people.toSorted(byRole).map((person) => {
              const { term, text } = whatTheyDo(person);
              return (
                <li
                  key={person.id}
                  className="flex items-center justify-between gap-3 border-b border-rule py-[7px]"
                >
                  <span className="min-w-0">
                    <b className="font-medium">{person.name}</b>, {term}
                    <span className="block text-note text-ink-3">{text}</span>
                  </span>
                  <Button
                    disabled={signIn.isPending}
                    onClick={() => signIn.mutate(person.id, { onSuccess: onEntered })}
                  >
                    Enter
                    <span className="sr-only">
                      as {person.name}, {term}
                    </span>
                  </Button>
                </li>
              );
            })}
          </ul>
          <FormAlert>{sentenceOf(signIn.error)}</FormAlert>
        </>
      )}
    </QueryState>
  );
}
