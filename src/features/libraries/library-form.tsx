import { type FormEvent, useState } from 'react';
import type { z } from 'zod';
import type { Visibility } from '../../../shared/permissions.ts';
import { Button } from '../../components/ui/button.tsx';
import { Choice } from '../../components/ui/choice.tsx';
import { Field } from '../../components/ui/field.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { TextAreaField } from '../../components/ui/text-area-field.tsx';
import { checkForm, type FieldProblems, problemsOf, sentenceOf } from '../../lib/check-form.ts';
import { suggestSlug } from './suggest-slug.ts';
import { visibilityWords } from './visibility-words.ts';

export interface LibraryFormValues {
  name: string;
  slug: string;
  description: string;
  homepage: string;
  visibility: Visibility;
}

export interface LibraryFormProps<Body> {
  /** Of the request that it makes. */
  schema: z.ZodType<Body>;
  first: LibraryFormValues;
  /** The slug is chosen once: addresses have it. */
  hasSlug: boolean;
  /** False where who sees it is changed with more care, elsewhere. */
  hasVisibility?: boolean;
  action: string;
  isBusy: boolean;
  error: unknown;
  /** Said beside the button, e.g. that it is saved. */
  said?: string | null;
  onSubmit: (body: Body) => void;
}

const words: FieldProblems = {
  name: 'A name is needed, of 100 characters at most.',
  slug: 'Lower-case letters, figures and hyphens, 64 at most; no hyphen at either end.',
  description: 'At most 2000 characters.',
  homepage: 'An address that begins with https:// or http://, or nothing.',
};

/** What a library is called, what it is, and who sees it. */
export function LibraryForm<Body>(props: LibraryFormProps<Body>) {
  const { schema, first, hasSlug, hasVisibility = true, action, isBusy, error, said, onSubmit } = props;
  const [values, setValues] = useState(first);
  const [hasOwnSlug, setHasOwnSlug] = useState(false);
  const [found, setFound] = useState<FieldProblems>({});
  const problems = { ...problemsOf(error), ...found };
  const slug = hasOwnSlug ? values.slug : suggestSlug(values.name);
  const put = (part: Partial<LibraryFormValues>) => setValues((before) => ({ ...before, ...part }));
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const { name, description, visibility } = values;
    const homepage = values.homepage.trim() === '' ? null : values.homepage.trim();
    const body = {
      name,
      description,
      homepage,
      ...(hasVisibility ? { visibility } : {}),
      ...(hasSlug ? { slug } : {}),
    };
    const checked = checkForm(schema, body, words);
    setFound(checked.problems ?? {});
    if (checked.problems === null) onSubmit(checked.data);
  }
  return (
    <form
      onSubmit={handleSubmit}
      noValidate
      className="grid max-w-[38em] gap-4 border-t border-rule-strong pt-3"
    >
      <FormAlert>{sentenceOf(error)}</FormAlert>
      <Field
        label="Name"
        value={values.name}
        problem={problems.name ?? null}
        autoComplete="off"
        onChange={(event) => put({ name: event.target.value })}
      />
      {hasSlug && (
        <Field
          label="Short name, as addresses have it; it stays as it is"
          value={slug}
          problem={problems.slug ?? null}
          autoComplete="off"
          spellCheck={false}
          className="font-mono"
          onChange={(event) => {
            setHasOwnSlug(true);
            put({ slug: event.target.value });
          }}
        />
      )}
      <TextAreaField
        label="What it is"
        value={values.description}
        problem={problems.description ?? null}
        onChange={(event) => put({ description: event.target.value })}
      />
      <Field
        label="Where its source can be read, if anywhere"
        type="url"
        value={values.homepage}
        problem={problems.homepage ?? null}
        placeholder="https://"
        onChange={(event) => put({ homepage: event.target.value })}
      />
      {hasVisibility && (
        <div>
          <Choice
            legend="Who sees it"
            name="visibility"
            options={[
              { value: 'private', label: 'private' },
              { value: 'public', label: 'public' },
            ]}
            value={values.visibility}
            onChange={(visibility) => put({ visibility })}
          />
          <p className="pt-1 text-note text-ink-3">{visibilityWords[values.visibility]}</p>
        </div>
      )}
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button type="submit" isMain disabled={isBusy}>
          {action}
        </Button>
        <span role="status" className="text-note text-ink-3">
          {said}
        </span>
      </div>
    </form>
  );
}
