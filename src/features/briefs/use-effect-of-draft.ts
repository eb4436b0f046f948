import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import type { BriefDraft } from '../../contract/brief-body.ts';
import { type ProgrammeKey, previewQuery } from './brief-queries.ts';

const REST_MS = 250;

/** The value once it has rested. */
export function useRested<T>(value: T): T {
  const [rested, setRested] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setRested(value), REST_MS);
    return () => clearTimeout(timer);
  }, [value]);
  return rested;
}

interface Asked {
  readonly stationId: string | null;
  /** Null while the draft has faults. */
  readonly draft: BriefDraft | null;
  readonly saved: BriefDraft;
}

/** The example year under the draft and under the saved version; the draft's last answer stands until its next is there. */
export function useEffectOfDraft(key: ProgrammeKey, { stationId, draft, saved }: Asked) {
  const asked = { stationId: stationId ?? '', body: draft ?? saved };
  const now = useQuery({
    ...previewQuery(key, asked),
    enabled: stationId !== null && draft !== null,
    placeholderData: keepPreviousData,
  });
  const before = useQuery({
    ...previewQuery(key, { stationId: stationId ?? '', body: saved }),
    enabled: stationId !== null,
  });
  return { now, before };
}
