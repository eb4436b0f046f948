import { useMutation } from '@tanstack/react-query';
import { retryWeatherFile } from '../../contract/weather-acts.ts';
import { retryWeatherArchive } from '../../contract/weather-batches.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { useWeatherChanged } from './weather-queries.ts';

type Stopped = { readonly what: 'file' | 'archive'; readonly id: string; readonly name: string };

/** Begins again what stopped for a fault of ours. */
export function RetryButton({ what, id, name }: Stopped) {
  const { teamId } = useTeam();
  const changed = useWeatherChanged();
  const retry = useMutation({
    mutationFn: async () => {
      if (what === 'file') await call(retryWeatherFile, { params: { teamId, fileId: id }, query: {} });
      else await call(retryWeatherArchive, { params: { teamId, archiveId: id }, query: {} });
    },
    onSettled: changed,
  });
  return (
    <>
      <Button
        look="quiet"
        className="text-fine"
        busy={retry.isPending}
        aria-label={`Try ${name} again`}
        onClick={() => retry.mutate()}
      >
        Try again
      </Button>
      {retry.isError ? (
        <span role="alert" className="text-fine text-madder">
          {errorSentence(retry.error)}
        </span>
      ) : null}
    </>
  );
}
