import { useWatch } from 'react-hook-form';
import { labelOfPath } from '../../engine/brief/brief-difference.ts';
import { type DraftProblems, type DraftValues, limitKindOf } from './draft.ts';
import { fieldId } from './field-row.tsx';

/** Every field that is at fault, by name; a press goes to it. */
export function FaultList({ problems }: { problems: DraftProblems }) {
  const kind = limitKindOf({ limit: useWatch<DraftValues>({ name: 'limit' }) });
  const paths = Object.keys(problems);
  if (paths.length === 0) return null;
  return (
    <ul
      aria-label="Fields at fault"
      className="flex flex-wrap gap-x-3 text-fine max-lg:max-h-13 max-lg:overflow-y-auto"
    >
      {paths.map((path) => (
        <li key={path}>
          <button
            type="button"
            className="min-h-6 text-madder underline decoration-madder/40 underline-offset-4 hover:decoration-madder"
            onClick={() => goTo(path)}
          >
            {labelOfPath(path, kind)}
          </button>
        </li>
      ))}
    </ul>
  );
}

/** To the field, or to what holds it. */
function goTo(path: string): void {
  const keys = path.split('.');
  const held = keys.map((_, index) => keys.slice(0, keys.length - index).join('.'));
  const field = held.map((each) => document.getElementById(fieldId(each))).find((each) => each !== null);
  field?.scrollIntoView({ block: 'center' });
  field?.focus({ preventScroll: true });
}
