import { useMutation } from '@tanstack/react-query';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import type { SiteDesk } from './use-site-desk.ts';

/** Somebody else was quicker: what they did, and what can be done about what was typed here. */
export function ConflictNotice({ desk, onSettled }: { desk: SiteDesk; onSettled: () => void }) {
  const over = useMutation({ mutationFn: desk.saveOver, onSuccess: onSettled });
  if (desk.conflict === null) return null;
  const { error } = desk.conflict;
  return (
    // Whatever panel the person is at, it stands in view.
    <div className="sticky top-0 z-10 -mx-3 border-b border-line bg-paper px-3 py-3">
      <Notice
        tone="attention"
        live
        title="Not saved: somebody changed this site meanwhile"
        actions={
          <>
            <Button look="primary" busy={over.isPending} onClick={() => over.mutate()}>
              Save mine on top
            </Button>
            <Button
              onClick={() => {
                desk.forgetConflict();
                onSettled();
              }}
            >
              Keep what is there now
            </Button>
          </>
        }
      >
        <p>{error.message}</p>
        <ul className="mt-1 list-disc pl-5">
          {error.problems.map(({ message }) => (
            <li key={message}>{message}</li>
          ))}
        </ul>
      </Notice>
    </div>
  );
}
