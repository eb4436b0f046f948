import { useQuery } from '@tanstack/react-query';
import { errorSentence } from '../../lib/api-error.ts';
import { plural } from '../../lib/format.ts';
import { BatchCard } from './batch-card.tsx';
import { useUploads } from './page-uploads.ts';
import { isUnderWay } from './upload-queue.ts';
import { batchesQuery } from './weather-queries.ts';

/** Batches that are under way and the latest one; what came before stands in a fold. */
export function BatchList({ teamId }: { teamId: string }) {
  const batches = useQuery(batchesQuery(teamId));
  const sendingInto = new Set(
    useUploads(teamId)
      .filter(isUnderWay)
      .map(({ batchId }) => batchId),
  );
  if (batches.isError) {
    return (
      <p role="alert" className="text-madder">
        The batches could not be fetched. {errorSentence(batches.error)}
      </p>
    );
  }
  const items = batches.data?.items ?? [];
  if (items.length === 0) return null;
  const shown = items.filter((batch, index) => index === 0 || !batch.ended || sendingInto.has(batch.id));
  const earlier = items.filter((batch) => !shown.includes(batch));
  return (
    <section aria-labelledby="batches" className="border-b border-line bg-paper px-4">
      <h2 id="batches" className="sr-only">
        Batches
      </h2>
      <ul>
        {shown.map((batch) => (
          <BatchCard key={batch.id} batch={batch} />
        ))}
      </ul>
      {earlier.length > 0 ? (
        <details className="border-t border-line">
          <summary className="cursor-pointer py-2 text-fine text-indigo">
            {plural(earlier.length, 'earlier batch', 'earlier batches')}
          </summary>
          <ul>
            {earlier.map((batch) => (
              <BatchCard key={batch.id} batch={batch} />
            ))}
          </ul>
        </details>
      ) : null}
    </section>
  );
}
