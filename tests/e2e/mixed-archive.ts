/** A zip as an engineer has it: good files, a broken one, a plain table, one file twice, and something that is no weather. */
import { demoWeatherFile } from '../../data/demo/demo-weather-file.ts';
import { sampleStation } from '../../data/demo/sample-upload.ts';
import { zipBytes } from '../support/zip-bytes.ts';

const HEADER_LINES = 8;
/** The first line after 1000 hours. */
export const BROKEN_LINE = 1009;

const places = [
  { ...sampleStation, name: 'Heron Spring', latitude: -29.4, longitude: 20.5, faults: [] },
  { ...sampleStation, name: 'Sedge Pan', latitude: -28.9, longitude: 21.3, faults: [] },
  { ...sampleStation, name: 'Broom Hill', latitude: -30.6, longitude: 20.9, faults: [] },
];
export const TABLE_STATION = 'Mast Ridge';
/** The stations that accepting everything of it puts on the map. */
export const newStations = [...places.map(({ name }) => name), TABLE_STATION];

export async function mixedArchive(): Promise<Buffer> {
  const good = places.map(demoWeatherFile);
  const [first] = good;
  if (first === undefined) throw new Error('no file was made');
  return await zipBytes({
    ...Object.fromEntries(good.map(({ name, text }) => [`north/${name}`, text])),
    'north/broken.epw': broken(demoWeatherFile({ ...sampleStation, name: 'Lost Kloof' }).text),
    'mast/mast-2023.csv': plainTable(2023),
    'old/heron again.epw': first.text,
    'readme.txt': 'Where these files came from.',
  });
}

/** A dry bulb in letters. */
function broken(text: string): string {
  const lines = text.split('\r\n');
  lines[BROKEN_LINE - 1] = (lines[BROKEN_LINE - 1] ?? '').split(',').with(6, 'warm').join(',');
  return lines.join('\r\n');
}

/** The hours of an invented year as a table that says where it was recorded, but not what its columns hold. */
export function plainTable(year: number): string {
  const { text } = demoWeatherFile({ ...sampleStation, name: TABLE_STATION, faults: [] });
  const rows = text.split('\r\n').slice(HEADER_LINES).filter(Boolean);
  const body = rows.map((row) => {
    const [, month = '', day = '', hour = '', , , dry, dew, , pressure] = row.split(',');
    const time = new Date(Date.UTC(year, Number(month) - 1, Number(day), Number(hour))).toISOString().slice(0, 16);
    return `${time.replace('T', ' ')},${dry},${dew},${Number(pressure) / 100}`;
  });
  const place = ['Latitude: -31.2', 'Longitude: 21.6', `Elevation: ${sampleStation.elevationM}`, 'Time zone: 2'];
  return [`Station: ${TABLE_STATION}`, ...place, 'time,air temp,dew,press', ...body].join('\n');
}
