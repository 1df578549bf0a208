import { type FormEvent, useState } from 'react';
import type { BuildPreviewView } from '../../../shared/schemas/builds.ts';
import { Button } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { usePreviewBuild } from './build-sources.queries.ts';
import { ProblemLines } from './problem-lines.tsx';

export interface SourceFolderProps {
  library: string;
  onPreview: (preview: BuildPreviewView) => void;
}

/** A folder of the machine that Tallyroot runs on, where whoever runs it allows that. */
export function SourceFolder({ library, onPreview }: SourceFolderProps) {
  const preview = usePreviewBuild(library);
  const [folder, setFolder] = useState('');
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    if (folder.trim() !== '') preview.mutate({ folder: folder.trim() }, { onSuccess: onPreview });
  }
  return (
    <form onSubmit={handleSubmit} className="grid max-w-[44em] gap-3">
      <Field
        label="Folder on the machine that Tallyroot runs on, with its tallyroot.yaml"
        value={folder}
        spellCheck={false}
        autoComplete="off"
        placeholder="/home/ilse/larkroots"
        onChange={(event) => setFolder(event.target.value)}
        required
      />
      <p className="text-note text-ink-3">
        It is used where it lies. What is changed in it later changes what is run.
      </p>
      <ProblemLines error={preview.error} />
      <div>
        <Button type="submit" isMain disabled={preview.isPending || folder.trim() === ''}>
          {preview.isPending ? 'Looking …' : 'Look at it'}
        </Button>
      </div>
    </form>
  );
}
