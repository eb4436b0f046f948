import { useFormContext } from 'react-hook-form';
import type { WeatherFileRecord } from '../../contract/weather.ts';
import { type AnswerDraft, type Handling, handlingsOf } from './answer-draft.ts';

const words: Readonly<Record<Handling, { title: string; follows: string }>> = {
  fillLongGaps: {
    title: 'Fill gaps of 6 to 47 hours from the days before and after',
    follows: 'Filled hours are counted as filled, not as measured. Left alone, such gaps stay without data.',
  },
  keepSuspect: {
    title: 'Use values that the source calls suspect',
    follows: 'Left alone, they count as missing. What the source calls erroneous is never used.',
  },
};

/** What may be asked of the reading beyond what the file itself asks. */
export function HandlingField({ record }: { record: WeatherFileRecord }) {
  const { register } = useFormContext<AnswerDraft>();
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-lead font-semibold">How its gaps and doubts are treated</legend>
      {handlingsOf(record).map((each) => (
        <label key={each} className="flex min-h-9 items-start gap-2.5 border-t border-line py-1.5">
          <input type="checkbox" {...register(`handling.${each}`)} className="mt-0.5 size-5 flex-none accent-indigo" />
          <span>
            {words[each].title}
            <span className="block text-fine text-soft">{words[each].follows}</span>
          </span>
        </label>
      ))}
    </fieldset>
  );
}
