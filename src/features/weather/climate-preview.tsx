import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { DifferenceTables } from './climate-difference.tsx';
import { serverFaultWords } from './climate-words.ts';
import { type ClimateChange, previewQuery } from './weather-queries.ts';

/** Typing rests so long before the server is asked. */
const REST_MS = 350;

interface PreviewProps {
  readonly fileId: string;
  /** Null while the form has faults: the last preview then stands, pale. */
  readonly change: ClimateChange | null;
  readonly changes: boolean;
}

/** What the change makes of the year; nothing is stored. */
export function ClimatePreview({ fileId, change, changes }: PreviewProps) {
  const { teamId } = useTeam();
  const asked = useRested(change);
  const preview = useQuery({
    ...previewQuery({ teamId, fileId }, asked),
    enabled: asked !== null && changes,
    placeholderData: keepPreviousData,
    retry: false,
  });
  const isStale = preview.isPlaceholderData || JSON.stringify(change) !== JSON.stringify(asked);
  return (
    <section aria-labelledby="preview" aria-busy={isStale}>
      <h2 id="preview" className="mb-2 text-name">
        Before and after
      </h2>
      {!changes && change !== null ? (
        <p className="text-soft">Nothing changes yet. Type a change, read a table, or begin from the example.</p>
      ) : null}
      {changes && preview.isLoading ? <Loading what="the preview" /> : null}
      {changes && preview.isError ? <PreviewProblem error={preview.error} onRetry={() => preview.refetch()} /> : null}
      {preview.data && !preview.isError && (changes || change === null) ? (
        <div className={isStale ? 'opacity-50' : ''}>
          <p className="mb-4 max-w-[70ch] font-medium">{capital(preview.data.words)}.</p>
          <DifferenceTables difference={preview.data.difference} cappedHours={preview.data.cappedHours} />
        </div>
      ) : null}
    </section>
  );
}

function PreviewProblem({ error, onRetry }: { error: unknown; onRetry: () => void }) {
  const problems = isApiError(error) ? error.problems : [];
  if (problems.length === 0) {
    return (
      <Notice tone="wrong" live actions={<Button onClick={onRetry}>Try again</Button>}>
        {errorSentence(error)}
      </Notice>
    );
  }
  return (
    <Notice tone="wrong" live title={errorSentence(error)}>
      <ul>
        {problems.map((problem) => (
          <li key={`${problem.path} ${problem.message}`}>{serverFaultWords(problem)}</li>
        ))}
      </ul>
    </Notice>
  );
}

/** The change once typing has rested; while the form has faults, its last state without one. */
function useRested(change: ClimateChange | null): ClimateChange | null {
  const [rested, setRested] = useState(change);
  const text = JSON.stringify(change);
  // biome-ignore lint/correctness/useExhaustiveDependencies: a change is the same when its text is
  useEffect(() => {
    if (change === null) return;
    const timer = setTimeout(() => setRested(change), REST_MS);
    return () => clearTimeout(timer);
  }, [text]);
  return rested;
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
