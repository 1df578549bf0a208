import { type DragEvent, useRef, useState } from 'react';
import type { BuildPreviewView } from '../../../shared/schemas/builds.ts';
import { TextAction } from '../../components/ui/text-action.tsx';
import { formatBytes } from '../../lib/format-bytes.ts';
import { archiveEndings, archiveProblem, maxArchiveMebibytes } from './archive-check.ts';
import { usePreviewArchive } from './build-sources.queries.ts';
import { ProblemLines } from './problem-lines.tsx';

export interface SourceArchiveProps {
  library: string;
  onPreview: (preview: BuildPreviewView) => void;
}

/** An archive, dropped or chosen; it is sent at once, and what is in it is shown. */
export function SourceArchive({ library, onPreview }: SourceArchiveProps) {
  const preview = usePreviewArchive(library);
  const abort = useRef<AbortController>(null);
  const [sending, setSending] = useState<{ name: string; size: number; share: number } | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const [isOver, setIsOver] = useState(false);
  function take(file: File | undefined): void {
    if (file === undefined || preview.isPending) return;
    const wrong = archiveProblem(file);
    setProblem(wrong);
    if (wrong !== null) return;
    abort.current = new AbortController();
    setSending({ name: file.name, size: file.size, share: 0 });
    preview.mutate(
      {
        file,
        signal: abort.current.signal,
        onProgress: (share) => setSending({ name: file.name, size: file.size, share }),
      },
      { onSuccess: onPreview, onSettled: () => setSending(null) },
    );
  }
  const handleDrag = (event: DragEvent, over: boolean): void => {
    event.preventDefault();
    setIsOver(over);
  };
  return (
    <div className="grid max-w-[44em] gap-3">
      <label
        onDragOver={(event) => handleDrag(event, true)}
        onDragLeave={(event) => handleDrag(event, false)}
        onDrop={(event) => {
          handleDrag(event, false);
          take(event.dataTransfer.files[0]);
        }}
        className={`block cursor-pointer rounded-control border border-dashed bg-sheet px-3 py-6 text-center has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-ink ${isOver ? 'border-ink' : 'border-rule-strong'}`}
      >
        <input
          type="file"
          className="sr-only"
          accept={archiveEndings.join(',')}
          disabled={preview.isPending}
          onChange={(event) => {
            take(event.target.files?.[0]);
            event.target.value = '';
          }}
        />
        <span className="font-medium underline decoration-rule-strong underline-offset-3">
          Choose an archive
        </span>{' '}
        or drop it here
        <span className="block pt-1 text-note text-ink-3">
          {archiveEndings.join(', ')}, at most {maxArchiveMebibytes} MiB, with tallyroot.yaml at its root or
          in its one folder
        </span>
      </label>
      {problem !== null && (
        <p role="alert" className="text-worse">
          {problem}
        </p>
      )}
      {sending !== null && (
        <div className="grid gap-1" role="status">
          <p className="text-table">
            {sending.share < 1 ? 'Sending' : 'Looking into'} {sending.name}
            {sending.share < 1 && (
              <>
                , <span className="num">{formatBytes(Math.round(sending.share * sending.size))}</span> of{' '}
                <span className="num">{formatBytes(sending.size)}</span>
              </>
            )}
          </p>
          <progress
            aria-label={`Sending ${sending.name}`}
            max={1}
            value={sending.share}
            className="h-1.5 w-full accent-ink"
          />
          {sending.share < 1 && (
            <div>
              <TextAction onClick={() => abort.current?.abort()}>Stop sending</TextAction>
            </div>
          )}
        </div>
      )}
      <ProblemLines error={preview.error} />
    </div>
  );
}
