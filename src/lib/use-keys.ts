import { useEffect, useRef } from 'react';

export type KeyMap = Record<string, () => void>;

function isWriting(target: EventTarget | null): boolean {
  if (!(target instanceof HTMLElement)) return false;
  return target.isContentEditable || ['INPUT', 'TEXTAREA', 'SELECT'].includes(target.tagName);
}

/**
 * Single keys of a page. They are silent while somebody writes in a field and while a
 * modifier is held, so that they never take a key away from the browser or a screen reader.
 */
export function useKeys(keys: KeyMap): void {
  const latest = useRef(keys);
  useEffect(() => {
    latest.current = keys;
  });
  useEffect(() => {
    function handleKeyDown(event: KeyboardEvent): void {
      if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey) return;
      if (isWriting(event.target)) return;
      const run = latest.current[event.key === 'Escape' ? 'escape' : event.key];
      if (run === undefined) return;
      event.preventDefault();
      run();
    }
    document.addEventListener('keydown', handleKeyDown);
    return () => document.removeEventListener('keydown', handleKeyDown);
  }, []);
}
