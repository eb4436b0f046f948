import { type RefObject, useEffect, useState } from 'react';

/** Whether an element is at least so wide. Wide until it has been measured. */
export function useIsWide(element: RefObject<HTMLElement | null>, leastPx: number): boolean {
  const [isWide, setWide] = useState(true);
  useEffect(() => {
    const watched = element.current;
    if (watched === null) return;
    const measure = () => setWide(watched.clientWidth >= leastPx);
    const observer = new ResizeObserver(measure);
    observer.observe(watched);
    measure();
    return () => observer.disconnect();
  }, [element, leastPx]);
  return isWide;
}
