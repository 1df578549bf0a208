import { useEffect, useRef } from 'react';
import { Button } from '../ui/button.tsx';
import { KeyList, type PageKey } from './key-list.tsx';

export interface KeysDialogProps {
  /** Those of the page. */
  keys: readonly PageKey[];
  onClose: () => void;
}

const everywhere: readonly PageKey[] = [
  { keys: ['ctrl k', '⌘ k'], does: 'go to a library, build, suite, case or page' },
  { keys: ['/'], does: 'search' },
  { keys: ['?'], does: 'this list' },
  { keys: ['escape'], does: 'leave a field, a question or this list' },
  { keys: ['tab'], does: 'to the next thing that can be pressed' },
];

/** Every key there is on this page, each with what it does. */
export function KeysDialog({ keys, onClose }: KeysDialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  useEffect(() => {
    if (dialog.current?.open === false) dialog.current.showModal();
  }, []);
  return (
    <dialog
      ref={dialog}
      aria-labelledby="all-keys"
      onClose={onClose}
      onKeyDown={(event) => {
        if (event.key !== '?') return;
        event.preventDefault();
        dialog.current?.close();
      }}
      className="m-auto w-[min(520px,calc(100vw-32px))] max-w-none border border-ink bg-paper px-5 py-4 text-ink backdrop:bg-ink/30"
    >
      <h2 id="all-keys" className="mb-2 font-semibold">
        Keys
      </h2>
      {keys.length > 0 && (
        <section aria-label="On this page" className="mb-3 border-t border-rule-strong pt-2">
          <h3 className="mb-1 text-note text-ink-3">on this page</h3>
          <KeyList keys={keys} isLong />
        </section>
      )}
      <section aria-label="Everywhere" className="border-t border-rule-strong pt-2">
        <h3 className="mb-1 text-note text-ink-3">everywhere</h3>
        <KeyList keys={everywhere} isLong />
      </section>
      <p className="py-3 text-note text-ink-3">
        Single keys are silent while you write. Whatever a key does can be pressed as well.
      </p>
      <Button onClick={() => dialog.current?.close()}>Close</Button>
    </dialog>
  );
}
