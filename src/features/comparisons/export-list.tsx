import { useEffect, useRef } from 'react';
import { type ExportFormat, exportFormats } from '../../../shared/schemas/comparisons.ts';
import type { RunBase } from '../../../shared/schemas/runs.ts';
import { exportHref } from './comparisons.queries.ts';

export interface ExportListProps {
  candidate: number;
  base: RunBase;
  onClose: () => void;
}

const words: Record<ExportFormat, { name: string; holds: string }> = {
  csv: { name: 'CSV', holds: 'a row a pair, with every figure of both sides' },
  json: { name: 'JSON', holds: 'everything but the paths, as the command line reads it' },
  markdown: { name: 'Markdown', holds: 'verdict, totals and changed pairs, for a comment' },
  junit: { name: 'JUnit', holds: 'XML for a pipeline: a test case a pair' },
};

/** The comparison as a file, in one of four forms. */
export function ExportList({ candidate, base, onClose }: ExportListProps) {
  const list = useRef<HTMLUListElement>(null);
  useEffect(() => {
    list.current?.querySelector('a')?.focus();
  }, []);
  return (
    <div className="basis-full">
      <ul
        ref={list}
        aria-label="Files"
        className="finds max-w-[46em]"
        onKeyDown={(event) => {
          if (event.key !== 'Escape') return;
          event.preventDefault();
          event.stopPropagation();
          onClose();
        }}
      >
        {exportFormats.map((format) => (
          <li key={format}>
            <a href={exportHref(candidate, base, format)} download className="justify-self-start font-medium">
              {words[format].name}
            </a>
            <span className="text-table text-ink-2">{words[format].holds}</span>
          </li>
        ))}
      </ul>
    </div>
  );
}
