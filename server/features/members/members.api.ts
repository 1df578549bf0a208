import { memberList, memberView, setRoleBody } from '../../../shared/schemas/members.ts';
import { type ApiEntry, empty, named, ok } from '../../openapi/entry.ts';

const chapter = 'Members';
const refusals = ['invalid', 'unauthenticated', 'forbidden', 'not_found'] as const;

export const membersApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/libraries/:library/members',
    chapter,
    summary: 'Lists the members of a library with their roles.',
    answers: [ok(named('MemberList', memberList))],
    problems: refusals,
  },
  {
    method: 'put',
    path: '/libraries/:library/members/:person',
    chapter,
    summary: 'Sets the role of a member.',
    about: 'Admins of the site may make a member of anyone; maintainers invite.',
    body: named('SetRole', setRoleBody),
    answers: [ok(named('Member', memberView))],
    problems: [...refusals, 'conflict'],
  },
  {
    method: 'delete',
    path: '/libraries/:library/members/:person',
    chapter,
    summary: 'Removes a member; the last maintainer stays.',
    answers: [empty()],
    problems: [...refusals, 'conflict'],
  },
  {
    method: 'post',
    path: '/libraries/:library/leave',
    chapter,
    summary: 'Ends one’s own membership; the last maintainer stays.',
    answers: [empty()],
    problems: [...refusals, 'conflict'],
  },
];
