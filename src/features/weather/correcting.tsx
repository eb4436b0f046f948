import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { WeatherFileRecord } from '../../contract/weather.ts';
import type { FileAnswers } from '../../contract/weather-reading.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Loading } from '../../ui/loading.tsx';
import { AnswerForm } from './answer-form.tsx';
import type { Mapping } from './mapping-draft.ts';
import { tableGuessOf } from './table-guess-of-lines.ts';
import { firstLinesQuery } from './weather-queries.ts';

interface CorrectingProps {
  readonly record: WeatherFileRecord;
  readonly onAnswered: (answers: FileAnswers) => void;
}

/** Corrects, of a file that waits or was refused, its place and how its table is read. */
export function Correcting({ record, onAnswered }: CorrectingProps) {
  const [isOpen, setIsOpen] = useState(false);
  const { mapping } = record.answers;
  return (
    <details className="border-y border-line" onToggle={({ currentTarget }) => setIsOpen(currentTarget.open)}>
      <summary className="cursor-pointer py-2 text-indigo">
        {mapping ? 'Correct the place, or how the file is read' : 'Correct the place, or how gaps are treated'}
      </summary>
      {isOpen ? (
        <div className="pt-2 pb-4">
          <h2 id="answering" className="sr-only">
            Corrections
          </h2>
          {record.file.format === 'table' && !mapping ? (
            <p className="mb-3 max-w-[80ch] text-soft">
              How this table is read was answered for another file of its shape; it is corrected there.
            </p>
          ) : null}
          {mapping ? (
            <TableCorrection record={record} mapping={mapping} onAnswered={onAnswered} />
          ) : (
            <AnswerForm record={record} onAnswered={onAnswered} />
          )}
        </div>
      ) : null}
    </details>
  );
}

/** A table that has been read says no more what its columns are; its first lines do. */
function TableCorrection({ record, mapping, onAnswered }: CorrectingProps & { mapping: Mapping }) {
  const { teamId } = useTeam();
  const lines = useQuery(firstLinesQuery(teamId, record.file.id));
  if (lines.isPending) return <Loading what="the first lines of the file" />;
  const guess = lines.data ? tableGuessOf(lines.data.lines.map(({ text }) => text)) : null;
  const table = guess === null ? null : { ...guess, mapping };
  return <AnswerForm record={{ ...record, table }} onAnswered={onAnswered} />;
}
