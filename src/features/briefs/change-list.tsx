import type { BriefChange } from '../../contract/briefs.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';

/** What differs between two briefs, a row for each field. */
export function ChangeList({ changes, label }: { changes: readonly BriefChange[]; label: string }) {
  return (
    <ScrollInside label={`${label}, scrolls sideways`}>
      <table className="ruled min-w-[22rem]">
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
              <th scope="row">{change.label}</th>
              <td className="text-soft">{change.before}</td>
              <td>{change.after}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}
