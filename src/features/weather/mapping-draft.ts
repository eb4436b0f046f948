/** How a table is read, as a form holds it: every value a text, `''` for a column that the table does not have. */
import type { FileAnswers } from '../../contract/weather-reading.ts';
import { zoneIsKnown } from '../../engine/clock/zone-offset.ts';

export type Mapping = NonNullable<FileAnswers['mapping']>;
type TimeColumns = Mapping['time']['columns'];

export interface MappingDraft {
  form: TimeColumns['form'];
  /** Of a stamp, of serial days and of an epoch. */
  stamp: string;
  date: string;
  time: string;
  year: string;
  month: string;
  day: string;
  hour: string;
  minute: string;
  order: 'year first' | 'day first' | 'month first';
  hours: 'hours' | 'hours and minutes';
  system: '1900' | '1904';
  epochUnit: 's' | 'ms';
  scale: Mapping['time']['scale'];
  zone: string;
  mark: Mapping['time']['mark'];
  years: Mapping['years'];
  dryBulb: string;
  dryBulbUnit: Mapping['dryBulb']['unit'];
  dewPoint: string;
  dewPointUnit: Mapping['dryBulb']['unit'];
  relativeHumidity: string;
  relativeHumidityUnit: NonNullable<Mapping['relativeHumidity']>['unit'];
  wetBulb: string;
  wetBulbUnit: Mapping['dryBulb']['unit'];
  pressure: string;
  pressureUnit: NonNullable<Mapping['pressure']>['unit'];
  pressureLevel: NonNullable<Mapping['pressure']>['level'];
  station: string;
}
export type MappingField = keyof MappingDraft;

const blank: MappingDraft = {
  form: 'stamp',
  stamp: '',
  date: '',
  time: '',
  year: '',
  month: '',
  day: '',
  hour: '',
  minute: '',
  order: 'year first',
  hours: 'hours',
  system: '1900',
  epochUnit: 's',
  scale: 'standard',
  zone: '',
  mark: 'reading',
  years: 'actual',
  dryBulb: '',
  dryBulbUnit: 'C',
  dewPoint: '',
  dewPointUnit: 'C',
  relativeHumidity: '',
  relativeHumidityUnit: '%',
  wetBulb: '',
  wetBulbUnit: 'C',
  pressure: '',
  pressureUnit: 'hPa',
  pressureLevel: 'station',
  station: '',
};

/** The form's first values: the guess filled in; without one, empty. */
export function draftOfMapping(mapping: Mapping | null): MappingDraft {
  if (mapping === null) return blank;
  const { time, years, dryBulb, dewPoint, relativeHumidity, wetBulb, pressure, station } = mapping;
  return {
    ...blank,
    ...draftOfTime(time.columns),
    scale: time.scale,
    zone: time.zone ?? '',
    mark: time.mark,
    years,
    dryBulb: dryBulb.column,
    dryBulbUnit: dryBulb.unit,
    dewPoint: dewPoint?.column ?? '',
    dewPointUnit: dewPoint?.unit ?? dryBulb.unit,
    relativeHumidity: relativeHumidity?.column ?? '',
    relativeHumidityUnit: relativeHumidity?.unit ?? blank.relativeHumidityUnit,
    wetBulb: wetBulb?.column ?? '',
    wetBulbUnit: wetBulb?.unit ?? dryBulb.unit,
    pressure: pressure?.column ?? '',
    pressureUnit: pressure?.unit ?? blank.pressureUnit,
    pressureLevel: pressure?.level ?? blank.pressureLevel,
    station: station ?? '',
  };
}

function draftOfTime(columns: TimeColumns): Partial<MappingDraft> {
  const { form } = columns;
  switch (columns.form) {
    case 'stamp':
      return { form, stamp: columns.column, order: columns.order };
    case 'date and time':
      return { form, date: columns.date, time: columns.time, order: columns.order };
    case 'parts': {
      const { year, month, day, hour, minute, hours } = columns;
      return { form, year: year ?? '', month, day, hour, minute: minute ?? '', hours };
    }
    case 'serial days':
      return { form, stamp: columns.column, system: columns.system === 1900 ? '1900' : '1904' };
    case 'epoch':
      return { form, stamp: columns.column, epochUnit: columns.unit };
  }
}

