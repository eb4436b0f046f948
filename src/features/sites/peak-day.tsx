import { useQuery } from '@tanstack/react-query';
import { getSitePlace } from '../../contract/place.ts';
import type { Site } from '../../contract/sites.ts';
import { apiQuery } from '../../lib/api-query.ts';
import { number, percent, withUnit } from '../../lib/format.ts';
import type { ProgrammeKey } from './site-queries.ts';

interface PeakDayProps {
  readonly programme: ProgrammeKey;
  readonly site: Site;
  readonly limitM3: number | null;
}

/** The most water of one day under the brief that was saved last, beside what the utility allows. */
export function PeakDay({ programme, site, limitM3 }: PeakDayProps) {
  const { id, designLoadKw } = site;
  const input = { params: { ...programme, siteId: id }, query: {} };
  const place = useQuery({ ...apiQuery(getSitePlace, input), enabled: site.station !== null, retry: false }).data;
  const water = place?.shown?.water;
  if (place === undefined || water === undefined) {
    return <p className="text-soft">The peak day is not computed yet: the site’s weather waits to be judged.</p>;
  }
  const under = `Under ${place.brief.name}, version ${place.brief.version}, at its own cycles of concentration`;
  if (designLoadKw === null) {
    return (
      <p className="max-w-[70ch]">
        {under}: {withUnit(water.peakDayLitres, 'L', 1)} of make-up water per kW of design load on the peak day. Give
        the design load to compare it with the utility’s limit.
      </p>
    );
  }
  const peakM3 = (water.peakDayLitres * designLoadKw) / 1000;
  return (
    <p className="max-w-[70ch]">
      {under}: <strong>{withUnit(peakM3, 'm³', peakM3 < 100 ? 1 : 0)}</strong> of make-up water on the peak day
      {water.peakDay === null ? '' : ` (${water.peakDay})`}.{' '}
      {limitM3 === null
        ? 'The utility’s limit is not known.'
        : peakM3 <= limitM3
          ? `The utility allows ${withUnit(limitM3, 'm³', limitM3 < 100 ? 1 : 0)}: ${percent(100 * (1 - peakM3 / limitM3), 0)} to spare.`
          : `The utility allows ${withUnit(limitM3, 'm³', limitM3 < 100 ? 1 : 0)}: ${number(peakM3 - limitM3, 1)} m³ too little.`}
    </p>
  );
}
