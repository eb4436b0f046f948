/** The columns of a table of sites: what they are called when it is written, and how those of others are recognised. */

export const siteColumns = [
  'name',
  'position',
  'latitude',
  'longitude',
  'elevation',
  'elevation source',
  'load',
  'station',
  'reason',
  'notes',
] as const;
export type SiteColumn = (typeof siteColumns)[number];

/** A row of a table as it is written, by what its cells are. */
export type SiteCells = Readonly<Partial<Record<SiteColumn, string>>>;

/** Heads of the table that is exported; its other columns (letters, distance, height difference) are for reading only. */
export const siteHeads: Readonly<Record<SiteColumn, string>> = {
  name: 'Name',
  position: 'Position',
  latitude: 'Latitude (°)',
  longitude: 'Longitude (°)',
  elevation: 'Elevation (m)',
  'elevation source': 'Elevation source',
  load: 'Design load (kW)',
  station: 'Chosen station',
  reason: 'Reason for the station',
  notes: 'Notes',
};

/** Whole heads, without units, in the words that registers of sites use; the first column that fits is taken. */
const KNOWN: Readonly<Record<SiteColumn, RegExp>> = {
  name: /^(site|place|building|school|facility|asset|location)?\s*(name|title)$|^(site|place|building|school|facility|location|naam|nom|nombre|nome)$/,
  position: /^(position|coordinates?|coords?|lat ?(and|,|\/)? ?(lon|long|lng)|gps|location coordinates)$/,
  latitude: /^(latitude|lat|northing degrees|y|breite|breitengrad|latitud|latitudine)$/,
  longitude: /^(longitude|long|lon|lng|x|länge|längengrad|longitud|longitudine)$/,
  elevation: /^(elevation|altitude|height|elev|alt|ground level|höhe|altitud|altitudine|z)$/,
  'elevation source': /^(elevation|altitude|height) source$/,
  load: /^(design |cooling |peak |design cooling )?load$|^(cooling )?capacity$|^design (cooling )?(duty|capacity)$/,
  station: /^(chosen |weather )?station$/,
  reason: /^reason( for the station)?$/,
  notes: /^(notes?|remarks?|comments?|description)$/,
};

/** Which column of a table each of ours is, by its heads; what is not recognised is left out, for a person to say. */
export function guessSiteColumns(heads: readonly string[]): Partial<Record<SiteColumn, number>> {
  const guess: Partial<Record<SiteColumn, number>> = {};
  const plain = heads.map(plainHead);
  for (const column of siteColumns) {
    const found = plain.findIndex((head, index) => KNOWN[column].test(head) && !Object.values(guess).includes(index));
    if (found >= 0) guess[column] = found;
  }
  // Two angles say more than a position beside them.
  if (guess.latitude !== undefined && guess.longitude !== undefined) delete guess.position;
  return guess;
}

/** "Design_load [kW]" is "design load". */
function plainHead(head: string): string {
  return head
    .replace(/\(.*?\)|\[.*?\]|,\s*(m|kw|°|deg(rees)?)\s*$/gi, ' ')
    .replace(/[_\-.:°]+/g, ' ')
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .toLowerCase()
    .replace(/\b(kw|masl|deg|degrees|dd|wgs84|decimal)\b|\s+m\s*$/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();
}
