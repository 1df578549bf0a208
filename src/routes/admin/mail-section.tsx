import { useInfiniteQuery, useQuery } from '@tanstack/react-query';
import { mailStates } from '../../../shared/schemas/site.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Button } from '../../components/ui/button.tsx';
import { FilterWord } from '../../components/ui/filter-word.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { outboxQuery, useRetryMail } from '../../features/people/people.queries.ts';
import { aboutQuery } from '../../features/session/session.queries.ts';
import { sentenceOf } from '../../lib/check-form.ts';
import { formatDateTime } from '../../lib/format.ts';
import { useViewState } from '../../lib/use-view-state.ts';

/** The mails that the site sent or tries to. */
export function MailSection() {
  const view = useViewState();
  const state = mailStates.find((one) => one === view.get('state'));
  const query = useInfiniteQuery(outboxQuery(state));
  const retry = useRetryMail();
  const about = useQuery(aboutQuery);
  const catcher = about.data?.mailCatcher ?? null;
  return (
    <Entry
      title="Outbox"
      note={
        <>
          <p>Newest first, without the text: its links are secrets.</p>
          {catcher !== null && (
            <p>
              In the demo mails go nowhere; <a href={catcher}>the mail catcher</a> shows them.
            </p>
          )}
        </>
      }
    >
      <div className="flex flex-wrap gap-x-3.5 pb-3">
        {mailStates.map((one) => (
          <FilterWord
            key={one}
            word={one}
            isPressed={state === one}
            onPress={() => view.set({ state: state === one ? '' : one })}
          />
        ))}
      </div>
      <FormAlert>{sentenceOf(retry.error)}</FormAlert>
      <QueryState
        query={query}
        what="the outbox"
        isEmpty={(data) => data.pages[0]?.items.length === 0}
        empty={
          <StateNote title={state === undefined ? 'No mail yet' : `No mail is in the state “${state}”`}>
            Invitations, confirmations and new passwords come by here.
          </StateNote>
        }
      >
        {({ pages }) => (
          <table className="table stack">
            <thead>
              <tr>
                <th scope="col">to</th>
                <th scope="col">subject</th>
                <th scope="col">written</th>
                <th scope="col">state</th>
                <th scope="col">
                  <span className="sr-only">actions</span>
                </th>
              </tr>
            </thead>
            <tbody>
              {pages
                .flatMap((page) => page.items)
                .map((mail) => (
                  <tr key={mail.id}>
                    <th scope="row" className="wrap-anywhere">
                      {mail.to}
                    </th>
                    <td>{mail.subject}</td>
                    <td className="text-ink-2">{formatDateTime(mail.createdAt)}</td>
                    <td>
                      {mail.state}
                      {mail.sentAt !== null && (
                        <span className="text-ink-3"> {formatDateTime(mail.sentAt)}</span>
                      )}
                      {mail.nextAt !== null && (
                        <span className="text-ink-3">
                          , try {mail.attempts + 1} at {formatDateTime(mail.nextAt)}
                        </span>
                      )}
                      {mail.error !== null && <span className="block text-worse">{mail.error}</span>}
                    </td>
                    <td className="r max-wide:text-left">
                      {mail.state !== 'sent' && (
                        <TextAction disabled={retry.isPending} onClick={() => retry.mutate(mail.id)}>
                          Send now
                          <span className="sr-only">
                            : {mail.subject}, to {mail.to}
                          </span>
                        </TextAction>
                      )}
                    </td>
                  </tr>
                ))}
            </tbody>
          </table>
        )}
      </QueryState>
      {query.hasNextPage && (
        <div className="pt-3">
          <Button disabled={query.isFetchingNextPage} onClick={() => void query.fetchNextPage()}>
            Read older ones
          </Button>
        </div>
      )}
    </Entry>
  );
}
