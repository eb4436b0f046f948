import { textCell as text } from '#engine/csv-cell.ts';
import { siteHeads } from '#engine/sites/site-columns.ts';
import type { ResolvedSite } from './resolved-sites-read-model.ts';

/** A byte order mark, by which spreadsheets know UTF-8. */
const MARK = '\uFEFF';
const HEADS = [
  'Letters',
  ...(['name', 'latitude', 'longitude', 'elevation', 'elevation source', 'load', 'station', 'reason'] as const).map(
    (column) => siteHeads[column],
  ),
  'Station',
  'Distance (km)',
  'Station less site (m)',
  'Flags',
  siteHeads.notes,
];

/** Sites as comma-separated values (RFC 4180) that the import reads again; text is guarded, numbers are plain. */
export function siteTable(sites: readonly ResolvedSite[], notes: ReadonlyMap<string, string>): string {
  const lines = sites.map((site) => {
    const { station } = site;
    const chosen = station?.chosen === true ? station : null;
    return [
      ...[text(site.letters), text(site.name), figure(site.latitude), figure(site.longitude), figure(site.elevationM)],
      ...[
        text(site.elevationSource ?? ''),
        figure(site.designLoadKw),
        text(chosen?.name ?? ''),
        text(chosen?.reason ?? ''),
      ],
      ...[
        text(station?.name ?? ''),
        figure(station?.distanceKm ?? null, 1),
        figure(station?.heightDifferenceM ?? null, 0),
      ],
      ...[text(site.flags.join('; ')), text(notes.get(site.id) ?? '')],
    ].join(',');
  });
  return `${MARK}${[HEADS.map(text).join(','), ...lines].join('\r\n')}\r\n`;
}

function figure(value: number | null, decimals?: number): string {
  if (value === null) return '';
  return decimals === undefined ? String(value) : value.toFixed(decimals);
}
