import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Ask } from '../../components/ui/ask.tsx';
import { Button } from '../../components/ui/button.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { placesQuery, useEndSession, useSignOutEverywhere } from '../../features/people/people.queries.ts';
import { leaveByTheDoor } from '../../features/session/session.queries.ts';
import { browserWords } from '../../lib/browser-words.ts';
import { sentenceOf } from '../../lib/check-form.ts';
import { formatDateTime, formatShortDate } from '../../lib/format.ts';

/** Where one is signed in, and how to end it. */
export function Places() {
  const query = useQuery(placesQuery);
  const end = useEndSession();
  const endAll = useSignOutEverywhere();
  const [isAsked, setIsAsked] = useState(false);
  return (
    <QueryState query={query} what="where you are signed in">
      {(places) => (
        <>
          <table className="table stack">
            <thead>
              <tr>
                <th scope="col">browser</th>
                <th scope="col">address</th>
                <th scope="col">signed in</th>
                <th scope="col">until</th>
                <th scope="col">
                  <span className="sr-only">end</span>
                </th>
              </tr>
            </thead>
            <tbody>
              {places.map((place) => (
                <tr key={place.id}>
                  <th scope="row">
                    {browserWords(place.userAgent)}
                    {place.isCurrent && <span className="font-normal text-ink-3">, here</span>}
                  </th>
                  <td className="fig">{place.address ?? '–'}</td>
                  <td className="text-ink-2" data-label="signed in">
                    {formatDateTime(place.createdAt)}
                  </td>
                  <td className="text-ink-2" data-label="until">
                    {formatShortDate(place.expiresAt)}
                  </td>
                  <td className="r max-wide:text-left">
                    {!place.isCurrent && (
                      <TextAction disabled={end.isPending} onClick={() => end.mutate(place.id)}>
                        End it
                        <span className="sr-only">
                          : {browserWords(place.userAgent)}, {formatDateTime(place.createdAt)}
                        </span>
                      </TextAction>
                    )}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
          <div className="grid gap-3 pt-3">
            <FormAlert>{sentenceOf(end.error)}</FormAlert>
            {isAsked ? (
              <Ask
                question="Sign out everywhere, here too?"
                word="Sign out everywhere"
                isBusy={endAll.isPending}
                problem={sentenceOf(endAll.error)}
                onYes={() => endAll.mutate(undefined, { onSuccess: leaveByTheDoor })}
                onNo={() => setIsAsked(false)}
              />
            ) : (
              <div>
                <Button onClick={() => setIsAsked(true)}>Sign out everywhere</Button>
              </div>
            )}
          </div>
        </>
      )}
    </QueryState>
  );
}
