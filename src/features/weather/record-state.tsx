import { useMutation, useQueryClient } from '@tanstack/react-query';
import { type ReactNode, useState } from 'react';
import { Link } from 'react-router-dom';
import { getWeatherFile, type WeatherFile, type WeatherFileRecord } from '../../contract/weather.ts';
import { acceptWeatherFile } from '../../contract/weather-acts.ts';
import { listWeatherFiles } from '../../contract/weather-library.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiKey } from '../../lib/api-query.ts';
import { plural } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Notice, type NoticeTone } from '../../ui/notice.tsx';
import { StatusMark } from '../../ui/status-mark.tsx';
import { ReadingSteps } from './reading-steps.tsx';
import { RecordDecision } from './record-decision.tsx';
import { RetryButton } from './retry-button.tsx';
import { mayChangeWeather, statusWords } from './weather-words.ts';
import { WithdrawDialog } from './withdraw-dialog.tsx';

const tones: Readonly<Record<WeatherFile['status'], NoticeTone>> = {
  reading: 'note',
  asks: 'attention',
  review: 'attention',
  accepted: 'note',
  refused: 'wrong',
  withdrawn: 'note',
  superseded: 'note',
};

/** Where the file stands, what that means, and what the reader may do about it. */
export function RecordState({ record }: { record: WeatherFileRecord }) {
  const { teamId, role, programmes } = useTeam();
  const { file } = record;
  const mayChange = mayChangeWeather(role);
  const programme = programmes[0];
  return (
    <Notice
      tone={file.failure === null ? tones[file.status] : 'wrong'}
      actions={
        <div className="no-print flex flex-wrap gap-2">
          {mayChange && file.failure !== null ? <RetryButton what="file" id={file.id} name={file.name} /> : null}
          {mayChange && file.status === 'review' ? <AcceptButton file={file} /> : null}
          {file.status === 'accepted' && file.stationId && programme ? (
            <Link
              className={buttonLook('plain')}
              to={paths.map.to({ teamId, programmeId: programme.id }, file.stationId)}
            >
              Show on the map
            </Link>
          ) : null}
          {mayChange && file.status === 'accepted' && file.parent === null ? (
            <Link className={buttonLook('plain')} to={paths.climate.to(teamId, file.id)}>
              Change the climate
            </Link>
          ) : null}
          {mayChange && isWithdrawable(file) ? <WithdrawButton file={file} /> : null}
        </div>
      }
    >
      <p className="flex items-center gap-2 font-semibold" role="status">
        <StatusMark status={file.status} failed={file.failure !== null} />
        {statusWords(file)}
      </p>
      <div className="mt-1">{stateSentence(record, mayChange)}</div>
      <RecordDecision record={record} />
    </Notice>
  );
}

function isWithdrawable({ status }: WeatherFile): boolean {
  return status === 'accepted' || status === 'review' || status === 'asks';
}

function stateSentence({ file, findings }: WeatherFileRecord, mayChange: boolean): ReactNode {
  if (file.failure !== null) return `${file.failure} The original is kept.`;
  const name = file.station?.name ?? 'the station';
  switch (file.status) {
    case 'reading':
      return <ReadingSteps file={file} />;
    case 'review': {
      const doubts = findings.filter(({ severity }) => severity === 'doubt').length;
      const read = doubts > 0 ? `Read the ${plural(doubts, 'doubt')} below first. ` : '';
      return mayChange
        ? `${read}Accepting puts ${name} on the map and tests this year against the briefs of the team. Your name is kept with it.`
        : 'Waits for an engineer of the team to accept it.';
    }
    case 'asks':
      return mayChange
        ? 'It cannot be accepted as it stands. Answer below what it asks; it is then read again.'
        : 'Waits for an engineer of the team to answer what it asks.';
    case 'accepted':
      if (file.parent !== null)
        return 'Tested against the briefs of the team, beside its parent. It is in no score of the station.';
      return `${name} stands on the map, and this year is tested against the briefs of the team.`;
    case 'refused':
      return 'Nothing of it is used. Put right what is listed below, then upload the file again.';
    case 'withdrawn':
      if (file.parent !== null)
        return 'It no longer stands beside its parent. Its record and the results made from it are kept.';
      return 'It no longer counts. Its record and its original are kept.';
    case 'superseded':
      return 'A better file stands in its place. Results that rest on this one are kept.';
  }
}

/** Marks every answer that a changed file makes stale. */
function useFileChanged(): () => void {
  const client = useQueryClient();
  return () => {
    for (const endpoint of [listWeatherFiles, getWeatherFile]) client.invalidateQueries({ queryKey: apiKey(endpoint) });
  };
}

function AcceptButton({ file }: { file: WeatherFile }) {
  const { teamId } = useTeam();
  const changed = useFileChanged();
  const accept = useMutation({
    mutationFn: () => call(acceptWeatherFile, { params: { teamId, fileId: file.id }, query: {} }),
    // Also after a refusal: someone else may have changed the file a moment ago.
    onSettled: changed,
  });
  return (
    <>
      <Button look="primary" busy={accept.isPending} onClick={() => accept.mutate()}>
        Accept
      </Button>
      {accept.isError ? (
        <p role="alert" className="w-full text-madder">
          {errorSentence(accept.error)}
        </p>
      ) : null}
    </>
  );
}

function WithdrawButton({ file }: { file: WeatherFile }) {
  const [isOpen, setIsOpen] = useState(false);
  const changed = useFileChanged();
  return (
    <>
      <Button onClick={() => setIsOpen(true)}>Withdraw</Button>
      {isOpen ? <WithdrawDialog file={file} onClose={() => setIsOpen(false)} onChanged={changed} /> : null}
    </>
  );
}
