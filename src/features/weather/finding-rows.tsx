import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Finding } from '../../contract/weather.ts';
import { getWeatherFileLines } from '../../contract/weather-reading.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { apiQuery } from '../../lib/api-query.ts';
import { number } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { Loading } from '../../ui/loading.tsx';
import { Notice } from '../../ui/notice.tsx';
import { ScrollInside } from '../../ui/scroll-inside.tsx';

/** Lines that are shown before and after those concerned, and lines at once. */
const AROUND = 3;
const AT_ONCE = 30;

interface FindingRowsProps {
  readonly fileId: string;
  readonly finding: Finding & { readonly line: number };
}

/** The original's lines around those that a finding concerns, as they stand, the concerned ones marked. */
export function FindingRows({ fileId, finding }: FindingRowsProps) {
  const { teamId } = useTeam();
  const firstShown = Math.max(1, finding.line - AROUND);
  const [from, setFrom] = useState(firstShown);
  const last = finding.lastLine ?? finding.line;
  const count = Math.min(AT_ONCE, last + AROUND - from + 1);
  const lines = useQuery(apiQuery(getWeatherFileLines, { params: { teamId, fileId }, query: { from, count } }));
  if (lines.isPending) return <Loading what="the lines of the original" />;
  if (lines.isError) {
    return (
      <Notice tone="wrong" live actions={<Button onClick={() => lines.refetch()}>Try again</Button>}>
        {errorSentence(lines.error)}
      </Notice>
    );
  }
  const shown = lines.data.lines;
  if (shown.length === 0) return <p className="text-soft">The original has no such lines, or it is no text.</p>;
  const end = from + count - 1;
  const isWhole = end >= Math.min(last + AROUND, lines.data.total) && from === firstShown;
  return (
    <div className="my-2">
      <ScrollInside label={`Lines ${from} to ${end} of the original, scrolls sideways`}>
        <ol className="min-w-max border-y border-line py-1 font-mono text-fine">
          {shown.map(({ line, text, cut }) => {
            const isConcerned = line >= finding.line && line <= last;
            return (
              <li
                key={line}
                className={`grid grid-cols-[5rem_minmax(0,1fr)] gap-2 border-l-3 pl-2 whitespace-pre ${
                  isConcerned ? 'border-madder bg-shade' : 'border-transparent text-soft'
                }`}
              >
                <span className="text-right text-soft">
                  {isConcerned ? <span className="sr-only">Concerned: </span> : null}
                  {number(line)}
                </span>
                <span>
                  {text}
                  {cut ? ' …' : ''}
                </span>
              </li>
            );
          })}
        </ol>
      </ScrollInside>
      {isWhole ? null : (
        <p className="no-print mt-1 flex flex-wrap items-center gap-3 text-fine text-soft">
          Lines {number(from)} to {number(Math.min(end, lines.data.total))} of {number(firstShown)} to {number(last)}.
          {from > firstShown ? (
            <Button look="quiet" onClick={() => setFrom(Math.max(firstShown, from - AT_ONCE))}>
              Earlier lines
            </Button>
          ) : null}
          {end < Math.min(last, lines.data.total) ? (
            <Button look="quiet" onClick={() => setFrom(from + AT_ONCE)}>
              Later lines
            </Button>
          ) : null}
        </p>
      )}
    </div>
  );
}
