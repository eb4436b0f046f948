import { Link } from 'react-router-dom';
import type { AuditEvent } from '../../contract/audit.ts';
import { moment, number } from '../../lib/format.ts';
import { aboutWords, actWords, subjectLines, whoWords } from './audit-words.ts';

const columns =
  'grid grid-cols-[minmax(0,1fr)] gap-x-5 sm:grid-cols-[10rem_minmax(0,8.5rem)_minmax(0,13rem)_minmax(0,1fr)]';

/** Who did what to what, newest first; everything that was written down of an act unfolds under it. */
export function AuditEventList({ items, teamId }: { items: readonly AuditEvent[]; teamId: string }) {
  return (
    <>
      <div aria-hidden="true" className={`${columns} pb-1.5 text-fine font-medium text-soft max-sm:hidden`}>
        <span>When</span>
        <span>Who</span>
        <span>What</span>
        <span>About</span>
      </div>
      <ol aria-label="Events">
        {items.map((event) => (
          <li key={event.position} className={`${columns} border-t border-line py-1.5`}>
            <time dateTime={event.at} className="max-sm:text-fine max-sm:text-soft">
              {moment(event.at)}
            </time>
            <span className="[overflow-wrap:anywhere] max-sm:order-3">{whoWords(event)}</span>
            <span className="max-sm:order-2 max-sm:font-semibold">{actWords(event.act)}</span>
            <div className="[overflow-wrap:anywhere] max-sm:order-4">
              <About event={event} teamId={teamId} />
              <Details event={event} />
            </div>
          </li>
        ))}
      </ol>
    </>
  );
}

function About({ event, teamId }: { event: AuditEvent; teamId: string }) {
  const { name, to } = aboutWords(event, teamId);
  if (to !== null) return <Link to={to}>{name ?? 'Its page'}</Link>;
  return name === null ? null : <span>{name}</span>;
}

function Details({ event }: { event: AuditEvent }) {
  const lines = [
    ...subjectLines(event.subject),
    ...(event.requestId === null ? [] : [{ label: 'request', text: event.requestId }]),
    { label: 'place in the chain', text: number(event.position) },
    { label: 'hash', text: event.hash },
  ];
  return (
    <details className="text-fine">
      <summary className="w-fit cursor-pointer text-soft">
        Details<span className="sr-only"> of event {number(event.position)}</span>
      </summary>
      <dl className="my-1 grid grid-cols-[minmax(0,1fr)] gap-x-4 sm:grid-cols-[minmax(6rem,max-content)_minmax(0,1fr)]">
        {lines.map(({ label, text }) => (
          <div key={label} className="contents">
            <dt className="text-soft">{label}</dt>
            <dd className="whitespace-pre-wrap max-sm:mb-1">{text}</dd>
          </div>
        ))}
      </dl>
    </details>
  );
}
