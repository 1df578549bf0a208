import { lazy, Suspense, useEffect, useState } from 'react';
import { TextAction } from '../components/ui/text-action.tsx';
import type { Person } from '../features/session/asker.ts';

const CommandListSheet = lazy(async () => ({
  default: (await import('./command-list-sheet.tsx')).CommandListSheet,
}));

/** Control or command with K, from anywhere, also while writing; where there is no keyboard, a word to press. */
export function CommandListRoute({ person }: { person: Person }) {
  const [isOpen, setIsOpen] = useState(false);
  useEffect(() => {
    function handleKeyDown(event: KeyboardEvent): void {
      if (!(event.ctrlKey || event.metaKey) || event.altKey || event.shiftKey) return;
      if (event.key.toLowerCase() !== 'k') return;
      event.preventDefault();
      setIsOpen((wasOpen) => !wasOpen);
    }
    document.addEventListener('keydown', handleKeyDown);
    return () => document.removeEventListener('keydown', handleKeyDown);
  }, []);
  return (
    <>
      <TextAction aria-haspopup="dialog" onClick={() => setIsOpen(true)} className="wide:hidden">
        Go to
      </TextAction>
      {isOpen && (
        <Suspense fallback={null}>
          <CommandListSheet person={person} onClose={() => setIsOpen(false)} />
        </Suspense>
      )}
    </>
  );
}
