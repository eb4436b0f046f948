import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { WeatherFile } from '../../contract/weather.ts';
import { actOnWeatherFiles, MAX_FILES_PER_ACT } from '../../contract/weather-acts.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { plural } from '../../lib/format.ts';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { RefuseOrWithdrawDialog } from './refuse-or-withdraw-dialog.tsx';
import { SupersedeDialog } from './supersede-dialog.tsx';
import { useWeatherChanged } from './weather-queries.ts';
import type { ChosenFiles } from './weather-table.tsx';

/** What is done to every chosen file. */
export type BulkAct =
  | { readonly act: 'accept' }
  | { readonly act: 'refuse' | 'withdraw'; readonly reason: string }
  | { readonly act: 'supersede'; readonly byFileId: string };

interface BulkActsProps {
  readonly chosen: ChosenFiles;
  /** The page in view, where the chosen files may have changed meanwhile. */
  readonly items: readonly WeatherFile[];
  readonly onChosen: (chosen: ChosenFiles) => void;
}

/** Acts that ask something first: why, or which file is the better one. */
const askedActs = ['refuse', 'withdraw', 'supersede'] as const;
type AskedAct = (typeof askedActs)[number];

const done: Readonly<Record<BulkAct['act'], string>> = {
  accept: 'accepted',
  refuse: 'refused',
  withdraw: 'withdrawn',
  supersede: 'superseded',
};

/** The chosen files and what may be done to all of them; afterwards, what could not be done and why. */
export function BulkActs({ chosen, items, onChosen }: BulkActsProps) {
  const { teamId } = useTeam();
  const changed = useWeatherChanged();
  const [asking, setAsking] = useState<AskedAct | null>(null);
  const fileIds = [...chosen.keys()];
  const act = useMutation({
    mutationFn: (body: BulkAct) =>
      call(actOnWeatherFiles, { params: { teamId }, query: {}, body: bodyOf(body, fileIds) }),
    onSuccess: ({ done: ids }) => onChosen(new Map([...chosen].filter(([id]) => !ids.includes(id)))),
    onSettled: () => {
      setAsking(null);
      changed();
    },
  });
  const files = [...chosen.values()].map((file) => items.find(({ id }) => id === file.id) ?? file);
  const elsewhere = files.filter(({ id }) => !items.some((item) => item.id === id)).length;
  return (
    <div className={files.length === 0 ? '' : 'sticky top-0 z-10 -mx-2 mb-2 border-y border-line bg-paper px-2 py-2'}>
      {files.length === 0 ? null : (
        <ChosenBar
          count={files.length}
          elsewhere={elsewhere}
          isBusy={act.isPending}
          onAccept={() => act.mutate({ act: 'accept' })}
          onAsk={setAsking}
          onNone={() => onChosen(new Map())}
        />
      )}
      <div className={act.isIdle || act.isPending ? '' : 'mt-2 mb-3'}>
        {act.isError ? (
          <Notice tone="wrong" live>
            {errorSentence(act.error)}
          </Notice>
        ) : null}
        {act.data && act.variables ? (
          <ActOutcome what={act.variables.act} answer={act.data} onClose={() => act.reset()} />
        ) : null}
      </div>
      {asking === 'refuse' || asking === 'withdraw' ? (
        <RefuseOrWithdrawDialog
          act={asking}
          count={files.length}
          isBusy={act.isPending}
          onClose={() => setAsking(null)}
          onReason={(reason) => act.mutate({ act: asking, reason })}
        />
      ) : null}
      {asking === 'supersede' ? (
        <SupersedeDialog
          files={files}
          isBusy={act.isPending}
          onClose={() => setAsking(null)}
          onBetter={(byFileId) => act.mutate({ act: 'supersede', byFileId })}
        />
      ) : null}
    </div>
  );
}

interface ChosenBarProps {
  readonly count: number;
  /** Chosen files that the page in view does not show. */
  readonly elsewhere: number;
  readonly isBusy: boolean;
  readonly onAccept: () => void;
  readonly onAsk: (act: AskedAct) => void;
  readonly onNone: () => void;
}

function ChosenBar({ count, elsewhere, isBusy, onAccept, onAsk, onNone }: ChosenBarProps) {
  const isTooMany = count > MAX_FILES_PER_ACT;
  return (
    <div className="flex flex-wrap items-center gap-x-3 gap-y-1.5">
      <p className="mr-auto font-medium">
        {plural(count, 'file')} chosen{elsewhere > 0 ? `, ${elsewhere} not on this page` : ''}
        {isTooMany ? `. At most ${MAX_FILES_PER_ACT} at once.` : ''}
      </p>
      <Button look="primary" busy={isBusy} disabled={isTooMany} onClick={onAccept}>
        Accept
      </Button>
      {askedActs.map((act) => (
        <Button key={act} disabled={isBusy || isTooMany} onClick={() => onAsk(act)}>
          {`${act.charAt(0).toUpperCase()}${act.slice(1)}`}
        </Button>
      ))}
      <Button look="quiet" onClick={onNone}>
        Choose none
      </Button>
    </div>
  );
}

/** The body in the form that the contract takes, which has one for each act. */
function bodyOf(act: BulkAct, fileIds: string[]) {
  switch (act.act) {
    case 'accept':
      return { act: act.act, fileIds };
    case 'supersede':
      return { act: act.act, fileIds, byFileId: act.byFileId };
    default:
      return { act: act.act, fileIds, reason: act.reason };
  }
}

interface ActOutcomeProps {
  readonly what: BulkAct['act'];
  readonly answer: {
    readonly done: readonly string[];
    readonly problems: readonly { fileId: string; name: string; message: string }[];
  };
  readonly onClose: () => void;
}

function ActOutcome({ what, answer, onClose }: ActOutcomeProps) {
  const { teamId } = useTeam();
  const { problems } = answer;
  return (
    <Notice
      tone={problems.length > 0 ? 'wrong' : 'note'}
      live
      title={`${plural(answer.done.length, 'file')} ${done[what]}${problems.length > 0 ? `, ${problems.length} could not be` : ''}`}
      actions={
        <Button look="quiet" onClick={onClose}>
          Close
        </Button>
      }
    >
      {problems.length > 0 ? (
        <ul className="max-h-60 overflow-y-auto">
          {problems.map(({ fileId, name, message }) => (
            <li key={fileId}>
              <Link to={paths.weatherFile.to(teamId, fileId)}>{name}</Link>: {message}
            </li>
          ))}
        </ul>
      ) : null}
    </Notice>
  );
}
