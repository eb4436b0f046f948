import { Controller, useFormContext, useWatch } from 'react-hook-form';
import { TextArea } from '../../ui/text-area.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { PositionNote } from './position-note.tsx';
import type { SiteDraft } from './site-draft.ts';
import type { ProgrammeKey } from './site-queries.ts';

const fields = [
  { name: 'name', label: 'Name', hint: '', wide: true },
  {
    name: 'position',
    label: 'Position: latitude, longitude',
    hint: 'Any usual form: -24.6532, 25.9068 or 24°39′12″ S 25°54′24″ E',
    wide: true,
  },
  { name: 'elevation', label: 'Elevation, m', hint: 'Empty takes the relief’s, approximate.', wide: false },
  { name: 'load', label: 'Design load, kW', hint: 'Cooling that is asked for. Can come later.', wide: false },
] as const;

/** Name, position, height, load and notes of a site. */
export function SiteFields({ programme }: { programme: ProgrammeKey }) {
  const { control, setValue } = useFormContext<SiteDraft>();
  const [position, elevation] = useWatch({ control, name: ['position', 'elevation'] });
  return (
    <div className="grid grid-cols-2 items-start gap-3">
      {fields.map(({ name, label, hint, wide }) => (
        <div key={name} className={wide ? 'col-span-2' : 'max-sm:col-span-2'}>
          <Controller
            control={control}
            name={name}
            render={({ field, fieldState }) => (
              <TextField
                label={label}
                value={field.value}
                onChange={field.onChange}
                onBlur={field.onBlur}
                inputRef={field.ref}
                problem={fieldState.error?.message}
                autoComplete="off"
                dir="auto"
                {...(hint === '' ? {} : { hint })}
              />
            )}
          />
          {name === 'position' ? (
            <div className="mt-1">
              <PositionNote
                programme={programme}
                written={position}
                elevation={elevation}
                onPosition={(written) => setValue('position', written, { shouldDirty: true, shouldValidate: true })}
              />
            </div>
          ) : null}
        </div>
      ))}
      <Controller
        control={control}
        name="notes"
        render={({ field, fieldState }) => (
          <TextArea
            className="col-span-2"
            label="Notes"
            value={field.value}
            onChange={field.onChange}
            problem={fieldState.error?.message}
          />
        )}
      />
    </div>
  );
}
