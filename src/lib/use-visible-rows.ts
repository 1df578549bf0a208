import { useWindowVirtualizer } from '@tanstack/react-virtual';
import { type RefObject, useEffect, useRef, useState } from 'react';
import { flushSync } from 'react-dom';

export interface VisibleRows {
  ref: RefObject<HTMLTableElement | null>;
  from: number;
  to: number;
  /** Height in px of the rows that are not drawn, above and below. */
  before: number;
  after: number;
  measure: ((row: HTMLElement | null) => void) | undefined;
}

const drawAllUpTo = 80;

/** Whether the page is being printed; then there is no window that rows could be out of. */
function useIsPrinting(): boolean {
  const [isPrinting, setIsPrinting] = useState(false);
  useEffect(() => {
    const begin = (): void => flushSync(() => setIsPrinting(true));
    const end = (): void => setIsPrinting(false);
    window.addEventListener('beforeprint', begin);
    window.addEventListener('afterprint', end);
    return () => {
      window.removeEventListener('beforeprint', begin);
      window.removeEventListener('afterprint', end);
    };
  }, []);
  return isPrinting;
}

/** Which rows of a long table are drawn. Short tables are drawn whole, so that they can be searched; all print. */
export function useVisibleRows(count: number, rowHeight: number): VisibleRows {
  const ref = useRef<HTMLTableElement>(null);
  const [top, setTop] = useState(0);
  const isPrinting = useIsPrinting();
  const isLong = count > drawAllUpTo;
  useEffect(() => {
    if (isLong && ref.current !== null) setTop(ref.current.getBoundingClientRect().top + window.scrollY);
  }, [isLong]);
  const virtualizer = useWindowVirtualizer({
    count: isLong ? count : 0,
    estimateSize: () => rowHeight,
    overscan: 12,
    scrollMargin: top,
  });
  if (!isLong || isPrinting) return { ref, from: 0, to: count, before: 0, after: 0, measure: undefined };
  const items = virtualizer.getVirtualItems();
  const first = items[0];
  const last = items.at(-1);
  if (first === undefined || last === undefined) {
    return { ref, from: 0, to: drawAllUpTo, before: 0, after: 0, measure: virtualizer.measureElement };
  }
  return {
    ref,
    from: first.index,
    to: last.index + 1,
    before: Math.max(0, first.start - top),
    after: Math.max(0, virtualizer.getTotalSize() - (last.end - top)),
    measure: virtualizer.measureElement,
  };
}
