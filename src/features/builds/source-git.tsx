import { useQuery } from '@tanstack/react-query';
import { type FormEvent, useId, useState } from 'react';
import type { BuildPreviewView } from '../../../shared/schemas/builds.ts';
import { Button } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { formatCount } from '../../lib/format.ts';
import { gitRefsQuery, usePreviewBuild } from './build-sources.queries.ts';
import { ProblemLines } from './problem-lines.tsx';

export interface SourceGitProps {
  library: string;
  /** Of the newest build that came from a repository. */
  knownAddress: string;
  onPreview: (preview: BuildPreviewView) => void;
}

/** A repository and one of its branches, tags or commits. */
export function SourceGit({ library, knownAddress, onPreview }: SourceGitProps) {
  const preview = usePreviewBuild(library);
  const list = useId();
  const [address, setAddress] = useState(knownAddress);
  const [asked, setAsked] = useState(knownAddress);
  const [ref, setRef] = useState('');
  const refs = useQuery({ ...gitRefsQuery(asked), enabled: asked !== '' });
  const known = asked === address.trim() ? refs.data : undefined;
  const chosen = ref.trim() || (known?.defaultBranch ?? '');
  const picked = [...(known?.branches ?? []), ...(known?.tags ?? [])].find((one) => one.name === chosen);
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    if (chosen === '' || address.trim() === '') return;
    preview.mutate({ git: { address: address.trim(), ref: chosen } }, { onSuccess: onPreview });
  }
  return (
    <form onSubmit={handleSubmit} className="grid max-w-[44em] gap-3">
      <Field
        label="Address of the repository"
        type="text"
        inputMode="url"
        spellCheck={false}
        autoComplete="off"
        placeholder="https://git.example.org/larkmoor/larkroots.git"
        value={address}
        onChange={(event) => setAddress(event.target.value)}
        onBlur={() => setAsked(address.trim())}
        required
      />
      <p role="status" className="text-note text-ink-3">
        {asked === '' || asked !== address.trim()
          ? 'Its branches and tags are read when the address is written.'
          : refs.isError
            ? ''
            : known === undefined
              ? 'Reading its branches and tags …'
              : `${formatCount(known.branches.length, 'branch', 'branches')}, ${formatCount(known.tags.length, 'tag')}.`}
      </p>
      {refs.isError && asked === address.trim() && <ProblemLines error={refs.error} />}
      <Field
        label="Branch, tag or commit"
        list={list}
        spellCheck={false}
        autoComplete="off"
        placeholder={known?.defaultBranch ?? 'main'}
        value={ref}
        onChange={(event) => setRef(event.target.value)}
      />
      <datalist id={list}>
        {known?.branches.map((one) => (
          <option key={`branch ${one.name}`} value={one.name}>
            branch, {one.commit.slice(0, 7)}
          </option>
        ))}
        {known?.tags.map((one) => (
          <option key={`tag ${one.name}`} value={one.name}>
            tag, {one.commit.slice(0, 7)}
          </option>
        ))}
      </datalist>
      {picked !== undefined && (
        <p className="text-note text-ink-3">
          {picked.name} stands at <span className="num">{picked.commit.slice(0, 12)}</span>.
        </p>
      )}
      <ProblemLines error={preview.error} />
      <div>
        <Button type="submit" isMain disabled={preview.isPending || chosen === '' || address.trim() === ''}>
          {preview.isPending ? 'Looking …' : 'Look at it'}
        </Button>
      </div>
    </form>
  );
}
