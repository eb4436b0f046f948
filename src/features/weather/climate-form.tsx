import { type ReactNode, useId } from 'react';
import { monthNames } from '../../charts/calendar.ts';
import { Button } from '../../ui/button.tsx';
import {
  type ChangeField,
  type ClimateDraft,
  type DraftProblem,
  filledDown,
  shownFields,
  withStretch,
  withValue,
} from './climate-draft.ts';
import { fieldTitle, problemWords, ruleChoices } from './climate-words.ts';

interface ClimateFormProps {
  readonly draft: ClimateDraft;
  readonly onChange: (draft: ClimateDraft) => void;
  readonly problems: readonly DraftProblem[];
  /** Other ways to fill the table. */
  readonly sources: ReactNode;
}

/** The change of climate, typed: the rule for humidity, then twelve months. */
export function ClimateForm({ draft, onChange, problems, sources }: ClimateFormProps) {
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] content-start gap-6">
      <RuleChoice draft={draft} onChange={onChange} />
      <section aria-labelledby="monthly-changes">
        <h2 id="monthly-changes" className="mb-2 text-name">
          By how much each month changes
        </h2>
        {sources}
        <label className="my-3 flex items-start gap-2">
          <input
            type="checkbox"
            checked={draft.stretched}
            onChange={(event) => onChange(withStretch(draft, event.currentTarget.checked))}
            className="mt-0.5 size-4 flex-none accent-indigo"
          />
          Stretch the days: highest and lowest change apart from the mean
        </label>
        <MonthTable draft={draft} onChange={onChange} problems={problems} />
      </section>
    </div>
  );
}

function RuleChoice({ draft, onChange }: Pick<ClimateFormProps, 'draft' | 'onChange'>) {
  const name = useId();
  return (
    <fieldset>
      <legend className="serif mb-2 text-name">What becomes of the humidity</legend>
      {ruleChoices.map(({ rule, words, meaning }) => (
        <label key={rule} className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-2.5 border-t border-line py-2">
          <input
            type="radio"
            name={name}
            checked={draft.humidityRule === rule}
            onChange={() => onChange({ ...draft, humidityRule: rule })}
            className="mt-0.5 size-4 accent-indigo"
          />
          <span>
            <span className="font-medium">{words}</span>
            <span className="block text-fine text-soft">{meaning}</span>
          </span>
        </label>
      ))}
    </fieldset>
  );
}

function MonthTable({ draft, onChange, problems }: Omit<ClimateFormProps, 'sources'>) {
  const id = useId();
  const fields = shownFields(draft);
  return (
    <>
      <table className="w-full border-collapse" style={{ maxWidth: `${3 + 6 * fields.length}rem` }}>
        <caption className="sr-only">Change of each month</caption>
        <thead>
          <tr className="text-left text-fine text-soft">
            <th scope="col" className="w-12 pb-1 font-medium">
              Month
            </th>
            {fields.map((field) => (
              <th key={field} scope="col" className="pb-1 pl-2 text-right font-medium">
                {fieldTitle[field].title}, {fieldTitle[field].unit}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {draft.months.map((row, month) => (
            <tr key={monthNames[month]}>
              <th scope="row" className="text-left font-normal text-soft">
                {monthNames[month]}
              </th>
              {fields.map((field) => (
                <td key={field} className="py-0.5 pl-2">
                  <ChangeInput
                    label={`${monthNames[month]}, ${fieldTitle[field].spoken}, ${fieldTitle[field].unit}`}
                    value={row[field]}
                    onChange={(value) => onChange(withValue(draft, { month, field, value }))}
                    describedBy={problemOf(problems, { month, field }) ? `${id}-problems` : undefined}
                  />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
        <tfoot>
          <tr>
            <td />
            {fields.map((field) => (
              <td key={field} className="pt-1 text-right">
                <Button
                  look="quiet"
                  className="text-fine"
                  aria-label={`January in every month, ${fieldTitle[field].spoken}`}
                  onClick={() => onChange(filledDown(draft, field))}
                >
                  Fill down
                </Button>
              </td>
            ))}
          </tr>
        </tfoot>
      </table>
      <ul id={`${id}-problems`} className="mt-2 text-fine font-medium text-madder">
        {problems.map((problem) => (
          <li key={`${problem.month} ${problem.field}`}>{problemWords(problem)}</li>
        ))}
      </ul>
    </>
  );
}

function problemOf(problems: readonly DraftProblem[], at: { month: number; field: ChangeField }): boolean {
  return problems.some(({ month, field }) => month === at.month && field === at.field);
}

interface ChangeInputProps {
  readonly label: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly describedBy: string | undefined;
}

function ChangeInput({ label, value, onChange, describedBy }: ChangeInputProps) {
  return (
    <input
      type="text"
      inputMode="decimal"
      autoComplete="off"
      aria-label={label}
      aria-invalid={describedBy === undefined ? undefined : true}
      aria-describedby={describedBy}
      value={value}
      onChange={(event) => onChange(event.currentTarget.value)}
      onFocus={(event) => event.currentTarget.select()}
      className={`min-h-8 w-full min-w-0 rounded-md border bg-paper px-2 text-right ${
        describedBy === undefined ? 'border-[#918a78]' : 'border-madder'
      }`}
    />
  );
}
