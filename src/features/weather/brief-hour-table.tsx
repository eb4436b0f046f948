import { classWords } from '../../charts/hour-class-words.ts';
import type { AirPoint } from '../../charts/process-lines.ts';
import type { Brief, HumidityCaps } from '../../engine/brief/brief.ts';
import { relativeHumidityPct } from '../../engine/psychrometrics/moist-air.ts';
import { number, percent, sentence, temperatureC, withUnit } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import type { BriefHour } from './brief-hour.ts';
import { hourWords } from './record-hour-words.ts';
import type { RecordYear } from './record-year.ts';

interface BriefHourTableProps {
  readonly year: RecordYear;
  readonly slot: number;
  /** Null without a brief, and where the weather of the hour is not known. */
  readonly hour: BriefHour | null;
  readonly brief: Brief | null;
  /** The schedule was looked at, so that a class can be named. */
  readonly isJudged: boolean;
}

/** What the chart draws of the chosen hour, in words and figures. */
export function BriefHourTable({ year, slot, hour, brief, isJudged }: BriefHourTableProps) {
  const pressurePa = year.pressurePa[slot] ?? Number.NaN;
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-2">
      <p aria-live="polite">{hourWords(year, slot)}</p>
      {hour === null || brief === null ? null : (
        <>
          <p>
            {hour.hourClass === null ? '' : <span className="font-semibold">{classWords[hour.hourClass]}. </span>}
            {hour.reason ?? ''}
            {isJudged
              ? ''
              : ' Which class the hour has is known once the file is accepted, as clock and height are the station’s.'}
          </p>
          <States hour={hour} pressurePa={pressurePa} />
          <p className="text-fine text-soft">
            {aimWords(hour)} {capWords(brief.caps)} {lineWords(hour, brief)}
          </p>
        </>
      )}
    </div>
  );
}

function States({ hour, pressurePa }: { hour: BriefHour; pressurePa: number }) {
  const rows: readonly { key: string; mark: string; what: string; at: AirPoint }[] = [
    { key: 'outdoor', mark: '', what: 'Outdoor air', at: hour.outdoor },
    ...hour.lines.flatMap(({ stage, after, supply }, index) => [
      ...after.map((at, part) => ({
        key: `${stage} ${part}`,
        mark: '',
        what:
          after.length > 1 && part === 0
            ? `${classWords[stage]}, after the indirect stage`
            : `${classWords[stage]}, after the stage`,
        at,
      })),
      { key: stage, mark: String(index + 1), what: `${classWords[stage]}, supply after the fan`, at: supply },
    ]),
    ...(hour.room === null ? [] : [{ key: 'room', mark: '', what: 'The room with what is supplied', at: hour.room }]),
  ];
  return (
    <ScrollInside label="States of the air, scrolls sideways">
      <table className="ruled min-w-[34rem]">
        <caption className="sr-only">States of the air in the chosen hour</caption>
        <thead>
          <tr>
            <th scope="col">On the chart</th>
            <th scope="col">Air</th>
            <th scope="col" className="figure">
              Temperature
            </th>
            <th scope="col" className="figure">
              Humidity ratio
            </th>
            <th scope="col" className="figure">
              Relative humidity
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ key, mark, what, at }) => (
            <tr key={key}>
              <td className="text-soft">{mark}</td>
              <th scope="row">{what}</th>
              <td className="figure">{temperatureC(at.tempC)}</td>
              <td className="figure">{withUnit(1000 * at.humidityRatio, 'g/kg', 1)}</td>
              <td className="figure">
                {percent(Math.min(100, relativeHumidityPct(at.tempC, at.humidityRatio, pressurePa)), 0)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}

function aimWords({ setC, supplyAimC }: BriefHour): string {
  if (setC === null || supplyAimC === null) return 'The limit is an index, so no temperature is aimed at.';
  return `Held at ${temperatureC(setC)}; the supply is to reach ${temperatureC(supplyAimC)}.`;
}

function capWords({ roomRhPct, supplyRhPct, supplyDewPointC }: HumidityCaps): string {
  const words = [
    roomRhPct === undefined ? null : `room at most ${number(roomRhPct)} % relative humidity`,
    supplyRhPct === undefined ? null : `supply at most ${number(supplyRhPct)} %`,
    supplyDewPointC === undefined ? null : `supply dew point at most ${temperatureC(supplyDewPointC)}`,
  ].filter((word) => word !== null);
  return words.length === 0 ? 'No humidity cap.' : sentence(`Caps: ${words.join(', ')}`);
}

/** Why fewer lines are drawn than the brief has stages. */
function lineWords({ lines }: BriefHour, brief: Brief): string {
  if (brief.limit.kind === 'tower') return 'A tower cools water; nothing is done to air that is supplied.';
  if (brief.primaryAir === 'return') return 'The hall cools its return air, so no line starts at outdoor air.';
  const wet = lines.filter(({ stage }) => stage !== 'air').length;
  if (brief.stages.length > 0 && wet === 0)
    return 'No wet stage may run in this hour: cut-in, start, freeze lockout or humidity keeps it off.';
  return '';
}
