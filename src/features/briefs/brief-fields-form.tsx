import type { ReactNode } from 'react';
import { useFormContext, useWatch } from 'react-hook-form';
import type { Limit } from '../../engine/brief/brief.ts';
import { type FieldGroup, kindOfUse } from '../../engine/brief/brief-fields.ts';
import { limitKindWords } from '../../engine/brief/field-words.ts';
import { isRecord } from '../../engine/brief/fields.ts';
import { groupTitle } from './brief-words.ts';
import { type DraftValues, fieldsOfGroup, limitKindOf } from './draft.ts';
import { useDraftScope } from './draft-context.ts';
import { FieldRow, inputLook, ProblemNote } from './field-row.tsx';
import { GatesField } from './gates-field.tsx';
import { HardLimitsField } from './hard-limits-field.tsx';
import { MonthsField, StagesField } from './list-fields.tsx';
import { ReportedField } from './reported-field.tsx';
import { ScoreFields } from './score-fields.tsx';

const GROUPS: readonly FieldGroup[] = [
  'limit',
  'caps',
  'air',
  'plant',
  'schedule',
  'water',
  'reference',
  'prices',
  'tolerance',
  'gates',
  'reported',
  'score',
];

/** Every field that the brief's use has, by group. */
export function BriefFieldsForm({ mayChange }: { mayChange: boolean }) {
  const values = { limit: useWatch<DraftValues>({ name: 'limit' }) };
  const kind = limitKindOf(values);
  if (kind === null) return null;
  return (
    <fieldset disabled={!mayChange} className="grid min-w-0 gap-7">
      <legend className="sr-only">Fields of the brief</legend>
      {GROUPS.map((group) => (
        <Group key={group} group={group} kind={kind} />
      ))}
    </fieldset>
  );
}

function Group({ group, kind }: { group: FieldGroup; kind: Limit['kind'] }) {
  const use = kindOfUse({ kind });
  const fields = fieldsOfGroup(kind, group);
  const extra = extraOf(group, kind);
  if (fields.length === 0 && extra === null) return null;
  return (
    <section aria-labelledby={`group-${group}`} className="min-w-0">
      <h2 id={`group-${group}`} className="mb-1 text-name">
        {groupTitle(group, use)}
      </h2>
      {group === 'limit' && use === 'room' ? <LimitKindRow kind={kind} /> : null}
      {group === 'air' ? extra : null}
      {fields.map((field) => (
        <FieldRow key={`${kind} ${field.path}`} field={field} />
      ))}
      {group === 'air' ? null : extra}
      <GroupProblems group={group} />
    </section>
  );
}

/** What a group holds beside single fields. */
function extraOf(group: FieldGroup, kind: Limit['kind']): ReactNode {
  const use = kindOfUse({ kind });
  if (group === 'air') return <StagesField use={use} />;
  if (group === 'schedule') return <MonthsField />;
  if (group === 'score') return <ScoreFields />;
  if (group === 'tolerance' && use !== 'index') return <HardLimitsField use={use} />;
  if (group === 'gates') return <GatesField />;
  if (group === 'reported') return <ReportedField use={use} />;
  return null;
}

/** Faults of fields that the form does not show stand under the limit. */
function GroupProblems({ group }: { group: FieldGroup }) {
  const { problems } = useDraftScope();
  if (group !== 'limit') return null;
  const hidden = ['preset', 'primaryAir', 'basinHeat', 'secondaryAir', 'phi', 'dates'];
  const said = hidden.flatMap((path) => (problems[path] === undefined ? [] : [problems[path]]));
  return <ProblemNote id="limit-problem">{said.length === 0 ? undefined : said.join(' ')}</ProblemNote>;
}

const FIRST_FIXED_C = 26;

/** A room is held at a temperature, or within an adaptive model; every other use has one kind of limit. */
function LimitKindRow({ kind }: { kind: Limit['kind'] }) {
  const { setValue, getValues } = useFormContext<DraftValues>();
  const change = (next: string) => {
    const held = getValues('limit');
    const blank = { tempC: FIRST_FIXED_C, model: 'ashrae55-80', ceilingC: null };
    setValue('limit', { ...blank, ...(isRecord(held) ? held : {}), kind: next }, { shouldDirty: true });
  };
  return (
    <div className="grid gap-x-4 gap-y-1 border-t border-line py-2 sm:grid-cols-[minmax(0,1fr)_minmax(0,13rem)]">
      <label htmlFor="limit-kind" className="font-medium">
        What is limited
      </label>
      <select
        id="limit-kind"
        value={kind}
        onChange={({ currentTarget }) => change(currentTarget.value)}
        className={`${inputLook(false)} w-full min-w-0`}
      >
        {(['fixed', 'adaptive'] as const).map((each) => (
          <option key={each} value={each}>
            {limitKindWords(each)}
          </option>
        ))}
      </select>
    </div>
  );
}
