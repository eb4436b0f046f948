import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type ApiToken, listTokens, revokeToken } from '../../../contract/tokens.ts';
import { call } from '../../../lib/api-client.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiKey } from '../../../lib/api-query.ts';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';
import { Notice } from '../../../ui/notice.tsx';

/** Asks once more before a program loses its way in. */
export function RevokeDialog({ teamId, token, onClose }: { teamId: string; token: ApiToken; onClose: () => void }) {
  const client = useQueryClient();
  const revoke = useMutation({
    mutationFn: () => call(revokeToken, { params: { teamId, tokenId: token.id }, query: {} }),
    onSuccess: onClose,
    onSettled: () => client.invalidateQueries({ queryKey: apiKey(listTokens) }),
  });
  return (
    <Dialog isOpen onClose={onClose} title={`Revoke ${token.name}`}>
      <div className="grid gap-4">
        <p>Programs that use it are refused at once, and it cannot be made valid again. Its record stays.</p>
        {revoke.isError ? (
          <Notice tone="wrong" live>
            {errorSentence(revoke.error)}
          </Notice>
        ) : null}
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Keep it</Button>
          <Button look="primary" busy={revoke.isPending} onClick={() => revoke.mutate()}>
            Revoke the token
          </Button>
        </div>
      </div>
    </Dialog>
  );
}
