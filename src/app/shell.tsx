import { type ReactNode, useEffect, useState } from 'react';
import type { StreamState } from '../lib/api-client.ts';
import { TopBar, type TopBarProps } from './top-bar.tsx';

interface ShellProps extends TopBarProps {
  readonly stream: StreamState;
  readonly children: ReactNode;
}

/** The top bar and the page under it. */
export function Shell({ person, team, memberships, stream, children }: ShellProps) {
  return (
    <div className="flex min-h-dvh flex-col">
      <a
        href="#page"
        className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:m-2 focus:rounded-md focus:bg-paper focus:p-2"
      >
        Skip to the page
      </a>
      <TopBar person={person} team={team} memberships={memberships} />
      {team.invented ? (
        <p className="hidden text-fine print:block">{team.teamName}, invented places and weather</p>
      ) : null}
      <StreamNote stream={stream} />
      <main id="page" tabIndex={-1} className="flex min-h-0 flex-1 flex-col outline-none">
        {children}
      </main>
    </div>
  );
}

const SAY_AFTER_MS = 8_000;

/** Said only once the stream has been down for a while: a short break mends itself unseen. */
function StreamNote({ stream }: { stream: StreamState }) {
  const [isDown, setIsDown] = useState(false);
  useEffect(() => {
    if (stream === 'open') return setIsDown(false);
    const timer = setTimeout(() => setIsDown(true), SAY_AFTER_MS);
    return () => clearTimeout(timer);
  }, [stream]);
  return (
    <div role="status" className="no-print">
      {isDown ? (
        <p className="border-b border-line bg-paper px-5 py-1.5 text-fine text-soft">
          The connection to the server is down. What is shown may be behind; it catches up by itself.
        </p>
      ) : null}
    </div>
  );
}
