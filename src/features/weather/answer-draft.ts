/** What a person says of a file, as the form holds it, and how it becomes the answers that are sent. Pure. */
import type { DeclaredStation, WeatherFileRecord } from '../../contract/weather.ts';
import { answerWeatherFile, type FileAnswers } from '../../contract/weather-reading.ts';
import { placeAsks, type QuestionCode, questionsOf, showsPlace } from './answer-questions.ts';
import { draftOfMapping, type MappingDraft, mappingOfDraft, mappingProblems } from './mapping-draft.ts';

export const placeFields = ['name', 'latitude', 'longitude', 'elevationM', 'utcOffsetH'] as const;
export type PlaceField = (typeof placeFields)[number];

/** What may be asked of the reading of any file, or of one whose source marks its values. */
const handlings = ['fillLongGaps', 'keepSuspect'] as const;
export type Handling = (typeof handlings)[number];

/** Formats whose values carry the quality codes of their source. */
const CODED_FORMATS: readonly string[] = ['ISD', 'Global Hourly'];

export function handlingsOf({ file: { format } }: WeatherFileRecord): readonly Handling[] {
  return handlings.filter((each) => each !== 'keepSuspect' || CODED_FORMATS.includes(format ?? ''));
}

export interface AnswerDraft {
  place: Record<PlaceField, string>;
  /** By question; `''` where nothing is chosen. */
  choices: Partial<Record<QuestionCode, string>>;
  mapping: MappingDraft;
  handling: Record<Handling, boolean>;
}

export type AnswerReading =
  | { readonly ok: true; readonly answers: FileAnswers }
  /** Messages by field, such as `place.latitude`; `form` for what belongs to none. */
  | { readonly ok: false; readonly problems: Readonly<Record<string, string>> };

/** The form's first values: what the file declares, what was answered before, what is guessed. */
export function draftOfRecord(record: WeatherFileRecord): AnswerDraft {
  const { answers, table } = record;
  const said: Partial<Record<string, string | number>> = { ...answers.answers };
  return {
    place: declaredPlace(record.file.station),
    choices: Object.fromEntries(questionsOf(record).map(({ code }) => [code, String(said[code] ?? '')])),
    mapping: draftOfMapping(table?.mapping ?? null),
    handling: { fillLongGaps: answers.fillLongGaps ?? false, keepSuspect: answers.keepSuspect ?? false },
  };
}

function declaredPlace(station: DeclaredStation | null): AnswerDraft['place'] {
  const text = (value: number | null | undefined) => (value === null || value === undefined ? '' : String(value));
  return {
    name: station?.name ?? '',
    latitude: text(station?.latitude),
    longitude: text(station?.longitude),
    elevationM: text(station?.elevationM),
    utcOffsetH: text(station?.utcOffsetH),
  };
}

/** Reads the form: the answers on top of those that were given before, or every fault at once. */
export function readAnswers(draft: AnswerDraft, record: WeatherFileRecord): AnswerReading {
  const problems: Record<string, string> = {};
  const mapping = record.table === null ? undefined : draft.mapping;
  if (mapping) {
    for (const [field, message] of Object.entries(mappingProblems(mapping))) problems[`mapping.${field}`] = message;
  }
  const place = showsPlace(record) ? readPlace(draft, record, problems) : {};
  const choices = readChoices(draft, record, problems);
  if (Object.keys(problems).length > 0) return { ok: false, problems };
  const { answers: before } = record;
  const said = {
    ...before,
    ...together('place', { ...before.place, ...place }),
    ...(mapping ? { mapping: mappingOfDraft(mapping) } : {}),
    ...together('answers', { ...before.answers, ...choices }),
    ...readHandling(draft, record),
  };
  const parsed = answerWeatherFile.body.schema.safeParse(said);
  if (parsed.success) return { ok: true, answers: parsed.data };
  return { ok: false, problems: { form: parsed.error.issues.map(({ message }) => message).join(' ') } };
}

function together(name: 'place' | 'answers', value: object): object {
  return Object.keys(value).length === 0 ? {} : { [name]: value };
}

const ranges = {
  latitude: { low: -90, high: 90, words: 'Give degrees from −90 to 90, south of the equator negative.' },
  longitude: { low: -180, high: 180, words: 'Give degrees from −180 to 180, west of Greenwich negative.' },
  elevationM: { low: -500, high: 9000, words: 'Give metres above the sea, −500 to 9,000.' },
  utcOffsetH: { low: -12, high: 14, words: 'Give hours from −12 to 14, such as 2 or −3:30.' },
} as const;

