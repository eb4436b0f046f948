import { type ReactNode, useEffect, useRef, useState } from 'react';

/** Holds something wide, so that it scrolls and the page does not; the keyboard reaches it when there is more to see. */
export function ScrollInside({ label, children }: { label: string; children: ReactNode }) {
  const box = useRef<HTMLElement>(null);
  const [isCut, setIsCut] = useState(false);
  useEffect(() => {
    const watched = box.current;
    if (!watched) return;
    const measure = () => setIsCut(watched.scrollWidth > watched.clientWidth);
    const observer = new ResizeObserver(measure);
    observer.observe(watched);
    measure();
    return () => observer.disconnect();
  }, []);
  return (
    <section
      ref={box}
      className="relative max-w-full overflow-x-auto"
      {...(isCut ? { tabIndex: 0, 'aria-label': label } : {})}
    >
      {children}
    </section>
  );
}
