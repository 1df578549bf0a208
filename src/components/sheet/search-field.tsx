import { type FormEvent, useRef, useState } from 'react';
import { useNavigate } from 'react-router';
import { useKeys } from '../../lib/use-keys.ts';
import { paths } from '../../paths.ts';
import { Kbd } from '../ui/kbd.tsx';

/** Looks for a case, a solver, a library or a commit. The key / puts the cursor here, Escape leaves. */
export function SearchField() {
  const input = useRef<HTMLInputElement>(null);
  const navigate = useNavigate();
  const [text, setText] = useState('');
  useKeys({
    '/': () => input.current?.focus(),
  });
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    if (text.trim() !== '') void navigate(paths.search(text.trim()));
  }
  return (
    <search>
      <form
        onSubmit={handleSubmit}
        className="flex w-[210px] items-center justify-between gap-2 border-b border-rule-strong px-0.5 py-[3px] focus-within:border-ink max-wide:w-[112px]"
      >
        <input
          ref={input}
          type="search"
          value={text}
          onChange={(event) => setText(event.target.value)}
          onKeyDown={(event) => {
            if (event.key === 'Escape') event.currentTarget.blur();
          }}
          aria-label="Search: case, solver, commit"
          aria-keyshortcuts="/"
          placeholder="Case, solver, commit"
          className="min-w-0 flex-1 bg-transparent text-body text-ink placeholder:text-ink-3 placeholder:opacity-100"
        />
        <Kbd>/</Kbd>
      </form>
    </search>
  );
}
