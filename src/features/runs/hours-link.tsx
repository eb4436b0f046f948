import type { ReactNode } from 'react';
import { exportRunHours } from '../../contract/run-hours.ts';
import { urlOf } from '../../lib/api-client.ts';

/** Takes every hour of a run along as a table; the server names the file. */
export function HoursLink({ teamId, runId, children }: { teamId: string; runId: string; children: ReactNode }) {
  return (
    <a href={urlOf(exportRunHours, { params: { teamId, runId }, query: {} })} download>
      {children}
    </a>
  );
}
