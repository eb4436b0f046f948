import type { SiteRecord } from '../../contract/site-record.ts';
import { moment } from '../../lib/format.ts';

/** Who changed what of a site, newest first. */
export function ChangesPanel({ record: { changes, madeBy, madeAt } }: { record: SiteRecord }) {
  return (
    <section aria-labelledby="changes">
      <h2 id="changes" className="mb-1 text-name">
        Changes
      </h2>
      <ul className="text-fine">
        {changes.map(({ revision, by, at, fields }) => (
          <li key={revision} className="border-t border-line py-1.5">
            <p className="text-soft">
              {by}, {moment(at)}
            </p>
            <ul>
              {fields.map(({ field, was, now }) => (
                <li key={field} className="break-words" dir="auto">
                  {field}: {was === '' ? 'empty' : was} → {now === '' ? 'empty' : now}
                </li>
              ))}
            </ul>
          </li>
        ))}
        <li className="border-t border-line py-1.5 text-soft">
          Made by {madeBy}, {moment(madeAt)}
        </li>
      </ul>
    </section>
  );
}
