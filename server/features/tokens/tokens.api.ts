import { madeTokenView, makeTokenBody, tokenList } from '../../../shared/schemas/tokens.ts';
import { type ApiEntry, created, empty, named, ok } from '../../openapi/entry.ts';

const chapter = 'Tokens';
const refusals = ['invalid', 'unauthenticated', 'forbidden', 'not_found'] as const;

export const tokensApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/libraries/:library/tokens',
    chapter,
    summary: 'Lists the tokens of a library, newest first, without what they are made of.',
    answers: [ok(named('TokenList', tokenList))],
    problems: refusals,
  },
  {
    method: 'post',
    path: '/libraries/:library/tokens',
    chapter,
    summary: 'Makes a token for a program, which sends it as “Authorization: Bearer …”.',
    body: named('MakeToken', makeTokenBody),
    answers: [created(named('MadeToken', madeTokenView), 'The token; it is shown this once.')],
    problems: refusals,
  },
  {
    method: 'delete',
    path: '/libraries/:library/tokens/:token',
    chapter,
    summary: 'Revokes a token, at once.',
    answers: [empty()],
    problems: refusals,
  },
];
