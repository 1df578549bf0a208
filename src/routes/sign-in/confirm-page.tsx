import { useLocation } from 'react-router';
import { Button, ButtonLink } from '../../components/ui/button.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { useConfirmAddress } from '../../features/session/session.queries.ts';
import { readToken } from '../../features/session/way-back.ts';
import { sentenceOf } from '../../lib/check-form.ts';
import { paths } from '../../paths.ts';
import { Door } from './door.tsx';
import { LinkIncomplete } from './link-incomplete.tsx';

/** Confirms an address by a press, not by opening: mail programs open links to look at them. */
export function ConfirmPage() {
  const token = readToken(useLocation().hash);
  const confirm = useConfirmAddress();
  return (
    <Door
      title="Confirm your address"
      notes={['The link is good for a day.']}
      heading="Is this address yours?"
    >
      {token === null ? (
        <LinkIncomplete>Signing in sends another mail.</LinkIncomplete>
      ) : confirm.isSuccess ? (
        <StateNote
          title="The address is confirmed"
          actions={<ButtonLink to={paths.signIn()}>Sign in</ButtonLink>}
        >
          You can sign in now.
        </StateNote>
      ) : (
        <>
          <div className="mb-4.5">
            <FormAlert>{sentenceOf(confirm.error)}</FormAlert>
          </div>
          <Button isMain disabled={confirm.isPending} onClick={() => confirm.mutate(token)}>
            Confirm it
          </Button>
        </>
      )}
    </Door>
  );
}
