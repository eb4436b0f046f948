/** Natural Earth shortens some names to fit a small map; ours are spelled out, in sentence case. */
const SPELLED_OUT: Readonly<Record<string, string>> = {
  'Antigua and Barb.': 'Antigua and Barbuda',
  'Bosnia and Herz.': 'Bosnia and Herzegovina',
  'British Virgin Is.': 'British Virgin Islands',
  'Cayman Is.': 'Cayman Islands',
  'Central African Rep.': 'Central African Republic',
  'Cook Is.': 'Cook Islands',
  'Dem. Rep. Congo': 'Democratic Republic of the Congo',
  'Dominican Rep.': 'Dominican Republic',
  'Eq. Guinea': 'Equatorial Guinea',
  eSwatini: 'Eswatini',
  'Faeroe Is.': 'Faroe Islands',
  'Falkland Is.': 'Falkland Islands',
  'Fr. Polynesia': 'French Polynesia',
  'Fr. S. Antarctic Lands': 'French Southern Lands',
  Macedonia: 'North Macedonia',
  'Marshall Is.': 'Marshall Islands',
  'N. Cyprus': 'Northern Cyprus',
  'N. Mariana Is.': 'Northern Mariana Islands',
  'Pitcairn Is.': 'Pitcairn Islands',
  'S. Geo. and the Is.': 'South Georgia',
  'S. Sudan': 'South Sudan',
  'São Tomé and Principe': 'São Tomé and Príncipe',
  'Solomon Is.': 'Solomon Islands',
  'St-Barthélemy': 'Saint-Barthélemy',
  'St-Martin': 'Saint-Martin',
  'St. Kitts and Nevis': 'Saint Kitts and Nevis',
  'St. Pierre and Miquelon': 'Saint-Pierre and Miquelon',
  'St. Vin. and Gren.': 'Saint Vincent and the Grenadines',
  'Turks and Caicos Is.': 'Turks and Caicos Islands',
  'U.S. Virgin Is.': 'US Virgin Islands',
  'W. Sahara': 'Western Sahara',
  'Wallis and Futuna Is.': 'Wallis and Futuna',
};

/** Bases, reefs, zones and uninhabited specks that Natural Earth draws but that need no name on this sheet. */
const NOT_NAMED: ReadonlySet<string> = new Set([
  'Akrotiri',
  'Ashmore and Cartier Is.',
  'Baikonur',
  'Bajo Nuevo Bank',
  'Br. Indian Ocean Ter.',
  'Clipperton I.',
  'Coral Sea Is.',
  'Cyprus U.N. Buffer Zone',
  'Dhekelia',
  'Heard I. and McDonald Is.',
  'Indian Ocean Ter.',
  'Scarborough Reef',
  'Serranilla Bank',
  'Siachen Glacier',
  'Spratly Is.',
  'U.S. Minor Outlying Is.',
  'USNB Guantanamo Bay',
]);

/** The name that the map prints for a country of Natural Earth, or null where it prints none. */
export function countryLabel(atlasName: string): string | null {
  if (NOT_NAMED.has(atlasName)) return null;
  return SPELLED_OUT[atlasName] ?? atlasName;
}
