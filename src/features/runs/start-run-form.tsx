import { type FormEvent, useRef, useState } from 'react';
import type { RunView } from '../../../shared/schemas/runs.ts';
import { Button } from '../../components/ui/button.tsx';
import { useKeys } from '../../lib/use-keys.ts';
import { useStartRun } from './runs.queries.ts';

export interface StartRunFormProps {
  build: number;
  suites: readonly { slug: string; title: string; caseCount: number }[];
  onStarted: (run: RunView) => void;
}

/** Chooses a suite and runs the build on it. */
export function StartRunForm({ build, suites, onStarted }: StartRunFormProps) {
  const start = useStartRun();
  const form = useRef<HTMLFormElement>(null);
  useKeys({ r: () => form.current?.requestSubmit() });
  const [suite, setSuite] = useState(suites[0]?.slug ?? '');
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    start.mutate({ build, suite }, { onSuccess: onStarted });
  }
  return (
    <form ref={form} onSubmit={handleSubmit} className="contents">
      <label className="inline-flex items-center gap-2">
        <span className="text-table text-ink-2">suite</span>
        <select
          value={suite}
          onChange={(event) => setSuite(event.target.value)}
          className="rounded-control border border-rule-strong bg-sheet px-2 py-[5px] text-body max-wide:max-w-[240px]"
        >
          {suites.map((one) => (
            <option key={one.slug} value={one.slug}>
              {one.title}, {one.caseCount} cases
            </option>
          ))}
        </select>
      </label>
      <Button type="submit" isMain hotkey="r" disabled={start.isPending || suite === ''}>
        Run it
      </Button>
      {start.error !== null && (
        <span role="alert" className="text-worse">
          {start.error.message}
        </span>
      )}
    </form>
  );
}
