import { type FormEvent, useState } from 'react';
import { Link } from 'react-router';
import { signInBody } from '../../../shared/schemas/people.ts';
import { Button } from '../../components/ui/button.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { useSignIn } from '../../features/session/session.queries.ts';
import { checkForm, type FieldProblems, sentenceOf } from '../../lib/check-form.ts';
import { paths } from '../../paths.ts';
import { DoorField } from './door-field.tsx';
import { doorWords } from './door-words.ts';

export interface SignInFormProps {
  /** Known beforehand, from an invitation. */
  email?: string;
  /** False where another way in stands above. */
  isMain?: boolean;
  onEntered: () => void;
}

export function SignInForm({ email: given = '', isMain = true, onEntered }: SignInFormProps) {
  const signIn = useSignIn();
  const [email, setEmail] = useState(given);
  const [password, setPassword] = useState('');
  const [problems, setProblems] = useState<FieldProblems>({});
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const checked = checkForm(
      signInBody,
      { email: email.trim(), password },
      { ...doorWords, password: 'The password is needed.' },
    );
    setProblems(checked.problems ?? {});
    if (checked.data !== null) signIn.mutate(checked.data, { onSuccess: onEntered });
  }
  return (
    <form onSubmit={handleSubmit} noValidate>
      <div className="mb-4.5">
        <FormAlert>{sentenceOf(signIn.error)}</FormAlert>
      </div>
      <DoorField
        label="E-mail"
        type="email"
        autoComplete="username"
        value={email}
        problem={problems.email}
        onChange={(event) => setEmail(event.target.value)}
      />
      <DoorField
        label="Password"
        type="password"
        autoComplete="current-password"
        value={password}
        problem={problems.password}
        onChange={(event) => setPassword(event.target.value)}
      />
      <div className="mt-1.5 flex flex-wrap items-center gap-x-5.5 gap-y-2">
        <Button type="submit" isMain={isMain} disabled={signIn.isPending}>
          Sign in
        </Button>
        <Link to={paths.forgotten()}>Password forgotten</Link>
      </div>
    </form>
  );
}
