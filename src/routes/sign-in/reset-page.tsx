import { type FormEvent, useState } from 'react';
import { Link, useLocation } from 'react-router';
import { resetPasswordBody } from '../../../shared/schemas/people.ts';
import { Button, ButtonLink } from '../../components/ui/button.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { useResetPassword } from '../../features/session/session.queries.ts';
import { readToken } from '../../features/session/way-back.ts';
import { checkForm, sentenceOf } from '../../lib/check-form.ts';
import { paths } from '../../paths.ts';
import { Door } from './door.tsx';
import { DoorField } from './door-field.tsx';
import { doorWords } from './door-words.ts';
import { LinkIncomplete } from './link-incomplete.tsx';

/** Chooses a new password by the link of a mail. */
export function ResetPage() {
  const token = readToken(useLocation().hash);
  const reset = useResetPassword();
  const [password, setPassword] = useState('');
  const [problem, setProblem] = useState<string | undefined>();
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const checked = checkForm(resetPasswordBody, { token, password }, doorWords);
    setProblem(checked.problems?.password);
    if (checked.data !== null) reset.mutate(checked.data);
  }
  return (
    <Door
      title="New password"
      notes={['Choosing one signs you out everywhere else.']}
      heading="Choose a new password."
    >
      {token === null ? (
        <LinkIncomplete>Ask for another mail.</LinkIncomplete>
      ) : reset.isSuccess ? (
        <StateNote
          title="The password is the new one"
          actions={<ButtonLink to={paths.signIn()}>Sign in</ButtonLink>}
        >
          You are signed out everywhere.
        </StateNote>
      ) : (
        <form onSubmit={handleSubmit} noValidate>
          <div className="mb-4.5">
            <FormAlert>{sentenceOf(reset.error)}</FormAlert>
          </div>
          <DoorField
            label="New password"
            type="password"
            autoComplete="new-password"
            value={password}
            problem={problem}
            hint="At least 10 characters."
            onChange={(event) => setPassword(event.target.value)}
          />
          <div className="flex flex-wrap items-center gap-x-5.5 gap-y-2">
            <Button type="submit" isMain disabled={reset.isPending}>
              Set the password
            </Button>
            {reset.error !== null && <Link to={paths.forgotten()}>Ask for another mail</Link>}
          </div>
        </form>
      )}
    </Door>
  );
}
