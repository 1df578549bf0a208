import { useState } from 'react';
import { Button } from '../../components/ui/button.tsx';
import { useKeys } from '../../lib/use-keys.ts';

export interface HomeCommandProps {
  command: string;
}

/** A command to copy: the same solve on one's own machine. */
export function HomeCommand({ command }: HomeCommandProps) {
  const [state, setState] = useState<'idle' | 'copied' | 'failed'>('idle');
  const copy = (): void => {
    navigator.clipboard.writeText(command).then(
      () => setState('copied'),
      () => setState('failed'),
    );
  };
  useKeys({ y: copy });
  return (
    <>
      <div className="flex items-center justify-between gap-3.5 border-l-3 border-ink bg-sheet px-3 py-[9px] max-wide:items-start">
        <code className="wrap-anywhere whitespace-pre-wrap text-figure">{command}</code>
        <Button hotkey="y" onClick={copy}>
          Copy
        </Button>
      </div>
      <p role="status" className="min-h-[17px] pt-1 text-note text-ink-3">
        {state === 'copied'
          ? 'Copied.'
          : state === 'failed'
            ? 'The browser did not allow copying; select the text instead.'
            : ''}
      </p>
    </>
  );
}
