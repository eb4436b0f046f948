import { useMutation } from '@tanstack/react-query';
import { saveBriefVersion } from '../../contract/briefs.ts';
import { call } from '../../lib/api-client.ts';
import { isApiError } from '../../lib/api-error.ts';
import type { BriefKey } from './brief-queries.ts';
import { bodyOfDraft, type DraftProblems, type DraftValues } from './draft.ts';

interface SaveInput {
  /** The version that the draft began from. */
  readonly basedOn: number;
  readonly onSaved: (version: number) => void;
}

/** Saves the draft as the next version. */
export function useSaveDraft({ teamId, programmeId, briefId }: BriefKey, { basedOn, onSaved }: SaveInput) {
  return useMutation({
    mutationFn: (draft: DraftValues) => {
      const body = { basedOn, body: bodyOfDraft(draft) };
      return call(saveBriefVersion, { params: { teamId, programmeId, briefId }, query: {}, body });
    },
    onSuccess: ({ version }) => onSaved(version.version),
  });
}

/** What the server found where this page did not, by field. */
export function problemsOfSaving(error: unknown): DraftProblems {
  if (!isApiError(error)) return {};
  return Object.fromEntries(
    error.problems.map(({ path, message }) => [(path ?? '').replace(/^body\.body\.?/, ''), message]),
  );
}
