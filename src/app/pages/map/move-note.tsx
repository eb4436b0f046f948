import { Button } from '../../../ui/button.tsx';
import type { SiteMoving } from './use-move-site.ts';

/** What came of dragging a site, over the head of the map. */
export function MoveNote({ moving: { said, forget } }: { moving: SiteMoving }) {
  if (said === null) return null;
  return (
    <div
      role={said.tone === 'wrong' ? 'alert' : 'status'}
      className={`absolute top-8 left-1/2 z-10 flex max-w-[min(36rem,90%)] -translate-x-1/2 flex-wrap items-center gap-x-3 border bg-paper px-3 py-1.5 shadow-float ${
        said.tone === 'wrong' ? 'border-madder' : 'border-ink/60'
      }`}
    >
      <p>{said.text}</p>
      {said.undo === null ? null : (
        <Button look="quiet" onClick={said.undo}>
          Move it back
        </Button>
      )}
      <Button look="quiet" onClick={forget}>
        Close
      </Button>
    </div>
  );
}