/** The fields that hold the time in a form, those that may stay empty last. */
export function timeFields(form: MappingDraft['form']): readonly MappingField[] {
  switch (form) {
    case 'date and time':
      return ['date', 'time'];
    case 'parts':
      return ['month', 'day', 'hour', 'year', 'minute'];
    default:
      return ['stamp'];
  }
}

const MAY_STAY_EMPTY: readonly MappingField[] = ['year', 'minute'];

export type MappingProblems = Partial<Record<MappingField, string>>;

/** What is wrong with a mapping before it is sent, every fault at its field. */
export function mappingProblems(draft: MappingDraft): MappingProblems {
  const problems: MappingProblems = {};
  for (const field of timeFields(draft.form)) {
    if (draft[field] === '' && !MAY_STAY_EMPTY.includes(field)) problems[field] = 'Choose the column.';
  }
  if (draft.form === 'parts' && draft.year === '' && draft.years === 'actual')
    problems.year = 'Real years need their column. Choose it, or say that this is a typical year.';
  if (draft.dryBulb === '') problems.dryBulb = 'Choose the column of the dry bulb.';
  if (draft.dewPoint === '' && draft.relativeHumidity === '' && draft.wetBulb === '')
    problems.dewPoint = 'Choose a column of dew point, relative humidity or wet bulb: one of them is needed.';
  if (draft.scale === 'clock' && !zoneIsKnown(draft.zone.trim()))
    problems.zone = 'Name the time zone, such as Europe/Rome.';
  repeatedColumns(draft, problems);
  return problems;
}

/** One column cannot hold two things. */
function repeatedColumns(draft: MappingDraft, problems: MappingProblems): void {
  const fields: MappingField[] = [
    ...timeFields(draft.form),
    ...(['dryBulb', 'dewPoint', 'relativeHumidity', 'wetBulb', 'pressure', 'station'] as const),
  ];
  const taken = new Map<string, MappingField>();
  for (const field of fields) {
    const column = draft[field];
    if (column === '') continue;
    const first = taken.get(column);
    if (first === undefined) taken.set(column, field);
    else problems[field] ??= `“${column}” is chosen above already. One column holds one thing.`;
  }
}

/** The mapping that a draft without faults says. */
export function mappingOfDraft(draft: MappingDraft): Mapping {
  const { dryBulb, dewPoint, relativeHumidity, wetBulb, pressure, station } = draft;
  return {
    time: {
      columns: timeOfDraft(draft),
      scale: draft.scale,
      zone: draft.scale === 'clock' ? draft.zone.trim() : null,
      mark: draft.mark,
    },
    years: draft.years,
    dryBulb: { column: dryBulb, unit: draft.dryBulbUnit },
    dewPoint: dewPoint === '' ? null : { column: dewPoint, unit: draft.dewPointUnit },
    relativeHumidity: relativeHumidity === '' ? null : { column: relativeHumidity, unit: draft.relativeHumidityUnit },
    wetBulb: wetBulb === '' ? null : { column: wetBulb, unit: draft.wetBulbUnit },
    pressure: pressure === '' ? null : { column: pressure, unit: draft.pressureUnit, level: draft.pressureLevel },
    station: station === '' ? null : station,
  };
}

function timeOfDraft(draft: MappingDraft): TimeColumns {
  const { form, stamp, date, time, year, month, day, hour, minute, order, hours } = draft;
  switch (form) {
    case 'stamp':
      return { form, column: stamp, order };
    case 'date and time':
      return { form, date, time, order };
    case 'parts':
      return { form, year: year === '' ? null : year, month, day, hour, minute: minute === '' ? null : minute, hours };
    case 'serial days':
      return { form, column: stamp, system: draft.system === '1900' ? 1900 : 1904 };
    case 'epoch':
      return { form, column: stamp, unit: draft.epochUnit };
  }
}
