import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { type BriefVersionView, listBriefs, listBriefVersions } from '../../contract/briefs.ts';
import { sessionQuery } from '../../lib/session-query.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { type BriefKey, versionQuery } from './brief-queries.ts';
import { mayChangeBriefs } from './brief-words.ts';
import { carriedOver } from './draft.ts';
import { dropDraft, findDraft, type KeptDraft } from './kept-draft.ts';

interface Versions {
  readonly versions: readonly BriefVersionView[];
  readonly newest: BriefVersionView;
}

/**
 * The version that the form begins from, with a draft that was left on it. It stays when somebody saves another version
 * meanwhile, until the draft is carried over to that version or left.
 */
export function useDraftBase(briefKey: BriefKey, { versions, newest }: Versions) {
  const client = useQueryClient();
  const { data: session } = useQuery(sessionQuery);
  const mayChange = mayChangeBriefs(useTeam().role);
  const draftKey = { personId: session?.person?.id ?? '', briefId: briefKey.briefId };
  const [kept, setKept] = useState(() => (mayChange ? findDraft(draftKey) : null));
  const [base, setBase] = useState(() => baseOf(kept, { versions, newest }));
  const [saved, setSaved] = useState<number | null>(null);
  const begin = (version: number, draft: KeptDraft | null) => {
    setKept(draft);
    setBase(version);
  };
  const onSaved = (version: number) => {
    begin(version, null);
    setSaved(version);
    for (const { path } of [listBriefs, listBriefVersions]) client.invalidateQueries({ queryKey: [path] });
  };
  const leave = () => {
    dropDraft(draftKey);
    begin(newest.version, null);
  };
  const bodyOf = async (version: number) => (await client.ensureQueryData(versionQuery(briefKey, version))).body;
  const carry = useMutation({
    mutationFn: async () => {
      const held = findDraft(draftKey);
      if (held === null) return null;
      const values = carriedOver(held.values, { from: await bodyOf(base), to: await bodyOf(newest.version) });
      return { values, basedOn: newest.version, keptAt: new Date().toISOString() };
    },
    onSuccess: (draft) => begin(newest.version, draft),
  });
  return { draftKey, kept, base, saved, onSaved, leave, carry };
}

/** A kept draft is taken up on its own version, as long as that is there. */
function baseOf(kept: KeptDraft | null, { versions, newest }: Versions): number {
  const isThere = versions.some(({ version }) => version === kept?.basedOn);
  return kept !== null && isThere ? kept.basedOn : newest.version;
}
