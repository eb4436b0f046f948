import { useQuery } from '@tanstack/react-query';
import { useId } from 'react';
import { Link } from 'react-router-dom';
import { briefsQuery } from '../../../features/briefs/brief-queries.ts';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import { paths } from '../../../lib/paths.ts';

interface BriefChoiceProps {
  readonly ids: ProgrammeIds;
  /** The brief in view. */
  readonly briefId: string;
  readonly onChoose: (briefId: string) => void;
}

/** Takes another brief of the programme, and leads to the one in view. */
export function BriefChoice({ ids, briefId, onChoose }: BriefChoiceProps) {
  const id = useId();
  const { teamId, programmeId } = ids;
  const briefs = useQuery(briefsQuery({ teamId, programmeId }));
  const items = briefs.data?.items ?? [];
  return (
    <p className="mt-1 flex flex-wrap items-center gap-x-3 gap-y-1 text-fine">
      {items.length > 1 ? (
        <span className="flex min-w-0 items-center gap-2">
          <label htmlFor={id} className="text-soft">
            Brief
          </label>
          <select
            id={id}
            value={briefId}
            onChange={({ currentTarget }) => onChoose(currentTarget.value)}
            className="min-h-8 min-w-0 max-w-full rounded-md border border-[#918a78] bg-paper px-2"
          >
            {items.map((brief) => (
              <option key={brief.briefId} value={brief.briefId}>
                {brief.name}
              </option>
            ))}
          </select>
        </span>
      ) : null}
      <Link to={paths.brief.to({ teamId, programmeId, briefId })}>Open this brief</Link>
    </p>
  );
}
