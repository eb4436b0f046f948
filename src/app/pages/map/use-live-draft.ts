import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import type { BriefVersionRecord } from '../../../contract/briefs.ts';
import type { ProgrammeMap } from '../../../contract/programme-map.ts';
import { versionQuery } from '../../../features/briefs/brief-queries.ts';
import { readDraftValues } from '../../../features/briefs/draft.ts';
import {
  bodyOfLiveDraft,
  type LiveDraft,
  type LiveParameter,
  liveParameters,
  printLiveDraft,
  readLiveDraft,
} from '../../../features/runs/live-parameters.ts';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import type { MapAddress } from './map-address.ts';
import type { ChangeAddress } from './use-map-address.ts';

export interface LiveDraftState {
  /** The version that the sliders begin from; undefined while it is fetched. */
  readonly record: BriefVersionRecord | undefined;
  readonly parameters: readonly LiveParameter[];
  readonly draft: LiveDraft;
  /** null without a change. */
  readonly key: string | null;
  /** The changed brief, as the server is asked for it. */
  readonly body: Readonly<Record<string, unknown>> | null;
  readonly problems: Readonly<Record<string, string>>;
  readonly change: (draft: LiveDraft, isDone: boolean) => void;
}

interface LiveDraftInput {
  readonly ids: ProgrammeIds;
  readonly brief: ProgrammeMap['brief'];
  readonly address: MapAddress;
  readonly changeAddress: ChangeAddress;
}

/** The draft that the sliders make of the brief in view. It lives in the address; while a thumb is held, here. */
export function useLiveDraft({ ids, brief, address, changeAddress }: LiveDraftInput): LiveDraftState {
  const { teamId, programmeId } = ids;
  const found = useQuery({
    ...versionQuery({ teamId, programmeId, briefId: brief.briefId }, brief.version),
    placeholderData: keepPreviousData,
  });
  const record = found.data?.version.briefId === brief.briefId ? found.data : undefined;
  const [held, setHeld] = useState<{ readonly over: string | null; readonly draft: LiveDraft } | null>(null);
  const parameters = useMemo(() => (record === undefined ? [] : liveParameters(record.body)), [record]);
  const addressed = useMemo(() => readLiveDraft(address.draft, parameters), [address.draft, parameters]);
  // What is held counts until the address says something else: by the thumb that was let go, or by Back.
  const draft = held !== null && held.over === address.draft ? held.draft : addressed;
  const key = printLiveDraft(draft);
  const tried = useMemo(() => {
    if (record === undefined || key === null) return { body: null, problems: {} };
    const body = bodyOfLiveDraft(record.body, readLiveDraft(key, parameters));
    const reading = readDraftValues({ ...body });
    return reading.ok ? { body, problems: {} } : { body: null, problems: reading.problems };
  }, [record, key, parameters]);
  const change = (next: LiveDraft, isDone: boolean) => {
    setHeld({ over: address.draft, draft: next });
    if (!isDone) return;
    const printed = printLiveDraft(next);
    // Leaving the saved brief is a step that Back undoes; each further touch of a slider is none.
    if (printed !== address.draft)
      changeAddress({ draft: printed }, { replace: address.draft !== null && printed !== null });
  };
  return { record, parameters, draft, key, ...tried, change };
}
