import { type FormEvent, useState } from 'react';
import { type TokenScope, tokenScopes } from '../../../shared/permissions.ts';
import { makeTokenBody } from '../../../shared/schemas/tokens.ts';
import { Button } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { checkForm, type FieldProblems, sentenceOf } from '../../lib/check-form.ts';
import { NewToken } from './new-token.tsx';
import { scopeWords } from './scope-words.ts';
import { useMakeToken } from './tokens.queries.ts';

const lifetimes = [
  { value: '30', label: '30 days' },
  { value: '90', label: '90 days' },
  { value: '366', label: 'a year' },
  { value: 'ever', label: 'until it is revoked' },
] as const;

/** Makes a token for a program, for what is ticked and no more. */
export function TokenForm({ library }: { library: string }) {
  const make = useMakeToken(library);
  const [name, setName] = useState('');
  const [scopes, setScopes] = useState<readonly TokenScope[]>(['build:write', 'run:write', 'results:read']);
  const [days, setDays] = useState<(typeof lifetimes)[number]['value']>('90');
  const [problems, setProblems] = useState<FieldProblems>({});
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const checked = checkForm(
      makeTokenBody,
      { name, scopes, days: days === 'ever' ? null : Number(days) },
      {
        name: 'A name is needed, to know it by.',
        scopes: 'It has to be good for something: tick at least one.',
      },
    );
    setProblems(checked.problems ?? {});
    if (checked.problems === null) make.mutate(checked.data, { onSuccess: () => setName('') });
  }
  if (make.data !== undefined) return <NewToken made={make.data} onDone={() => make.reset()} />;
  return (
    <form onSubmit={handleSubmit} noValidate className="grid gap-3.5 border-t border-rule-strong pt-3">
      <div className="flex flex-wrap items-start gap-x-4 gap-y-3">
        <Field
          label="What it is for"
          placeholder="nightly pipeline"
          autoComplete="off"
          value={name}
          problem={problems.name ?? null}
          onChange={(event) => setName(event.target.value)}
          className="w-[20em] max-w-full"
        />
        <SelectField label="Good for" options={lifetimes} value={days} onChange={setDays} />
      </div>
      <fieldset>
        <legend className="mb-1 text-table">It may</legend>
        <ul className="grid gap-1">
          {tokenScopes.map((scope) => (
            <li key={scope}>
              <label className="inline-flex min-h-6 items-center gap-2">
                <input
                  type="checkbox"
                  checked={scopes.includes(scope)}
                  onChange={(event) =>
                    setScopes(
                      event.target.checked ? [...scopes, scope] : scopes.filter((other) => other !== scope),
                    )
                  }
                  className="size-4 accent-ink"
                />
                {scopeWords[scope]} <code className="text-figure text-ink-3">{scope}</code>
              </label>
            </li>
          ))}
        </ul>
        {problems.scopes !== undefined && <p className="text-note text-worse">{problems.scopes}</p>}
      </fieldset>
      <FormAlert>{sentenceOf(make.error)}</FormAlert>
      <div>
        <Button type="submit" isMain disabled={make.isPending}>
          Make the token
        </Button>
      </div>
    </form>
  );
}
