import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { BriefVersionView } from '../../contract/briefs.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { moment, sentence } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { BriefEditor } from './brief-editor.tsx';
import { type BriefKey, versionQuery, versionsQuery } from './brief-queries.ts';
import { useDraftBase } from './use-draft-base.ts';
import { UsedPanel } from './used-panel.tsx';
import { VersionsPanel } from './versions-panel.tsx';

/** One brief: its newest version as a form, every version, and where it is used. */
export function BriefPage() {
  const { teamId } = useTeam();
  const { programmeId = '', briefId = '' } = useParams();
  const briefKey = { teamId, programmeId, briefId };
  const versions = useQuery(versionsQuery(briefKey));
  const [newest] = versions.data?.items ?? [];
  return (
    <div className="mx-auto w-full max-w-[76rem] px-5 pt-6 pb-16 max-sm:px-4">
      <PageTitle>{newest?.name ?? 'Brief'}</PageTitle>
      {versions.isPending ? <Loading what="the brief" /> : null}
      {versions.isError && !versions.data ? (
        <BriefProblem briefKey={briefKey} error={versions.error} onRetry={() => versions.refetch()} />
      ) : null}
      {versions.data && newest ? (
        <Brief key={briefId} briefKey={briefKey} versions={versions.data.items} newest={newest} />
      ) : null}
    </div>
  );
}

interface BriefProps {
  readonly briefKey: BriefKey;
  readonly versions: readonly BriefVersionView[];
  readonly newest: BriefVersionView;
}

function Brief({ briefKey, versions, newest }: BriefProps) {
  const { draftKey, kept, base, saved, onSaved, leave, carry } = useDraftBase(briefKey, { versions, newest });
  const record = useQuery(versionQuery(briefKey, base));
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-8">
      <Heading briefKey={briefKey} newest={newest} />
      {saved === newest.version ? (
        <Notice live>Version {saved} is saved. Its scores follow on the map by themselves.</Notice>
      ) : null}
      {newest.version > base ? (
        <Notice
          tone="attention"
          live
          actions={
            <>
              <Button busy={carry.isPending} onClick={() => carry.mutate()}>
                Carry the changes over to version {newest.version}
              </Button>
              <Button onClick={leave}>Leave the draft, take version {newest.version}</Button>
            </>
          }
        >
          {newest.madeBy} saved version {newest.version} meanwhile. This draft began from version {base}.
          {carry.isError ? ` ${errorSentence(carry.error)}` : ''}
        </Notice>
      ) : null}
      {record.isError ? <Notice tone="wrong">{errorSentence(record.error)}</Notice> : null}
      {record.data ? (
        <>
          <BriefEditor
            key={`${base} ${kept?.keptAt}`}
            briefKey={briefKey}
            record={record.data}
            draftKey={draftKey}
            kept={kept}
            onSaved={onSaved}
          />
          <VersionsPanel briefKey={briefKey} versions={versions} />
          <UsedPanel briefKey={briefKey} record={record.data} />
        </>
      ) : null}
    </div>
  );
}

function Heading({ briefKey, newest }: Pick<BriefProps, 'briefKey' | 'newest'>) {
  return (
    <header>
      <p className="text-fine text-soft">
        <Link to={paths.briefs.to(briefKey)}>Briefs</Link>
      </p>
      <h1 className="text-title">{newest.name}</h1>
      <p className="mt-1 max-w-[70ch]">
        <span className="text-soft">
          Version {newest.version}, {newest.presetName}, saved by {newest.madeBy} on {moment(newest.madeAt)}.
        </span>{' '}
        {sentence(newest.sentence)}
      </p>
    </header>
  );
}

function BriefProblem({ briefKey, error, onRetry }: { briefKey: BriefKey; error: unknown; onRetry: () => void }) {
  const isGone = isApiError(error, 'not_found') || isApiError(error, 'invalid_input');
  return (
    <Notice
      tone="wrong"
      live
      actions={
        isGone ? (
          <Link className={buttonLook('plain')} to={paths.briefs.to(briefKey)}>
            Go to the briefs
          </Link>
        ) : (
          <Button onClick={onRetry}>Try again</Button>
        )
      }
    >
      {isGone ? 'There is no such brief in this programme.' : errorSentence(error)}
    </Notice>
  );
}
