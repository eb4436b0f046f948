import type { Site } from '../../contract/sites.ts';
import { SeverityMark } from '../../ui/status-mark.tsx';
import { flagWord } from './site-words.ts';

/** What about a site asks for a look; a filled mark while it waits for a person. */
export function SiteFlags({ flags, toSettle }: Pick<Site, 'flags' | 'toSettle'>) {
  if (flags.length === 0) return <span className="text-soft">–</span>;
  const isOpen = toSettle || flags.some((flag) => flag !== 'far' && flag !== 'height');
  return (
    <span className="flex items-center gap-1.5">
      <SeverityMark severity={isOpen ? 'doubt' : 'note'} />
      {flags.map((flag, index) => (index === 0 ? flagWord[flag] : flagWord[flag].toLowerCase())).join(', ')}
    </span>
  );
}
