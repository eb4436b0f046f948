import { lazy, Suspense, useEffect, useState } from 'react';
import { Button } from '../../../ui/button.tsx';

const KeyboardDialog = lazy(async () => ({ default: (await import('./keyboard-dialog.tsx')).KeyboardDialog }));

/** How the page is walked by the keyboard: a button, and the question mark while the map has the focus. */
export function KeyboardHelp() {
  const [isOpen, setOpen] = useState(false);
  useEffect(() => {
    // Elsewhere a letter belongs to what is being typed, or to somebody who speaks to the page.
    const press = ({ key, target }: KeyboardEvent) => {
      if (key === '?' && target instanceof Element && target.closest('[data-sheet-map]') !== null) setOpen(true);
    };
    document.addEventListener('keydown', press);
    return () => document.removeEventListener('keydown', press);
  }, []);
  return (
    <>
      <p>
        <Button look="quiet" className="text-fine" onClick={() => setOpen(true)}>
          By keyboard
        </Button>
      </p>
      {isOpen ? (
        <Suspense>
          <KeyboardDialog onClose={() => setOpen(false)} />
        </Suspense>
      ) : null}
    </>
  );
}
