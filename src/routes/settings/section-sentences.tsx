import { useQuery } from '@tanstack/react-query';
import { roles } from '../../../shared/permissions.ts';
import type { LibraryView } from '../../../shared/schemas/libraries.ts';
import type { MemberView } from '../../../shared/schemas/members.ts';
import { allowancesQuery } from '../../features/libraries/libraries.queries.ts';
import { membersQuery } from '../../features/members/members.queries.ts';
import { tokensQuery } from '../../features/tokens/tokens.queries.ts';
import { allowanceSummary } from '../../lib/allowance-words.ts';
import { formatCount } from '../../lib/format.ts';

/** `1 maintainer, 2 contributors`, the most trusted first; roles that nobody has are left out. */
export function roleCounts(members: readonly Pick<MemberView, 'role'>[]): string {
  return roles
    .toReversed()
    .map((role) => ({ role, count: members.filter((member) => member.role === role).length }))
    .filter(({ count }) => count > 0)
    .map(({ role, count }) => formatCount(count, role))
    .join(', ');
}

export interface SentenceProps {
  library: LibraryView;
}

export function LibrarySentence({ library }: SentenceProps) {
  return (
    <>
      <b>{library.name}</b> is {library.visibility}:{' '}
      {library.visibility === 'public'
        ? 'everyone who is signed in can read it.'
        : 'it is there for its members only.'}
    </>
  );
}

export function MembersSentence({ library }: SentenceProps) {
  const { data } = useQuery(membersQuery(library.slug));
  if (data === undefined) return `Who works on ${library.name}, and what each may do.`;
  if (data.length === 0) return `Nobody works on ${library.name} yet.`;
  return `${formatCount(data.length, 'person', 'people')} ${data.length === 1 ? 'works' : 'work'} on ${library.name}: ${roleCounts(data)}.`;
}

export function TokensSentence({ library }: SentenceProps) {
  const { data } = useQuery(tokensQuery(library.slug));
  if (data === undefined) return `Which programs work for ${library.name}.`;
  const good = data.filter((token) => token.state === 'good');
  if (good.length === 0) return `No program works for ${library.name}: there is no token that is good.`;
  const unused = good.filter((token) => token.lastUsedAt === null).length;
  const never =
    unused === 0 ? '' : `, ${unused === good.length ? 'none of them' : `${unused} of them not`} used yet`;
  return `${formatCount(good.length, 'token')} ${good.length === 1 ? 'is' : 'are'} good${good.length === 1 && unused === 1 ? ', not used yet' : never}.`;
}

export function AllowancesSentence({ library }: SentenceProps) {
  const { data } = useQuery(allowancesQuery(library.slug));
  if (data === undefined) return 'What the team tolerates.';
  const { base, solvers, traits } = data.allowances;
  const exceptions = Object.keys(solvers).length + Object.keys(traits).length;
  const summary = allowanceSummary(data.number, base);
  return exceptions === 0 ? summary : `${summary} ${formatCount(exceptions, 'exception')} besides.`;
}
