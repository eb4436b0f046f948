import { useCallback, useEffect, useRef, useState } from 'react';
import type { DraftValues } from './draft.ts';
import { type DraftKey, dropDraft, keepDraft } from './kept-draft.ts';

interface KeepInput {
  readonly key: DraftKey;
  readonly basedOn: number;
  readonly values: DraftValues;
  readonly isChanged: boolean;
}

/**
 * Keeps the draft as it is typed, and forgets it when nothing is changed any more. Only where the device keeps nothing does
 * leaving the page ask first.
 * @returns what forgets it for good, once it is saved
 */
export function useKeptDraft({ key, basedOn, values, isChanged }: KeepInput): () => void {
  const { personId, briefId } = key;
  const isSaved = useRef(false);
  const [outlasts, setOutlasts] = useState(true);
  useEffect(() => {
    if (isSaved.current) return;
    const held = { personId, briefId };
    if (isChanged) setOutlasts(keepDraft(held, { basedOn, keptAt: new Date().toISOString(), values }));
    else dropDraft(held);
  }, [personId, briefId, basedOn, values, isChanged]);
  useEffect(() => {
    if (outlasts || !isChanged) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [outlasts, isChanged]);
  return useCallback(() => {
    isSaved.current = true;
    dropDraft({ personId, briefId });
  }, [personId, briefId]);
}
