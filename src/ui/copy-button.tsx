import { useEffect, useState } from 'react';
import { Button } from './button.tsx';

type CopyState = 'ready' | 'copied' | 'refused';

/** Puts a text on the clipboard and says whether it got there. */
export function CopyButton({ text, what }: { text: string; what: string }) {
  const [state, setState] = useState<CopyState>('ready');
  useEffect(() => {
    if (state === 'ready') return;
    const timer = setTimeout(() => setState('ready'), 2_500);
    return () => clearTimeout(timer);
  }, [state]);
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text);
      setState('copied');
    } catch {
      setState('refused');
    }
  };
  return (
    <Button look="quiet" onClick={copy} aria-label={state === 'ready' ? `Copy ${what}` : undefined}>
      <span aria-live="polite">
        {state === 'copied' ? 'Copied' : state === 'refused' ? 'The browser did not allow it' : 'Copy'}
      </span>
    </Button>
  );
}
