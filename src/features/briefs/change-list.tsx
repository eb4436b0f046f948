import type { BriefChange } from '../../contract/briefs.ts';
import { useMedia } from '../../lib/use-media.ts';

/** Where three columns of words stand side by side. */
const ROOMY = '(min-width: 40rem)';

interface ChangeListProps {
  readonly changes: readonly BriefChange[];
  readonly label: string;
}

/** What differs between two briefs, field by field: a table, or on a narrow screen a list that says the same. */
export function ChangeList({ changes, label }: ChangeListProps) {
  return useMedia(ROOMY) ? (
    <ChangeTable changes={changes} label={label} />
  ) : (
    <Changes changes={changes} label={label} />
  );
}

function ChangeTable({ changes, label }: ChangeListProps) {
  return (
    <table className="ruled">
      <caption className="sr-only">{label}</caption>
      <thead>
        <tr>
          <th scope="col">Field</th>
          <th scope="col">Before</th>
          <th scope="col">After</th>
        </tr>
      </thead>
      <tbody>
        {changes.map((change) => (
          <tr key={change.path}>
            <th scope="row" className="w-2/5">
              {change.label}
            </th>
            <td className="text-soft wrap-anywhere">{change.before}</td>
            <td className="wrap-anywhere">{change.after}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Changes({ changes, label }: ChangeListProps) {
  return (
    <ul aria-label={label}>
      {changes.map((change) => (
        <li key={change.path} className="border-t border-line py-1.5 wrap-anywhere">
          <span className="font-medium">{change.label}</span>
          <span className="block text-soft">
            <span className="text-fine">before </span>
            {change.before}
          </span>
          <span className="block">
            <span className="text-fine text-soft">after </span>
            {change.after}
          </span>
        </li>
      ))}
    </ul>
  );
}
