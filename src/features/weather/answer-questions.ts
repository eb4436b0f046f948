import type { Ask, WeatherFileRecord } from '../../contract/weather.ts';
import type { FileAnswers } from '../../contract/weather-reading.ts';

export type QuestionCode = keyof NonNullable<FileAnswers['answers']>;

interface Option {
  readonly value: string;
  readonly words: string;
}

export interface Question {
  readonly code: QuestionCode;
  readonly title: string;
  /** What the file makes doubtful, each place of it. */
  readonly messages: readonly string[];
  /** What the file makes likely, in its words. */
  readonly proposal: string | null;
  /** The option that the proposal names; null when it names none of them. */
  readonly proposed: string | null;
  /** None for a number that is typed. */
  readonly options: readonly Option[];
  /** Correcting the place below answers it as well. */
  readonly orByPlace: boolean;
}

type Asked = Omit<Question, 'code' | 'messages' | 'proposal' | 'proposed'> & {
  /** Which option a proposal names. */
  readonly proposedBy: (proposal: string) => string | null;
};

const questions: Readonly<Record<QuestionCode, Asked>> = {
  'pressure-sea-level': {
    title: 'Pressure at sea level or at the station',
    options: [
      { value: 'convert', words: 'It is at sea level: convert it to the station' },
      { value: 'keep', words: 'It is at the station: take it as it stands' },
    ],
    orByPlace: false,
    proposedBy: () => 'convert',
  },
  'pressure-elevation': {
    title: 'Pressure or elevation',
    options: [
      { value: 'pressure', words: 'Believe the pressure column' },
      { value: 'elevation', words: 'Believe the elevation, and take the standard atmosphere there' },
    ],
    orByPlace: true,
    proposedBy: () => 'pressure',
  },
  'dew-is-wet-bulb': {
    title: 'What the dew-point column holds',
    options: [
      { value: 'wet bulb', words: 'It holds the wet bulb' },
      { value: 'dew point', words: 'It holds the dew point: take it as it stands' },
      { value: 'relative humidity', words: 'Leave it, and use the relative humidity' },
    ],
    orByPlace: false,
    proposedBy: (proposal) => (/wet bulb/.test(proposal) ? 'wet bulb' : 'relative humidity'),
  },
  'unit-guess': {
    title: 'Unit of the pressure',
    options: [
      { value: 'hectopascals', words: 'Hectopascals: multiply by 100' },
      { value: 'pascals', words: 'Pascals: take it as it stands' },
    ],
    orByPlace: false,
    proposedBy: () => 'hectopascals',
  },
  'several-periods': {
    title: 'Which period to read',
    options: [],
    orByPlace: false,
    proposedBy: () => '1',
  },
  'time-repeat': {
    title: 'Rows with the same time',
    options: [
      { value: 'first', words: 'Keep the first, leave the second copy out' },
      { value: 'absent day', words: 'Lay the second copy on the day that is absent' },
    ],
    orByPlace: false,
    proposedBy: (proposal) => (proposal.startsWith('Keep the first') ? 'first' : 'absent day'),
  },
  'place-sign': {
    title: 'Where the station is',
    options: [{ value: 'as written', words: 'The place is right as the file has it' }],
    orByPlace: true,
    proposedBy: () => null,
  },
};

function isQuestion(what: string): what is QuestionCode {
  return Object.hasOwn(questions, what);
}

/** What a file asks that is answered by a choice; where it stands and what a table holds have forms of their own. */
export function questionsOf({ asks, table }: Pick<WeatherFileRecord, 'asks' | 'table'>): readonly Question[] {
  const codes = [...new Set(asks.map(({ what }) => what))];
  return codes.flatMap((code) => {
    // Of a table that nobody has mapped, the question about units is the whole mapping.
    if (!isQuestion(code) || (code === 'unit-guess' && table !== null)) return [];
    const { proposedBy, ...asked } = questions[code];
    const own = asks.filter(({ what }) => what === code);
    const proposal = own.find((ask) => ask.proposal !== null)?.proposal ?? null;
    const proposed = proposal === null ? null : proposedBy(proposal);
    return [{ code, ...asked, messages: own.map(({ message }) => message), proposal, proposed }];
  });
}

const PLACE_CODES = ['place-missing', 'place-sign', 'elevation-missing', 'pressure-elevation'];

/** Questions that a place answers, in the words of the file. */
export function placeAsks(asks: readonly Ask[]): readonly Ask[] {
  return asks.filter(({ what }) => PLACE_CODES.includes(what));
}

/** Whether the form shows the place: a table seldom names it, and what waits or was refused may have it corrected. */
export function showsPlace({ asks, table, file }: Pick<WeatherFileRecord, 'asks' | 'table' | 'file'>): boolean {
  return file.status !== 'asks' || table !== null || placeAsks(asks).length > 0;
}
