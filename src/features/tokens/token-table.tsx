import { useState } from 'react';
import type { TokenView } from '../../../shared/schemas/tokens.ts';
import { Ask } from '../../components/ui/ask.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { sentenceOf } from '../../lib/check-form.ts';
import { formatDateTime, formatShortDate } from '../../lib/format.ts';
import { scopeWords } from './scope-words.ts';
import { useRevokeToken } from './tokens.queries.ts';

/** Tokens, what each is good for, and when it was used last. */
export function TokenTable({ library, tokens }: { library: string; tokens: readonly TokenView[] }) {
  const revoke = useRevokeToken(library);
  const [asked, setAsked] = useState<number | null>(null);
  const going = tokens.find((token) => token.id === asked);
  return (
    <>
      <table className="table stack">
        <thead>
          <tr>
            <th scope="col">token</th>
            <th scope="col">may</th>
            <th scope="col">made</th>
            <th scope="col">used last</th>
            <th scope="col">state</th>
            <th scope="col">
              <span className="sr-only">revoke</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {tokens.map((token) => (
            <tr key={token.id}>
              <th scope="row">
                {token.name}
                <code className="block text-figure font-normal text-ink-3">{token.prefix}…</code>
              </th>
              <td className="text-ink-2">{token.scopes.map((scope) => scopeWords[scope]).join(', ')}</td>
              <td className="text-ink-2" data-label="made">
                {formatShortDate(token.createdAt)}, {token.createdBy}
              </td>
              <td className="text-ink-2" data-label="used last">
                {token.lastUsedAt === null ? 'never' : formatDateTime(token.lastUsedAt)}
              </td>
              <td className={token.state === 'good' ? '' : 'text-ink-3'}>
                {token.state}
                {token.state === 'good' && (
                  <span className="text-ink-3">
                    {token.expiresAt === null
                      ? ' until it is revoked'
                      : ` until ${formatShortDate(token.expiresAt)}`}
                  </span>
                )}
              </td>
              <td className="r max-wide:text-left">
                {token.state !== 'revoked' && (
                  <TextAction aria-label={`Revoke ${token.name}`} onClick={() => setAsked(token.id)}>
                    Revoke
                  </TextAction>
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {going !== undefined && (
        <div className="pt-3">
          <Ask
            question={
              <>
                Revoke <b>{going.name}</b>? What uses it is refused from then on; it cannot be taken back.
              </>
            }
            word="Revoke it"
            isBusy={revoke.isPending}
            problem={sentenceOf(revoke.error)}
            onYes={() => revoke.mutate(going.id, { onSuccess: () => setAsked(null) })}
            onNo={() => {
              revoke.reset();
              setAsked(null);
            }}
          />
        </div>
      )}
    </>
  );
}
