import { type RefObject, useEffect, useRef, useState } from 'react';
import { flushSync } from 'react-dom';

/** Elements that wait to be drawn though they are out of sight. */
const waiting = new Set<() => void>();
const atOnce = 16;
const restMs = 1200;
let isResting = false;
let isPrinting = false;

function rest(delayMs: number): void {
  if (isResting || waiting.size === 0) return;
  isResting = true;
  window.setTimeout(() => {
    isResting = false;
    for (const draw of [...waiting].slice(0, atOnce)) draw();
    rest(60);
  }, delayMs);
}

// The first to hear of a print, so that rows which are drawn for it alone know of it.
if (typeof window !== 'undefined') {
  window.addEventListener('beforeprint', () => {
    isPrinting = true;
    flushSync(() => {
      for (const draw of [...waiting]) draw();
    });
  });
  window.addEventListener('afterprint', () => {
    isPrinting = false;
  });
}

/**
 * Whether an element is to be drawn: at once where it is near the window, the others bit by bit once the page
 * has come to rest, so that all are there when it is printed.
 */
export function useDrawn<Element extends HTMLElement>(): [RefObject<Element | null>, boolean] {
  const ref = useRef<Element>(null);
  const [isDrawn, setIsDrawn] = useState(() => isPrinting);
  useEffect(() => {
    const element = ref.current;
    if (element === null || isDrawn) return;
    const draw = (): void => {
      waiting.delete(draw);
      setIsDrawn(true);
    };
    waiting.add(draw);
    rest(restMs);
    const observer = new IntersectionObserver(
      (entries) => {
        if (entries.some((entry) => entry.isIntersecting)) draw();
      },
      { rootMargin: '600px 0px' },
    );
    observer.observe(element);
    return () => {
      waiting.delete(draw);
      observer.disconnect();
    };
  }, [isDrawn]);
  return [ref, isDrawn];
}
