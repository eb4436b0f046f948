import { useQuery } from '@tanstack/react-query';
import { useId, useMemo, useState } from 'react';
import { hourDensity } from '../../charts/hour-density.ts';
import { ProcessDrawing } from '../../charts/process-drawing.tsx';
import { PsychrometricChart } from '../../charts/psychrometric-chart.tsx';
import { rangeOf } from '../../charts/psychrometric-scale.ts';
import { getBriefVersion, listBriefs } from '../../contract/briefs.ts';
import { getStation } from '../../contract/stations.ts';
import type { WeatherFile } from '../../contract/weather.ts';
import { apiQuery } from '../../lib/api-query.ts';
import { number, pressureHPa } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { type BriefHour, briefHour, briefYear, type PlaceOfYear } from './brief-hour.ts';
import { BriefHourTable } from './brief-hour-table.tsx';
import { HourChoice } from './hour-choice.tsx';
import type { PsychrometricFoldProps } from './psychrometric-fold.tsx';
import { type RecordYear, useRecordYear } from './record-year.ts';

/** The chart with the hours of the year, and over it one hour under a brief of the programme. */
export function PsychrometricYear({ record, facts, slot, onChoose }: PsychrometricFoldProps) {
  const year = useRecordYear(record.file, facts);
  if (!year.data) return null;
  if (year.data.meanPressurePa === null)
    return <p className="mt-2">The pressure of no hour is known, so no chart can be drawn.</p>;
  return (
    <ChartOfYear
      file={record.file}
      year={year.data}
      pressurePa={year.data.meanPressurePa}
      slot={slot ?? hottestSlot(year.data)}
      onChoose={onChoose}
    />
  );
}

interface ChartOfYearProps {
  readonly file: WeatherFile;
  readonly year: RecordYear;
  readonly pressurePa: number;
  readonly slot: number;
  readonly onChoose: (slot: number) => void;
}

function ChartOfYear({ file, year, pressurePa, slot, onChoose }: ChartOfYearProps) {
  const range = useMemo(() => rangeOf(year), [year]);
  const fields = useMemo(() => hourDensity(year), [year]);
  const { briefs, chosen, choose, hour, isJudged } = useHourUnderBrief(file, year, slot);
  return (
    <div className="mt-3 grid grid-cols-[minmax(0,1fr)] gap-4">
      <div className="no-print flex flex-wrap items-end gap-x-6 gap-y-3">
        <BriefChoice briefs={briefs} chosen={chosen} onChoose={choose} />
        <HourChoice slot={slot} slots={year.dryBulbC.length} onChoose={onChoose} />
      </div>
      <ScrollInside label="Psychrometric chart, scrolls sideways">
        <div className="min-w-[40rem] print:min-w-0">
          <PsychrometricChart
            pressurePa={pressurePa}
            range={range}
            fields={fields}
            label={`Psychrometric chart at ${pressureHPa(pressurePa)} with the hours of the year in greys. The table below says what is drawn of the chosen hour.`}
            overlay={(scale) =>
              hour === null || chosen === null ? null : (
                <ProcessDrawing
                  {...{ scale, range, pressurePa }}
                  lines={hour.lines}
                  outdoor={hour.outdoor}
                  setC={hour.setC}
                  supplyAimC={hour.supplyAimC}
                  room={hour.room}
                  caps={chosen.body?.caps ?? {}}
                />
              )
            }
          />
        </div>
      </ScrollInside>
      <p className="text-fine text-soft">
        Drawn at {pressureHPa(pressurePa)}, the mean pressure of the year. Curves: saturation, and relative humidity 20
        to 80 %. Dotted: wet bulb every 5 °C. Grey: hours of the year, darker where more of its{' '}
        {number(year.dryBulbC.length)} hours lie. Red: the chosen hour and its stages at full wetting, the last step
        each fan's heat. Square: the room. Broken uprights: what room and supply are to be held at. Dash and dot:
        humidity caps.
      </p>
      <BriefHourTable year={year} slot={slot} hour={hour} brief={chosen?.body ?? null} isJudged={isJudged} />
    </div>
  );
}

