import { type RefObject, useEffect, useRef, useState } from 'react';

/** Width of an element in px, measured, so that a drawing is laid out anew instead of scaled. */
export function useWidth<Element extends HTMLElement>(fallback: number): [RefObject<Element | null>, number] {
  const ref = useRef<Element>(null);
  const [width, setWidth] = useState(fallback);
  useEffect(() => {
    const element = ref.current;
    if (element === null) return;
    const observer = new ResizeObserver(([entry]) => {
      if (entry !== undefined) setWidth(Math.max(1, Math.floor(entry.contentRect.width)));
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, width];
}
