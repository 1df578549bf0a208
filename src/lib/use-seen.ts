import { type RefObject, useEffect, useRef, useState } from 'react';

/** Whether an element has come near the window at least once: what it shows is read only then. */
export function useSeen<Element extends HTMLElement>(): [RefObject<Element | null>, boolean] {
  const ref = useRef<Element>(null);
  const [isSeen, setIsSeen] = useState(false);
  useEffect(() => {
    const element = ref.current;
    if (element === null || isSeen) return;
    const observer = new IntersectionObserver(
      (entries) => {
        if (entries.some((entry) => entry.isIntersecting)) setIsSeen(true);
      },
      { rootMargin: '600px 0px' },
    );
    observer.observe(element);
    return () => observer.disconnect();
  }, [isSeen]);
  return [ref, isSeen];
}