/** What of the place differs from what the file declares. */
function readPlace(
  { place, mapping }: AnswerDraft,
  record: WeatherFileRecord,
  problems: Record<string, string>,
): NonNullable<FileAnswers['place']> {
  const declared = declaredPlace(record.file.station);
  const needed = neededOfPlace(record, mapping);
  const stated: Record<string, string | number> = {};
  for (const field of ['latitude', 'longitude', 'elevationM', 'utcOffsetH'] as const) {
    const typed = place[field].trim();
    const { low, high, words } = ranges[field];
    const value = field === 'utcOffsetH' ? typedOffset(typed) : typedNumber(typed);
    if (typed === '') {
      if (needed.includes(field)) problems[`place.${field}`] = words;
    } else if (!(value >= low && value <= high)) problems[`place.${field}`] = words;
    else if (typed !== declared[field]) stated[field] = value;
  }
  const isNowhere = typedNumber(place.latitude) === 0 && typedNumber(place.longitude) === 0;
  if (isNowhere) problems['place.latitude'] = '0, 0 lies in the sea off Africa. Say where the station is.';
  if (place.name.trim() === '') problems['place.name'] = 'Name the station.';
  else if (place.name.trim().length > 200) problems['place.name'] = 'Use 200 characters or fewer.';
  else if (place.name.trim() !== declared.name) stated.name = place.name.trim();
  return stated;
}

/** What must not stay empty, by what the file asks. */
function neededOfPlace({ asks, table, file }: WeatherFileRecord, mapping: MappingDraft): readonly PlaceField[] {
  const asked = placeAsks(asks).map(({ what }) => what);
  const ownPressure = table !== null && mapping.pressure !== '' && mapping.pressureLevel === 'station';
  const lacksElevation = table !== null && (file.station?.elevationM ?? null) === null;
  const needsElevation = (asked.includes('elevation-missing') || lacksElevation) && !ownPressure;
  const { latitude = null, longitude = null, utcOffsetH = null } = file.station ?? {};
  const lacksOffset = asked.includes('place-missing') && latitude !== null && longitude !== null && utcOffsetH === null;
  return [
    ...(lacksOffset ? (['utcOffsetH'] as const) : []),
    ...(asked.includes('place-missing') || asked.includes('place-sign') ? (['latitude', 'longitude'] as const) : []),
    ...(needsElevation ? (['elevationM'] as const) : []),
  ];
}

function readChoices(
  { choices, place }: AnswerDraft,
  record: WeatherFileRecord,
  problems: Record<string, string>,
): Record<string, string | number> {
  const declared = declaredPlace(record.file.station);
  const isMoved = (['latitude', 'longitude', 'elevationM'] as const).some(
    (field) => place[field].trim() !== declared[field],
  );
  const said: Record<string, string | number> = {};
  for (const { code, options, orByPlace } of questionsOf(record)) {
    const value = choices[code] ?? '';
    if (options.length === 0) {
      const period = Number(value);
      if (Number.isInteger(period) && period >= 1 && period <= 200) said[code] = period;
      else problems[`choices.${code}`] = 'Give the number of the period, 1 for the first.';
    } else if (value !== '') said[code] = value;
    else if (!orByPlace || !isMoved)
      problems[`choices.${code}`] = orByPlace ? 'Choose, or correct the place below.' : 'Choose one of them.';
  }
  return said;
}

/** What is asked for, and what was before and is no more; what was never asked is not said. */
function readHandling({ handling }: AnswerDraft, record: WeatherFileRecord): Partial<Record<Handling, boolean>> {
  const asked = handlingsOf(record).filter((each) => handling[each] || record.answers[each] !== undefined);
  return Object.fromEntries(asked.map((each) => [each, handling[each]]));
}

const NUMBER = /^[+-]?(\d+([.,]\d*)?|[.,]\d+)$/;

/** A number as people type it, a true minus sign and a decimal comma too; NaN for anything else. */
function typedNumber(text: string): number {
  const plain = text.trim().replace('−', '-');
  return NUMBER.test(plain) ? Number(plain.replace(',', '.')) : Number.NaN;
}

/** Hours, or hours and minutes: 5.5, +5:30. */
function typedOffset(text: string): number {
  const [, sign = '', hours = '', minutes = ''] = /^([+−-]?)(\d{1,2}):([0-5]\d)$/.exec(text) ?? [];
  if (hours === '') return typedNumber(text);
  return (sign === '' || sign === '+' ? 1 : -1) * (Number(hours) + Number(minutes) / 60);
}
