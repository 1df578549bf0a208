import { useState } from 'react';
import type { CodeLanguage } from '../../../shared/guide/section.ts';
import { Button } from '../../components/ui/button.tsx';

export interface CodeBlockProps {
  language: CodeLanguage;
  text: string;
}

const languageWords: Record<CodeLanguage, string> = {
  manifest: 'tallyroot.yaml',
  suite: 'suite file',
  equation: 'equation',
  wire: 'lines of the wire',
  javascript: 'JavaScript',
  python: 'Python',
};

const copyWords = { idle: 'Copy', copied: 'Copied', failed: 'Not allowed; select it' } as const;

/** Lines of code with what they are and a way to copy them. Long lines scroll, with the arrow keys too. */
export function CodeBlock({ language, text }: CodeBlockProps) {
  const [state, setState] = useState<keyof typeof copyWords>('idle');
  const copy = (): void => {
    navigator.clipboard.writeText(text).then(
      () => setState('copied'),
      () => setState('failed'),
    );
  };
  return (
    <figure className="my-3 max-w-[82ch] border-l-3 border-ink bg-sheet">
      <figcaption className="flex items-center justify-between gap-3 py-1.5 pl-3 pr-1.5 text-header text-ink-3">
        {languageWords[language]}
        <Button className="no-print" onClick={copy} aria-label={`Copy the ${languageWords[language]}`}>
          {copyWords[state]}
        </Button>
        <span role="status" className="sr-only">
          {state === 'idle' ? '' : copyWords[state]}
        </span>
      </figcaption>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by the keyboard */}
      <pre tabIndex={0} className="overflow-x-auto px-3 pb-3 font-mono text-figure print:whitespace-pre-wrap">
        {text}
      </pre>
    </figure>
  );
}
