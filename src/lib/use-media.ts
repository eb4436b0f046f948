import { useSyncExternalStore } from 'react';

/** Whether a CSS media query holds now. */
export function useMedia(query: string): boolean {
  return useSyncExternalStore(
    (changed) => {
      const media = window.matchMedia(query);
      media.addEventListener('change', changed);
      return () => media.removeEventListener('change', changed);
    },
    () => window.matchMedia(query).matches,
  );
}

/** The widths at which the margins of a sheet stand beside it; narrower, they become a bottom sheet. */
export const WIDE = '(min-width: 64rem)';
