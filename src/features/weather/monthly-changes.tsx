import { monthNames } from '../../charts/calendar.ts';
import { type HumidityRule, type MonthlyChange, stretches } from '../../engine/climate/monthly-change.ts';
import { number } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { changeFields } from './climate-draft.ts';
import { fieldTitle } from './climate-words.ts';

interface MonthlyChangesProps {
  readonly monthly: readonly MonthlyChange[];
  readonly humidityRule: HumidityRule;
}

/** The twelve changes that a derived year was made by. */
export function MonthlyChanges({ monthly, humidityRule }: MonthlyChangesProps) {
  const stretched = monthly.some(stretches);
  const fields = changeFields.filter((field) => {
    if (field === 'ratioChangePct') return humidityRule === 'ratio-scaled';
    return field === 'shiftK' || stretched;
  });
  return (
    <div>
      <h3 className="mb-1">The change of each month</h3>
      <ScrollInside label="The change of each month, scrolls sideways">
        <table className="ruled min-w-[46rem]">
          <caption className="sr-only">By how much dry bulb and humidity ratio were changed in each month</caption>
          <thead>
            <tr>
              <th scope="col">
                <span className="sr-only">What changes</span>
              </th>
              {monthNames.map((name) => (
                <th key={name} scope="col" className="figure">
                  {name}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {fields.map((field) => (
              <tr key={field}>
                <th scope="row">
                  {fieldTitle[field].title}, {fieldTitle[field].unit}
                </th>
                {monthly.map((change, month) => (
                  <td key={monthNames[month]} className="figure">
                    {number(change[field], decimalsOf(change[field]))}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
    </div>
  );
}

/** A change is printed as it was given, to a hundredth. */
function decimalsOf(value: number): number {
  return Number.isInteger(10 * value) ? 1 : 2;
}
