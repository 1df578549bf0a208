import { useCallback } from 'react';
import { useSearchParams } from 'react-router';

export interface ViewState {
  /** One value, or an empty text. */
  get(name: string): string;
  /** A comma-separated list; empty where the name is not set. */
  list(name: string): string[];
  /** Sets values; an empty text or list takes the name out of the address. */
  set(values: Record<string, string | readonly string[]>): void;
  /** Makes a list from the one that holds now, which may be newer than what is drawn. */
  change(name: string, next: (words: string[]) => readonly string[]): void;
  /** Adds a word to a list or takes it out. */
  toggle(name: string, word: string): void;
  clear(...names: string[]): void;
}

/** Changes start from the address itself: a slow page may be drawn from an older one. */
function addressNow(): URLSearchParams {
  return new URLSearchParams(window.location.search);
}

function listOf(search: URLSearchParams, name: string): string[] {
  return (search.get(name) ?? '').split(',').filter((word) => word !== '');
}

/** What a page shows (filters, sort, selection) lives in its address, so that it can be sent and kept. */
export function useViewState(): ViewState {
  const [search, setSearch] = useSearchParams();
  const set = useCallback(
    (values: Record<string, string | readonly string[]>) => {
      const after = addressNow();
      for (const [name, value] of Object.entries(values)) {
        const text = typeof value === 'string' ? value : value.join(',');
        if (text === '') after.delete(name);
        else after.set(name, text);
      }
      setSearch(after, { replace: true, preventScrollReset: true });
    },
    [setSearch],
  );
  return {
    get: (name) => search.get(name) ?? '',
    list: (name) => listOf(search, name),
    set,
    change: (name, next) => set({ [name]: next(listOf(addressNow(), name)) }),
    toggle: (name, word) => {
      const words = listOf(addressNow(), name);
      set({ [name]: words.includes(word) ? words.filter((other) => other !== word) : [...words, word] });
    },
    clear: (...names) => set(Object.fromEntries(names.map((name) => [name, '']))),
  };
}
