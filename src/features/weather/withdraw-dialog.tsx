import { useMutation } from '@tanstack/react-query';
import type { WeatherFile } from '../../contract/weather.ts';
import { withdrawWeatherFile } from '../../contract/weather-acts.ts';
import { call } from '../../lib/api-client.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { ReasonDialog } from '../../ui/reason-dialog.tsx';

interface WithdrawDialogProps {
  readonly file: WeatherFile;
  readonly onClose: () => void;
  readonly onChanged: () => void;
}

/** Asks why a file is withdrawn, and says what follows. */
export function WithdrawDialog({ file, onClose, onChanged }: WithdrawDialogProps) {
  const { teamId } = useTeam();
  const withdraw = useMutation({
    mutationFn: (reason: string) =>
      call(withdrawWeatherFile, { params: { teamId, fileId: file.id }, query: {}, body: { reason } }),
    onSuccess: onClose,
    onSettled: onChanged,
  });
  return (
    <ReasonDialog
      title="Withdraw this weather file"
      hint="Kept with the file for those who ask later."
      leave="Keep it"
      act="Withdraw the file"
      isBusy={withdraw.isPending}
      error={withdraw.error}
      onClose={onClose}
      onReason={(reason) => withdraw.mutate(reason)}
    >
      {file.parent !== null
        ? 'It no longer stands beside its parent. Its record and the results made from it are kept.'
        : file.status === 'accepted'
          ? 'Its year no longer counts in any score of the team. Its record, its original and the results made from it are kept.'
          : 'It leaves the review and is not used. Its record and its original are kept.'}
    </ReasonDialog>
  );
}
