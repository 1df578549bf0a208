import { type FormEvent, useState } from 'react';
import { Link } from 'react-router';
import { emailBody } from '../../../shared/schemas/people.ts';
import { Button } from '../../components/ui/button.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { useAskForReset } from '../../features/session/session.queries.ts';
import { checkForm, sentenceOf } from '../../lib/check-form.ts';
import { paths } from '../../paths.ts';
import { Door } from './door.tsx';
import { DoorField } from './door-field.tsx';
import { doorWords } from './door-words.ts';

/** Asks for a mail with a link to choose a new password. */
export function ForgottenPage() {
  const ask = useAskForReset();
  const [email, setEmail] = useState('');
  const [problem, setProblem] = useState<string | undefined>();
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const checked = checkForm(emailBody, { email: email.trim() }, doorWords);
    setProblem(checked.problems?.email);
    if (checked.data !== null) ask.mutate(checked.data.email);
  }
  return (
    <Door
      title="Password forgotten"
      notes={[
        'The link in the mail is good for an hour, and once.',
        <>
          It has come back to you? <Link to={paths.signIn()}>Sign in</Link>.
        </>,
      ]}
      heading="A mail leads to a new password."
    >
      {ask.isSuccess ? (
        <StateNote title="If there is an account, a mail is on its way">
          Look into the mails of <b>{email.trim()}</b>. Whether an address has an account is told to nobody
          else.
        </StateNote>
      ) : (
        <form onSubmit={handleSubmit} noValidate>
          <div className="mb-4.5">
            <FormAlert>{sentenceOf(ask.error)}</FormAlert>
          </div>
          <DoorField
            label="E-mail"
            type="email"
            autoComplete="username"
            value={email}
            problem={problem}
            onChange={(event) => setEmail(event.target.value)}
          />
          <Button type="submit" isMain disabled={ask.isPending}>
            Send the mail
          </Button>
        </form>
      )}
    </Door>
  );
}
