import type { ReactNode } from 'react';
import type { FileStatus, Severity } from '../contract/weather.ts';

const INK = '#22302f';
const SOFT = '#55625e';
const MADDER = '#a8442f';
const WELD = '#d79a4a';

const statusShapes: Readonly<Record<FileStatus, ReactNode>> = {
  reading: <circle cx="6" cy="6" r="4" fill="none" stroke={SOFT} strokeWidth="2" strokeDasharray="4 3" />,
  asks: <path d="M6 1l5 5-5 5-5-5z" fill={WELD} stroke={INK} strokeWidth="0.75" />,
  review: <circle cx="6" cy="6" r="4" fill="none" stroke={INK} strokeWidth="2" />,
  accepted: <circle cx="6" cy="6" r="5" fill={INK} />,
  refused: <path d="M2 2l8 8M10 2l-8 8" stroke={MADDER} strokeWidth="2.5" />,
  withdrawn: <path d="M1.5 6h9" stroke={SOFT} strokeWidth="2.5" />,
  superseded: <path d="M2 4h8M2 8h8" stroke={SOFT} strokeWidth="2" />,
};

const severityShapes: Readonly<Record<Severity, ReactNode>> = {
  refuse: statusShapes.refused,
  ask: statusShapes.asks,
  doubt: <path d="M6 1l5.2 9.5H.8z" fill={WELD} stroke={INK} strokeWidth="0.75" />,
  repair: <rect x="1.5" y="1.5" width="9" height="9" fill="none" stroke={INK} strokeWidth="1.75" />,
  note: <circle cx="6" cy="6" r="2.5" fill={SOFT} />,
};

/** A mark that differs by shape first and colour second; the words beside it say the same. */
function Mark({ children }: { children: ReactNode }) {
  return (
    <svg width="12" height="12" viewBox="0 0 12 12" aria-hidden="true" className="flex-none">
      {children}
    </svg>
  );
}

export function StatusMark({ status, failed = false }: { status: FileStatus; failed?: boolean }) {
  return <Mark>{statusShapes[failed ? 'refused' : status]}</Mark>;
}

export function SeverityMark({ severity }: { severity: Severity }) {
  return <Mark>{severityShapes[severity]}</Mark>;
}
