import type { ReactNode } from 'react';
import { useFormContext } from 'react-hook-form';
import { Button } from '../../ui/button.tsx';
import type { DraftValues } from './draft.ts';
import { useDraftScope } from './draft-context.ts';
import { fieldId, ProblemNote } from './field-row.tsx';
import { useListValue } from './list-fields.tsx';

interface EntriesProps {
  /** The list's path in the brief. */
  readonly path: string;
  readonly title: string;
  /** What the entries are, with what the preset says. */
  readonly children: ReactNode;
  readonly count: number;
  readonly rowAt: (index: number) => ReactNode;
  readonly problemAt: (index: number) => string | undefined;
  readonly onRemove: (index: number) => void;
  /** The buttons that add an entry. */
  readonly add: ReactNode;
}

/** Entries of a list, each with its fault and a way to take it off, and a way to add one. */
export function Entries({ path, title, children, count, rowAt, problemAt, onRemove, add }: EntriesProps) {
  const { problems } = useDraftScope();
  const paths = Array.from({ length: count }, (_, index) => `${path}.${index}`);
  return (
    <fieldset id={fieldId(path)} tabIndex={-1} className="min-w-0 border-t border-line py-2">
      <legend className="float-left w-full font-medium">{title}</legend>
      <p className="clear-both text-fine text-soft">{children}</p>
      <ul className="grid gap-2 pt-1">
        {paths.map((each, index) => (
          <li key={each}>
            <span className="flex flex-wrap items-center gap-x-2 gap-y-1">
              {rowAt(index)}
              <Button look="quiet" aria-label={`Remove: ${title}, row ${index + 1}`} onClick={() => onRemove(index)}>
                Remove
              </Button>
            </span>
            <ProblemNote id={`${fieldId(each)}-problem`}>{problemAt(index)}</ProblemNote>
          </li>
        ))}
      </ul>
      <div className="flex flex-wrap gap-x-4">{add}</div>
      <ProblemNote id={`${fieldId(path)}-problem`}>{problems[path]}</ProblemNote>
    </fieldset>
  );
}

/** A list of the form with what changes it. */
export function useEntries(path: string) {
  const { setValue } = useFormContext<DraftValues>();
  const entries = useListValue(path);
  const set = (next: readonly unknown[]) => setValue(path, next, { shouldDirty: true });
  return {
    entries,
    add: (entry: unknown) => set([...entries, entry]),
    change: (index: number, entry: unknown) => set(entries.with(index, entry)),
    remove: (index: number) => set(entries.toSpliced(index, 1)),
  };
}

/** "Preset: none. "; nothing while the preset is on its way. */
export function presetWords(texts: readonly string[] | undefined): string {
  if (texts === undefined) return '';
  return `Preset: ${texts.length === 0 ? 'none' : texts.join('; ')}. `;
}
