import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { type BriefVersionView, listBriefs, listBriefVersions } from '../../contract/briefs.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { moment, sentence } from '../../lib/format.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { sessionQuery } from '../../lib/session-query.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { BriefEditor } from './brief-editor.tsx';
import { type BriefKey, versionQuery, versionsQuery } from './brief-queries.ts';
import { mayChangeBriefs } from './brief-words.ts';
import { carriedOver } from './draft.ts';
import { dropDraft, findDraft, type KeptDraft } from './kept-draft.ts';
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
  const client = useQueryClient();
  const { data: session } = useQuery(sessionQuery);
  const draftKey = { personId: session?.person?.id ?? '', briefId: briefKey.briefId };
  const mayChange = mayChangeBriefs(useTeam().role);
  const [kept, setKept] = useState(() => (mayChange ? findDraft(draftKey) : null));
  // The draft stays on the version that it began from, also when somebody saves another meanwhile.
  const [base, setBase] = useState(() => baseOf(kept, { versions, newest }));
  const [saved, setSaved] = useState<number | null>(null);
  const record = useQuery(versionQuery(briefKey, base));
  const begin = (version: number, draft: KeptDraft | null) => {
    setKept(draft);
    setBase(version);
  };
  const onSaved = (version: number) => {
    begin(version, null);
    setSaved(version);
    for (const { path } of [listBriefs, listBriefVersions]) client.invalidateQueries({ queryKey: [path] });
  };
  const leaveDraft = () => {
    dropDraft(draftKey);
    begin(newest.version, null);
  };
  const carry = useMutation({
    mutationFn: async () => {
      const held = findDraft(draftKey);
      const [from, to] = await Promise.all(
        [base, newest.version].map((version) => client.ensureQueryData(versionQuery(briefKey, version))),
      );
      if (held === null || from === undefined || to === undefined) return null;
      const values = carriedOver(held.values, { from: from.body, to: to.body });
      return { values, basedOn: newest.version, keptAt: new Date().toISOString() };
    },
    onSuccess: (draft) => begin(newest.version, draft),
  });
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-8">
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
              <Button onClick={leaveDraft}>Leave the draft, take version {newest.version}</Button>
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

/** A kept draft is taken up on its own version, unless nobody may know of that version any more. */
function baseOf(kept: KeptDraft | null, { versions, newest }: Pick<BriefProps, 'versions' | 'newest'>): number {
  const isThere = versions.some(({ version }) => version === kept?.basedOn);
  return kept !== null && isThere ? kept.basedOn : newest.version;
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
