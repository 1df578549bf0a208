import { type FormEvent, useState } from 'react';
import { signUpBody } from '../../../shared/schemas/people.ts';
import { Button } from '../../components/ui/button.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { useSignUp } from '../../features/session/session.queries.ts';
import { checkForm, type FieldProblems, problemsOf, sentenceOf } from '../../lib/check-form.ts';
import { DoorField } from './door-field.tsx';
import { doorWords } from './door-words.ts';

export interface SignUpFormProps {
  /** What the invitation's link carries, and the address that it proves. */
  invitation?: { token: string; email: string };
  /** `isSignedIn` is false where a mail has to prove the address first. */
  onDone: (result: { isSignedIn: boolean; email: string }) => void;
}

export function SignUpForm({ invitation, onDone }: SignUpFormProps) {
  const signUp = useSignUp();
  const [name, setName] = useState('');
  const [email, setEmail] = useState(invitation?.email ?? '');
  const [password, setPassword] = useState('');
  const [found, setFound] = useState<FieldProblems>({});
  const problems = { ...problemsOf(signUp.error), ...found };
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const values = { name, email: email.trim(), password };
    const checked = checkForm(
      signUpBody,
      invitation === undefined ? values : { ...values, invitation: invitation.token },
      doorWords,
    );
    setFound(checked.problems ?? {});
    if (checked.data === null) return;
    signUp.mutate(checked.data, {
      onSuccess: ({ isSignedIn }) => onDone({ isSignedIn, email: checked.data.email }),
    });
  }
  return (
    <form onSubmit={handleSubmit} noValidate>
      <div className="mb-4.5">
        <FormAlert>{sentenceOf(signUp.error)}</FormAlert>
      </div>
      <DoorField
        label="Name"
        autoComplete="name"
        value={name}
        problem={problems.name}
        hint="As it stands beside what you do."
        onChange={(event) => setName(event.target.value)}
      />
      <DoorField
        label="E-mail"
        type="email"
        autoComplete="username"
        value={email}
        readOnly={invitation !== undefined}
        problem={problems.email}
        hint={invitation === undefined ? undefined : 'The invitation is for this address.'}
        onChange={(event) => setEmail(event.target.value)}
      />
      <DoorField
        label="Password"
        type="password"
        autoComplete="new-password"
        value={password}
        problem={problems.password}
        hint="At least 10 characters."
        onChange={(event) => setPassword(event.target.value)}
      />
      <Button type="submit" isMain disabled={signUp.isPending}>
        Make the account
      </Button>
    </form>
  );
}
