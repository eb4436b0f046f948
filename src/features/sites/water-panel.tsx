import { useMutation } from '@tanstack/react-query';
import { type FormEvent, useEffect, useId, useState } from 'react';
import type { SiteRecord } from '../../contract/site-record.ts';
import { bleedDestinations, SiteWater } from '../../contract/site-water.ts';
import { errorSentence, isApiError } from '../../lib/api-error.ts';
import { type FormProblems, noProblems, problemsOfIssues } from '../../lib/form-problems.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { PeakDay } from './peak-day.tsx';
import type { ProgrammeKey } from './site-queries.ts';
import type { SiteDesk } from './use-site-desk.ts';
import { WaterCyclesTable } from './water-cycles-table.tsx';

const PANEL = 'water';
const figures = [
  { name: 'hardnessMgL', label: 'Hardness as CaCO₃, mg/L' },
  { name: 'alkalinityMgL', label: 'Alkalinity as CaCO₃, mg/L' },
  { name: 'silicaMgL', label: 'Silica, mg/L' },
  { name: 'dissolvedSolidsMgL', label: 'Dissolved solids, mg/L' },
  { name: 'peakDayLimitM3', label: 'Utility’s limit of a day, m³' },
] as const;
type Figure = (typeof figures)[number]['name'];
type Draft = Readonly<Record<Figure | 'bleedTo' | 'note', string>>;

interface WaterPanelProps {
  readonly programme: ProgrammeKey;
  readonly record: SiteRecord;
  readonly desk: SiteDesk;
  readonly mayChange: boolean;
}

/** The water sheet of a site: what the make-up water holds and how often it can be concentrated, where the bleed goes, the peak day. */
export function WaterPanel({ programme, record, desk, mayChange }: WaterPanelProps) {
  const [draft, setDraft] = useState<Draft | null>(null);
  const [found, setFound] = useState<FormProblems>(noProblems);
  const shown = draft ?? draftOf(record.water);
  const { setTyping } = desk;
  useEffect(() => setTyping(PANEL, draft !== null), [setTyping, draft]);
  const save = useMutation({ mutationFn: (water: SiteWater) => desk.save({ water }), onSuccess: () => setDraft(null) });
  const read = SiteWater.safeParse(waterOf(shown));
  const submit = (event: FormEvent) => {
    event.preventDefault();
    setFound(read.success ? noProblems : problemsOfIssues(read.error.issues));
    if (read.success) save.mutate(read.data);
  };
  const change = (name: keyof Draft, value: string) => setDraft({ ...shown, [name]: value });
  const water = read.success ? read.data : record.water;
  return (
    <form noValidate onSubmit={submit} aria-labelledby="water" className="grid gap-4">
      <div>
        <h2 id="water" className="text-name">
          Water
        </h2>
        <p className="max-w-[70ch] text-soft">
          From an analysis of the make-up water. The water treatment of the plant sets its own limits, which go before
          these.
        </p>
      </div>
      <fieldset disabled={!mayChange} className="grid grid-cols-2 items-start gap-3 sm:grid-cols-3">
        {figures.map(({ name, label }) => (
          <TextField
            key={name}
            label={label}
            inputMode="decimal"
            value={shown[name]}
            onChange={(value) => change(name, value)}
            problem={found.fields[name]}
            autoComplete="off"
          />
        ))}
        <BleedChoice value={shown.bleedTo} onChange={(value) => change('bleedTo', value)} />
        <TextField
          className="col-span-full"
          label="Note on the water"
          value={shown.note}
          onChange={(value) => change('note', value)}
          problem={found.fields.note}
          hint="Date and paper of the analysis, consent for the bleed, reuse, drought restrictions."
        />
      </fieldset>
      <WaterCyclesTable water={water} />
      <PeakDay programme={programme} site={record.site} limitM3={water.peakDayLimitM3} />
      {save.isError && !isApiError(save.error, 'conflict') ? (
        <Notice tone="wrong" live title="Not saved">
          {errorSentence(save.error)}
        </Notice>
      ) : null}
      {mayChange ? (
        <div className="flex flex-wrap items-center gap-3">
          <Button type="submit" look="primary" busy={save.isPending} disabled={draft === null}>
            Save the water sheet
          </Button>
          {draft === null ? null : (
            <Button look="quiet" onClick={() => setDraft(null)}>
              Take back what was typed
            </Button>
          )}
          <span role="status" className="text-fine text-soft">
            {save.isSuccess && draft === null ? 'Saved.' : ''}
          </span>
        </div>
      ) : null}
    </form>
  );
}

function BleedChoice({ value, onChange }: { value: string; onChange: (value: string) => void }) {
  const id = useId();
  return (
    <div>
      <label htmlFor={id} className="mb-1 block text-fine font-semibold text-soft">
        Where the bleed goes
      </label>
      <select
        id={id}
        value={value}
        onChange={({ currentTarget }) => onChange(currentTarget.value)}
        className="block min-h-10 w-full rounded-md border border-[#918a78] bg-paper px-2.5 text-body"
      >
        <option value="">Not known</option>
        {bleedDestinations.map((each) => (
          <option key={each} value={each}>
            {each.charAt(0).toUpperCase() + each.slice(1)}
          </option>
        ))}
      </select>
    </div>
  );
}

function draftOf(water: SiteWater): Draft {
  const text = (value: number | null) => (value === null ? '' : String(value));
  return {
    hardnessMgL: text(water.hardnessMgL),
    alkalinityMgL: text(water.alkalinityMgL),
    silicaMgL: text(water.silicaMgL),
    dissolvedSolidsMgL: text(water.dissolvedSolidsMgL),
    peakDayLimitM3: text(water.peakDayLimitM3),
    bleedTo: water.bleedTo ?? '',
    note: water.note,
  };
}

/** What was typed; text that is no number stays text, and the contract refuses it at its field. */
function waterOf(draft: Draft): unknown {
  const figure = (name: Figure) => {
    const written = draft[name].trim().replace(',', '.');
    return written === '' ? null : Number.isFinite(Number(written)) ? Number(written) : draft[name];
  };
  return {
    ...Object.fromEntries(figures.map(({ name }) => [name, figure(name)])),
    bleedTo: draft.bleedTo === '' ? null : draft.bleedTo,
    note: draft.note,
  };
}
