import { useEffect, useState } from 'react';

const QUIET_MS = 250;

/** Says what is being fetched, once it has taken long enough to wonder. */
export function Loading({ what }: { what: string }) {
  const [shown, setShown] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setShown(true), QUIET_MS);
    return () => clearTimeout(timer);
  }, []);
  return (
    <p role="status" className="p-5 text-soft">
      {shown ? `Fetching ${what}.` : ''}
    </p>
  );
}
