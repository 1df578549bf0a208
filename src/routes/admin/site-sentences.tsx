import { useInfiniteQuery, useQuery } from '@tanstack/react-query';
import { outboxQuery, peopleQuery } from '../../features/people/people.queries.ts';
import { runsQuery } from '../../features/runs/runs.queries.ts';
import { formatCount } from '../../lib/format.ts';

export function PeopleSentence() {
  const { data } = useInfiniteQuery(peopleQuery(''));
  const people = data?.pages.flatMap((page) => page.items);
  // Of a part of them nothing is said about all.
  if (people === undefined || data?.pages.at(-1)?.next !== null) return 'Who has an account here.';
  const admins = people.filter((person) => person.isAdmin && person.disabledAt === null).length;
  const disabled = people.filter((person) => person.disabledAt !== null).length;
  const has = people.length === 1 ? 'has' : 'have';
  return `${formatCount(people.length, 'person', 'people')} ${has} an account; ${admins === 1 ? 'one is an admin' : `${admins} are admins`}${disabled === 0 ? '' : `, ${disabled} disabled`}.`;
}

export function LanesSentence() {
  const running = useQuery(runsQuery({ status: 'running' }));
  const queued = useQuery(runsQuery({ status: 'queued' }));
  if (running.data === undefined || queued.data === undefined)
    return 'What is being measured, and with what.';
  const [run] = running.data;
  const waits = queued.data.length;
  const rest = waits === 0 ? '' : waits === 1 ? ' One waits.' : ` ${waits} wait.`;
  if (run === undefined) return waits === 0 ? 'The lanes stand still.' : `Nothing is measured yet.${rest}`;
  return `Run ${run.id} of ${run.library} has the lanes.${rest}`;
}

export function MailSentence() {
  const waiting = useInfiniteQuery(outboxQuery('waiting'));
  const givenUp = useInfiniteQuery(outboxQuery('given up'));
  const count = (query: typeof waiting): number | undefined =>
    query.data?.pages.reduce((sum, page) => sum + page.items.length, 0);
  const [waits, lost] = [count(waiting), count(givenUp)];
  if (waits === undefined || lost === undefined) return 'What was sent, and what waits.';
  if (lost > 0)
    return `${formatCount(lost, 'mail')} could not be sent and ${lost === 1 ? 'is' : 'are'} given up${waits === 0 ? '' : `; ${waits} more wait`}.`;
  return waits === 0
    ? 'No mail waits.'
    : `${formatCount(waits, 'mail')} ${waits === 1 ? 'waits' : 'wait'} to be sent.`;
}