/** The programme's briefs, the chosen one, and the hour under it. */
function useHourUnderBrief(file: WeatherFile, year: RecordYear, slot: number) {
  const { teamId, programmes } = useTeam();
  const programmeId = programmes[0]?.id;
  const briefs = useQuery({
    ...apiQuery(listBriefs, { params: { teamId, programmeId: programmeId ?? '' }, query: {} }),
    enabled: programmeId !== undefined,
  });
  const [briefId, choose] = useState<string | null>(null);
  const items = briefs.data?.items ?? [];
  const view = items.find((item) => item.briefId === briefId) ?? items[0] ?? null;
  const params = { teamId, programmeId: programmeId ?? '', briefId: view?.briefId ?? '', version: view?.version ?? 1 };
  const version = useQuery({ ...apiQuery(getBriefVersion, { params, query: {} }), enabled: view !== null });
  const place = usePlace(file);
  const body = version.data?.body ?? null;
  const judged = useMemo(() => {
    if (body === null) return null;
    const utcOffsetMin = Math.round(60 * (file.station?.utcOffsetH ?? 0));
    const weatherYear = { kind: file.kind ?? 'typical', year: file.year, utcOffsetMin, packed: year.packed };
    return briefYear({ brief: body, columns: year, year: weatherYear, place });
  }, [body, file, year, place]);
  const hour: BriefHour | null = useMemo(() => (judged ? briefHour(judged, year, slot) : null), [judged, year, slot]);
  return {
    briefs: items,
    chosen: view === null ? null : { briefId: view.briefId, body },
    choose,
    hour,
    isJudged: judged !== null && judged.rows !== null,
  };
}

/** Clock and height are those of the station that accepting made or found. */
function usePlace(file: WeatherFile): PlaceOfYear | null {
  const { teamId } = useTeam();
  const station = useQuery({
    ...apiQuery(getStation, { params: { teamId, stationId: file.stationId ?? '' }, query: {} }),
    enabled: file.stationId !== null,
  });
  const found = station.data?.station;
  return useMemo(() => {
    if (!found) return null;
    const { zone, elevationM, latitude, longitude } = found;
    return { zone, heightM: elevationM, position: { latitude, longitude } };
  }, [found]);
}

interface BriefChoiceProps {
  readonly briefs: readonly { readonly briefId: string; readonly name: string; readonly version: number }[];
  readonly chosen: { readonly briefId: string } | null;
  readonly onChoose: (briefId: string) => void;
}

function BriefChoice({ briefs, chosen, onChoose }: BriefChoiceProps) {
  const id = useId();
  if (briefs.length === 0) return <p className="text-soft">The programme has no brief yet; the hour stands alone.</p>;
  return (
    <div>
      <label htmlFor={id} className="mb-1 block text-fine font-semibold text-soft">
        Brief
      </label>
      <select
        id={id}
        value={chosen?.briefId ?? ''}
        onChange={(event) => onChoose(event.currentTarget.value)}
        className="min-h-9 max-w-full rounded-md border border-[#918a78] bg-paper px-2"
      >
        {briefs.map(({ briefId, name, version }) => (
          <option key={briefId} value={briefId}>
            {name}, version {version}
          </option>
        ))}
      </select>
    </div>
  );
}

/** Where the chart starts: the hour in which most is asked. */
function hottestSlot({ dryBulbC, depressionK }: RecordYear): number {
  let hottest = 0;
  let highestC = Number.NEGATIVE_INFINITY;
  dryBulbC.forEach((valueC, slot) => {
    if (valueC > highestC && !Number.isNaN(depressionK[slot] ?? Number.NaN)) [hottest, highestC] = [slot, valueC];
  });
  return hottest;
}
