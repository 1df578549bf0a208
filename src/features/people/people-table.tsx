import { useState } from 'react';
import type { PersonView } from '../../../shared/schemas/people.ts';
import { Ask } from '../../components/ui/ask.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { sentenceOf } from '../../lib/check-form.ts';
import { formatFigure, formatShortDate } from '../../lib/format.ts';
import { useChangePerson } from './people.queries.ts';

type Wish = { id: string; isAdmin: boolean } | { id: string; isDisabled: boolean };

function question(person: PersonView, wish: Wish): { text: string; word: string } {
  if ('isAdmin' in wish)
    return wish.isAdmin
      ? {
          text: 'sees every library, all people, mail and the log, and can make admins.',
          word: 'Make an admin',
        }
      : { text: 'keeps the roles in libraries, and is no admin any more.', word: 'No longer an admin' };
  return wish.isDisabled
    ? { text: 'is signed out everywhere at once and cannot sign in. What they did stays.', word: 'Disable' }
    : { text: 'can sign in again.', word: person.disabledAt === null ? 'Enable' : 'Enable again' };
}

/** Everyone with an account, and what an admin can do about it. */
export function PeopleTable({ people, ownId }: { people: readonly PersonView[]; ownId: string }) {
  const change = useChangePerson();
  const [wish, setWish] = useState<Wish | null>(null);
  const asked = people.find((person) => person.id === wish?.id);
  const words = asked !== undefined && wish !== null ? question(asked, wish) : null;
  return (
    <>
      <table className="table stack">
        <thead>
          <tr>
            <th scope="col">name</th>
            <th scope="col">e-mail</th>
            <th scope="col" className="r">
              libraries
            </th>
            <th scope="col">since</th>
            <th scope="col">is</th>
            <th scope="col">
              <span className="sr-only">actions</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {people.map((person) => (
            <tr key={person.id}>
              <th scope="row">
                {person.name}
                {person.id === ownId && <span className="font-normal text-ink-3">, you</span>}
              </th>
              <td className="wrap-anywhere text-ink-2">{person.email}</td>
              <td className="fig r max-wide:text-left" data-label="libraries">
                {formatFigure(person.libraryCount)}
              </td>
              <td className="text-ink-2" data-label="since">
                {formatShortDate(person.createdAt)}
              </td>
              <td>
                {[
                  person.isAdmin ? 'admin' : '',
                  person.isDemo ? 'of the demo' : '',
                  person.isVerified ? '' : 'address not confirmed',
                  person.disabledAt === null ? '' : `disabled since ${formatShortDate(person.disabledAt)}`,
                ]
                  .filter(Boolean)
                  .join(', ')}
              </td>
              <td className="r max-wide:text-left">
                <span className="inline-flex flex-wrap gap-x-4">
                  <TextAction onClick={() => setWish({ id: person.id, isAdmin: !person.isAdmin })}>
                    {person.isAdmin ? 'No longer admin' : 'Make admin'}
                    <span className="sr-only">: {person.name}</span>
                  </TextAction>
                  {person.id !== ownId && (
                    <TextAction
                      onClick={() => setWish({ id: person.id, isDisabled: person.disabledAt === null })}
                    >
                      {person.disabledAt === null ? 'Disable' : 'Enable'}
                      <span className="sr-only">: {person.name}</span>
                    </TextAction>
                  )}
                </span>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {wish !== null && asked !== undefined && words !== null && (
        <div className="pt-3">
          <Ask
            question={
              <>
                <b>{asked.name}</b> then {words.text}
              </>
            }
            word={words.word}
            isBusy={change.isPending}
            problem={sentenceOf(change.error)}
            onYes={() => change.mutate(wish, { onSuccess: () => setWish(null) })}
            onNo={() => {
              change.reset();
              setWish(null);
            }}
          />
        </div>
      )}
    </>
  );
}
