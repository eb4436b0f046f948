import { plural } from '../../lib/format.ts';
import { ReasonDialog } from '../../ui/reason-dialog.tsx';

interface RefuseOrWithdrawDialogProps {
  readonly act: 'refuse' | 'withdraw';
  /** So many files. */
  readonly count: number;
  readonly isBusy: boolean;
  readonly onClose: () => void;
  readonly onReason: (reason: string) => void;
}

const words = {
  refuse: {
    title: 'Refuse',
    follows:
      'Nothing of what is refused is used. Records and originals are kept. A file that is accepted cannot be refused; withdraw it.',
  },
  withdraw: {
    title: 'Withdraw',
    follows:
      'What is withdrawn no longer counts in any score of the team. Records, originals and the results made from them are kept.',
  },
} as const;

/** Asks why many files are refused or withdrawn, and says what follows. */
export function RefuseOrWithdrawDialog({ act, count, isBusy, onClose, onReason }: RefuseOrWithdrawDialogProps) {
  const { title, follows } = words[act];
  return (
    <ReasonDialog
      title={`${title} ${plural(count, 'weather file')}`}
      hint="Kept with each file for those who ask later."
      leave="Leave them"
      act={`${title} ${plural(count, 'file')}`}
      isBusy={isBusy}
      onClose={onClose}
      onReason={onReason}
    >
      {follows}
    </ReasonDialog>
  );
}
