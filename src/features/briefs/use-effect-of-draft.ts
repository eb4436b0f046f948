import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import type { BriefPreview, BriefVersionRecord } from '../../contract/briefs.ts';
import type { Brief } from '../../engine/brief/brief.ts';
import { type ProgrammeKey, previewQuery } from './brief-queries.ts';
import type { DraftReading } from './draft.ts';

const REST_MS = 250;

export interface DraftEffect {
  readonly stationId: string | null;
  readonly setStation: (stationId: string) => void;
  readonly now: BriefPreview | undefined;
  /** The same year under the version that the draft begins from. */
  readonly before: BriefPreview | undefined;
  /** Older than the form: the answer to it is on its way. */
  readonly isStale: boolean;
  readonly error: unknown;
}

/** An example year under the draft and under the version that it begins from; the last answer stands until the next is there. */
export function useEffectOfDraft(
  key: ProgrammeKey,
  { record, reading }: { record: BriefVersionRecord; reading: DraftReading },
): DraftEffect {
  const { body: saved, stations } = record;
  const [chosen, setStation] = useState<string | null>(null);
  const stationId = chosen ?? stations[0]?.id ?? null;
  const draft = reading.ok ? reading.brief : null;
  const tried = useLastWithoutFault(draft, saved);
  const enabled = stationId !== null;
  const asked = { stationId: stationId ?? '', body: { ...tried } };
  const now = useQuery({ ...previewQuery(key, asked), enabled, placeholderData: keepPreviousData });
  const before = useQuery({ ...previewQuery(key, { ...asked, body: saved }), enabled });
  const isStale = now.isPlaceholderData || now.data === undefined || tried !== draft;
  return { stationId, setStation, now: now.data, before: before.data, isStale, error: now.error };
}

/** The draft once it has rested; while it has faults, its last state without one. */
function useLastWithoutFault(draft: Brief | null, first: Brief): Brief {
  const [tried, setTried] = useState(first);
  useEffect(() => {
    if (draft === null) return;
    const timer = setTimeout(() => setTried(draft), REST_MS);
    return () => clearTimeout(timer);
  }, [draft]);
  return tried;
}
