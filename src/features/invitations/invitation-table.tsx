import type { InvitationView } from '../../../shared/schemas/invitations.ts';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { sentenceOf } from '../../lib/check-form.ts';
import { formatShortDate } from '../../lib/format.ts';
import { useResendInvitation, useRevokeInvitation } from './invitations.queries.ts';

/** Invitations with what became of them. */
export function InvitationTable({
  library,
  invitations,
}: {
  library: string;
  invitations: readonly InvitationView[];
}) {
  const resend = useResendInvitation(library);
  const revoke = useRevokeInvitation(library);
  const isBusy = resend.isPending || revoke.isPending;
  return (
    <>
      <table className="table stack">
        <thead>
          <tr>
            <th scope="col">invited</th>
            <th scope="col">as</th>
            <th scope="col">by</th>
            <th scope="col">state</th>
            <th scope="col">
              <span className="sr-only">actions</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {invitations.map((one) => (
            <tr key={one.id}>
              <th scope="row" className="wrap-anywhere">
                {one.email}
              </th>
              <td>{one.role}</td>
              <td className="text-ink-2" data-label="by">
                {one.createdBy}, {formatShortDate(one.createdAt)}
              </td>
              <td className={one.state === 'open' ? '' : 'text-ink-3'}>
                {one.state}
                {one.state === 'open' && (
                  <span className="text-ink-3"> until {formatShortDate(one.expiresAt)}</span>
                )}
              </td>
              <td className="r max-wide:text-left">
                <span className="inline-flex flex-wrap gap-x-4">
                  {(one.state === 'open' || one.state === 'expired') && (
                    <TextAction
                      disabled={isBusy}
                      aria-label={`Send again, to ${one.email}`}
                      onClick={() => resend.mutate(one.id)}
                    >
                      Send again
                    </TextAction>
                  )}
                  {one.state === 'open' && (
                    <TextAction
                      disabled={isBusy}
                      aria-label={`Revoke the invitation of ${one.email}`}
                      onClick={() => revoke.mutate(one.id)}
                    >
                      Revoke
                    </TextAction>
                  )}
                </span>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <div className="pt-2">
        <FormAlert>{sentenceOf(resend.error) ?? sentenceOf(revoke.error)}</FormAlert>
        <p role="status" className="text-note text-ink-3">
          {resend.isSuccess && `Sent again to ${resend.data.email}; the link before is no longer good.`}
        </p>
      </div>
    </>
  );
}
