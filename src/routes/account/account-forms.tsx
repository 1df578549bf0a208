import { type FormEvent, useState } from 'react';
import { changeAccountBody, changePasswordBody } from '../../../shared/schemas/people.ts';
import { Button } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { useChangePassword, useRename } from '../../features/people/people.queries.ts';
import type { Person } from '../../features/session/asker.ts';
import { useReadMeAgain } from '../../features/session/session.queries.ts';
import { checkForm, type FieldProblems, sentenceOf } from '../../lib/check-form.ts';

const form = 'grid max-w-[24em] gap-3 border-t border-rule-strong pt-3';

export function NameForm({ person }: { person: Person }) {
  const rename = useRename();
  const readMeAgain = useReadMeAgain();
  const [name, setName] = useState(person.name);
  const [problem, setProblem] = useState<string | null>(null);
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const checked = checkForm(
      changeAccountBody,
      { name },
      { name: 'A name is needed, of 100 characters at most.' },
    );
    setProblem(checked.problems?.name ?? null);
    if (checked.problems === null) rename.mutate(checked.data.name, { onSuccess: readMeAgain });
  }
  return (
    <form onSubmit={handleSubmit} noValidate className={form}>
      <Field
        label="Name"
        autoComplete="name"
        value={name}
        problem={problem}
        onChange={(event) => setName(event.target.value)}
      />
      <FormAlert>{sentenceOf(rename.error)}</FormAlert>
      <div className="flex items-center gap-4">
        <Button type="submit" disabled={rename.isPending || name.trim() === person.name}>
          Save the name
        </Button>
        <span role="status" className="text-note text-ink-3">
          {rename.isSuccess && name.trim() === person.name ? 'Saved.' : ''}
        </span>
      </div>
    </form>
  );
}

export function PasswordForm() {
  const change = useChangePassword();
  const [values, setValues] = useState({ current: '', next: '' });
  const [problems, setProblems] = useState<FieldProblems>({});
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const checked = checkForm(changePasswordBody, values, {
      current: 'The password that you have now is needed.',
      next: 'At least 10 characters, and no more than 128.',
    });
    setProblems(checked.problems ?? {});
    if (checked.problems === null)
      change.mutate(checked.data, { onSuccess: () => setValues({ current: '', next: '' }) });
  }
  return (
    <form onSubmit={handleSubmit} noValidate className={form}>
      <Field
        label="The one that you have"
        type="password"
        autoComplete="current-password"
        value={values.current}
        problem={problems.current ?? null}
        onChange={(event) => setValues({ ...values, current: event.target.value })}
      />
      <Field
        label="The new one, at least 10 characters"
        type="password"
        autoComplete="new-password"
        value={values.next}
        problem={problems.next ?? null}
        onChange={(event) => setValues({ ...values, next: event.target.value })}
      />
      <FormAlert>{sentenceOf(change.error)}</FormAlert>
      <div className="flex items-center gap-4">
        <Button type="submit" disabled={change.isPending}>
          Change the password
        </Button>
        <span role="status" className="text-note text-ink-3">
          {change.isSuccess && 'Changed; you are signed out everywhere else.'}
        </span>
      </div>
    </form>
  );
}
