import { useQuery } from '@tanstack/react-query';
import { type FormEvent, useState } from 'react';
import { useNavigate } from 'react-router';
import { setUpBody } from '../../../shared/schemas/people.ts';
import { Button, ButtonLink } from '../../components/ui/button.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { setUpQuery, useSetUp } from '../../features/session/session.queries.ts';
import { checkForm, type FieldProblems, problemsOf, sentenceOf } from '../../lib/check-form.ts';
import { paths } from '../../paths.ts';
import { Door } from './door.tsx';
import { DoorField } from './door-field.tsx';
import { doorWords } from './door-words.ts';

const empty = { code: '', name: '', email: '', password: '' };

function SetUpForm() {
  const setUp = useSetUp();
  const navigate = useNavigate();
  const [values, setValues] = useState(empty);
  const [found, setFound] = useState<FieldProblems>({});
  const problems = { ...problemsOf(setUp.error), ...found };
  const put = (part: Partial<typeof empty>) => setValues((before) => ({ ...before, ...part }));
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const trimmed = { ...values, code: values.code.trim(), email: values.email.trim() };
    const checked = checkForm(setUpBody, trimmed, doorWords);
    setFound(checked.problems ?? {});
    if (checked.data === null) return;
    setUp.mutate(checked.data, { onSuccess: () => void navigate(paths.home(), { replace: true }) });
  }
  return (
    <form onSubmit={handleSubmit} noValidate>
      <div className="mb-4.5">
        <FormAlert>{sentenceOf(setUp.error)}</FormAlert>
      </div>
      <DoorField
        label="Code"
        autoComplete="one-time-code"
        spellCheck={false}
        value={values.code}
        problem={problems.code}
        hint="In the output of the server, behind “Set up the site”."
        onChange={(event) => put({ code: event.target.value })}
      />
      <DoorField
        label="Name"
        autoComplete="name"
        value={values.name}
        problem={problems.name}
        onChange={(event) => put({ name: event.target.value })}
      />
      <DoorField
        label="E-mail"
        type="email"
        autoComplete="username"
        value={values.email}
        problem={problems.email}
        onChange={(event) => put({ email: event.target.value })}
      />
      <DoorField
        label="Password"
        type="password"
        autoComplete="new-password"
        value={values.password}
        problem={problems.password}
        hint="At least 10 characters."
        onChange={(event) => put({ password: event.target.value })}
      />
      <Button type="submit" isMain disabled={setUp.isPending}>
        Make the first account
      </Button>
    </form>
  );
}

/** The first admin of a site, once. */
export function SetUpPage() {
  const query = useQuery(setUpQuery);
  return (
    <Door
      title="Set up"
      notes={[
        'Whoever can read what the server prints decides who is the first admin.',
        'The admin looks after people, mail and lanes. Libraries have members of their own.',
      ]}
      heading="Nobody has an account here yet. The first one is the admin’s."
    >
      <QueryState query={query} what="the state of this site">
        {({ isOpen }) =>
          isOpen ? (
            <SetUpForm />
          ) : (
            <StateNote
              title="This site has been set up"
              actions={<ButtonLink to={paths.signIn()}>Sign in</ButtonLink>}
            >
              There is an admin already, or this is the demo.
            </StateNote>
          )
        }
      </QueryState>
    </Door>
  );
}
