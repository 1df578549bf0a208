import { type FormEvent, useState } from 'react';
import { AppError } from '../../../shared/errors.ts';
import type { BuildView } from '../../../shared/schemas/builds.ts';
import { Button } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { useRegisterBuild } from './builds.queries.ts';

export interface RegisterFormProps {
  library: string;
  onDone: (build: BuildView) => void;
  onClose: () => void;
}

/** Registers a prepared folder of this machine as a build. */
export function RegisterForm({ library, onDone, onClose }: RegisterFormProps) {
  const register = useRegisterBuild(library);
  const [folder, setFolder] = useState('');
  const [label, setLabel] = useState('');
  const { error } = register;
  const issueOf = (name: string): string | null =>
    error instanceof AppError ? (error.issues.find((issue) => issue.path === name)?.message ?? null) : null;
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    register.mutate(
      { folder: folder.trim(), ...(label.trim() === '' ? {} : { label: label.trim() }) },
      { onSuccess: onDone },
    );
  }
  return (
    <form
      onSubmit={handleSubmit}
      className="mt-4 grid max-w-[40em] gap-3 border-t border-rule-strong pt-3"
      onKeyDown={(event) => {
        if (event.key === 'Escape') onClose();
      }}
    >
      <Field
        label="Folder on this machine: a prepared checkout with its tallyroot.yaml"
        value={folder}
        onChange={(event) => setFolder(event.target.value)}
        problem={issueOf('folder')}
        placeholder="/home/ilse/larkroots"
        autoFocus
        required
      />
      <Field
        label="What it is, in a few words (left out: the commit’s own title or hash)"
        value={label}
        onChange={(event) => setLabel(event.target.value)}
        problem={issueOf('label')}
      />
      {error !== null && (
        <div role="alert" className="border-l-3 border-worse pl-3 text-table">
          {error.message}
          {error instanceof AppError &&
            error.issues.map((issue) => (
              <span key={`${issue.path ?? ''} ${issue.message}`} className="block text-ink-2">
                {issue.line === undefined ? '' : `line ${issue.line}: `}
                {issue.message}
              </span>
            ))}
        </div>
      )}
      <div className="flex flex-wrap items-center gap-x-5.5 gap-y-2">
        <Button type="submit" isMain disabled={register.isPending || folder.trim() === ''}>
          Register
        </Button>
        <TextAction onClick={onClose}>Leave it</TextAction>
      </div>
    </form>
  );
}
